import { DefinitionList, Heading, Quiet, Stack } from '@/components/ui';
import type { Health } from '@/lib/contract/steward';

import { runWords } from './healthWords';

const kindWords = { working: 'Working fit', public: 'Public fit' } as const;

/** The last runs of the fit, and those that failed lately. */
export function FitsPart({ fits: { last, failedLately, isRunning } }: { fits: Health['fits'] }) {
  return (
    <Stack gap="m">
      <Heading>Fits</Heading>
      {isRunning && <Quiet aria-live="polite">A refit waits or is under way.</Quiet>}
      {last.length === 0 ? (
        <Quiet>No fit has been made yet. The first follows the first approved check.</Quiet>
      ) : (
        <DefinitionList
          items={last.map((run) => ({
            label: kindWords[run.kind],
            value: runWords(run),
            tone: run.isGood ? 'ink' : 'rust',
          }))}
        />
      )}
      <Quiet>
        {failedLately.length === 0
          ? 'None failed in the last 30 days.'
          : 'Failed in the last 30 days; the good fit before each stayed in force:'}
      </Quiet>
      {failedLately.length > 0 && (
        <DefinitionList
          items={failedLately.map((run, place) => ({
            label: `${kindWords[run.kind]} ${place + 1}`,
            value: runWords(run),
          }))}
        />
      )}
    </Stack>
  );
}
