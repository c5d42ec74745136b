import { DefinitionList, Heading, Link, Readout, Readouts, Stack } from '@/components/ui';
import type { Health } from '@/lib/contract/steward';
import { formatCount, noValue } from '@/lib/units';

import { shareWords, spanWords } from './healthWords';

const hourMs = 3_600_000;

/** What waits to be screened, and how fast and how it has been decided. */
export function QueuePart({ queue }: { queue: Health['queue'] }) {
  const { counts, oldestSubmittedAt, medianDecisionHours, shares } = queue;
  const now = new Date();
  const oldest =
    oldestSubmittedAt === null
      ? null
      : spanWords(Math.max(0, now.getTime() - Date.parse(oldestSubmittedAt)) / hourMs);
  const median = medianDecisionHours === null ? null : spanWords(medianDecisionHours);
  return (
    <Stack gap="l">
      <Heading>Screening</Heading>
      <Readouts>
        <Readout value={formatCount(counts.submitted ?? 0)} unit="">
          checks wait for a moderator
        </Readout>
        <Readout value={oldest?.value ?? noValue} unit={oldest?.unit ?? ''}>
          the oldest has waited
        </Readout>
        <Readout value={median?.value ?? noValue} unit={median?.unit ?? ''}>
          from submission to decision, median of 90 days
        </Readout>
      </Readouts>
      <DefinitionList
        items={[
          { label: 'With owners', value: `${formatCount(counts.sentBack ?? 0)} sent back` },
          {
            label: 'Decided so far',
            value: `${formatCount(counts.approved ?? 0)} approved, ${formatCount(counts.turnedAway ?? 0)} turned away, ${formatCount(counts.recalled ?? 0)} recalled`,
          },
          ...shares.map((share) => ({
            label: `Approved, ${share.days} days`,
            value: shareWords(share),
          })),
        ]}
      />
      <Link href="/screening">Open the queue</Link>
    </Stack>
  );
}
