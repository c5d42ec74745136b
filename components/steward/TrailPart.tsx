import { Banner, Button, DefinitionList, Heading, Link, Row, Stack, Text } from '@/components/ui';
import { useCheckTrail } from '@/lib/client/steward';
import type { Health } from '@/lib/contract/steward';
import { formatCount } from '@/lib/units';

import { trailWords } from './healthWords';

const mostShown = 10;

/** Whether the chain of the trail is whole. */
export function TrailPart({ trail }: { trail: Health['trail'] }) {
  const check = useCheckTrail();
  const problems = trail.lastCheck?.problems ?? [];
  return (
    <Stack gap="m">
      <Heading>Trail</Heading>
      <Text aria-live="polite">
        {`${trailWords(trail)} It holds ${formatCount(trail.entries)} entries now, each sealed by the one before, and is checked every morning.`}
      </Text>
      {problems.length > 0 && (
        <Banner kind="error" title="The trail is not whole">
          <DefinitionList
            items={problems
              .slice(0, mostShown)
              .map(({ id, problem }, place) => ({ label: `${place + 1}. Entry ${id}`, value: problem }))}
          />
        </Banner>
      )}
      <Row>
        <Button
          label="Check it now"
          busy={check.isPending || trail.isChecking}
          onPress={() => check.mutate()}
        />
        <Link href="/steward/trail">Read the trail</Link>
      </Row>
    </Stack>
  );
}
