import { StyleSheet, View } from 'react-native';

import { color, space } from '@/components/theme';
import { Heading, Quiet, SeverityChip, Strong } from '@/components/ui';
import type { Finding } from '@/lib/contract/moderation';

/** What screening found, doubtful first, each with its numbers in words. */
export function FindingList({ findings }: { findings: Finding[] }) {
  return (
    <View style={styles.list}>
      <Heading>Findings</Heading>
      {findings.map(({ rule, title, severity, text }) => (
        <View key={rule} style={styles.finding}>
          <View style={styles.line}>
            <Strong style={styles.title}>{title}</Strong>
            <SeverityChip severity={severity} />
          </View>
          <Quiet>{text}</Quiet>
        </View>
      ))}
    </View>
  );
}

const styles = StyleSheet.create({
  list: { gap: space.xs },
  finding: { paddingVertical: space.m, borderBottomWidth: 1, borderBottomColor: color.line, gap: space.xs },
  line: { flexDirection: 'row', justifyContent: 'space-between', alignItems: 'flex-start', gap: space.s },
  title: { flexShrink: 1, minWidth: 0 },
});
