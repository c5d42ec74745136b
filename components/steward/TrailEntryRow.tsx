import { useRouter } from 'expo-router';

import { Button, Chip, Disclosure, Figure, Quiet, Row, Stack, Strong, Text } from '@/components/ui';
import type { TrailEntry } from '@/lib/contract/steward';
import { formatInstant } from '@/lib/units';

import { actionWord, actorWords, kindWord } from './trailWords';

/** One entry: when, who, what with which record, and all it holds on demand. */
export function TrailEntryRow({ entry }: { entry: TrailEntry }) {
  const router = useRouter();
  const { id, at, actorRole, actorId, kind, record, action, details, texts } = entry;
  return (
    <li>
      <Stack gap="xs">
        <Row gap="s">
          <Chip>{kindWord(kind)}</Chip>
          <Strong>{actionWord(action)}</Strong>
          <Quiet>{`${formatInstant(at)} · ${actorWords[actorRole]} · entry ${id}`}</Quiet>
        </Row>
        {texts.map(({ field, text }) => (
          <Text key={field}>{text === null ? `The ${field} was erased.` : `“${text}”`}</Text>
        ))}
        <Disclosure label={`All of entry ${id}`}>
          <Stack gap="s">
            <Figure size="small">{`${kind} ${record}`}</Figure>
            {actorId && <Figure size="small">{`by account ${actorId}`}</Figure>}
            {details !== '' && <pre className="ebb-pre">{details}</pre>}
            <Row>
              <Button
                kind="quiet"
                label="All of this record"
                onPress={() => router.setParams({ kind: undefined, record })}
              />
            </Row>
          </Stack>
        </Disclosure>
      </Stack>
    </li>
  );
}
