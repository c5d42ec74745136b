import { Link as RouterLink } from 'expo-router';
import { StyleSheet, View } from 'react-native';

import { color, space } from '@/components/theme';
import { Chip, EmptyState, Figure, Quiet, Row, SeverityChip } from '@/components/ui';
import type { QueueFilters } from '@/lib/client/moderation';
import type { QueueEntry } from '@/lib/contract/moderation';
import { formatAgo } from '@/lib/units';

import { writeFilters } from './queueFilters';

interface QueueListProps {
  entries: QueueEntry[];
  filters: QueueFilters;
  /** The submission shown beside the list. */
  currentId?: string;
  now: Date;
}

/** The submissions that the filters let through, doubtful ones first; each is known by its bank's five characters. */
export function QueueList({ entries, filters, currentId, now }: QueueListProps) {
  const params = writeFilters(filters);
  if (entries.length === 0)
    return (
      <EmptyState title="Nothing here">New submissions appear by themselves, doubtful ones first.</EmptyState>
    );
  return (
    <View role="list" aria-label="Submissions">
      {entries.map((entry) => (
        <View key={entry.checkId} role="listitem">
          <RouterLink
            href={{ pathname: '/screening/[checkId]', params: { ...params, checkId: entry.checkId } }}
            aria-current={entry.checkId === currentId ? 'page' : undefined}
            style={StyleSheet.flatten([styles.entry, entry.checkId === currentId && styles.current])}
          >
            <View style={styles.line}>
              <Figure strong>{entry.pseudonym}</Figure>
              <SeverityChip severity={entry.severity} />
            </View>
            <Quiet>{entry.headline}</Quiet>
            <Quiet>{`${entry.cellType.name}, ${entry.layout} · ${formatAgo(entry.submittedAt, now)}`}</Quiet>
            <EntryMarks entry={entry} />
          </RouterLink>
        </View>
      ))}
    </View>
  );
}

function EntryMarks({ entry: { isOwn, claimedBy, isProposed } }: { entry: QueueEntry }) {
  const marks = [
    ...(isOwn ? ['your own'] : []),
    ...(claimedBy === 'other' ? ['another moderator is at work'] : []),
    ...(isProposed ? ['second opinion asked'] : []),
  ];
  if (marks.length === 0) return null;
  return (
    <Row gap="xs">
      {marks.map((mark) => (
        <Chip key={mark}>{mark}</Chip>
      ))}
    </Row>
  );
}

const styles = StyleSheet.create({
  entry: {
    display: 'flex',
    flexDirection: 'column',
    gap: space.xs,
    paddingVertical: space.m,
    paddingHorizontal: space.m,
    borderBottomWidth: 1,
    borderBottomColor: color.line,
    borderLeftWidth: 4,
    borderLeftColor: 'transparent',
  },
  current: { backgroundColor: color.surface, borderLeftColor: color.tide },
  line: { flexDirection: 'row', justifyContent: 'space-between', alignItems: 'center', gap: space.s },
});
