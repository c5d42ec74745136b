import { SurvivalChart } from '@/components/charts';
import { Heading, Quiet, Stack, Text } from '@/components/ui';
import type { CellPage } from '@/lib/contract/cells';

import { survivalSentence } from './survivalWords';

/** Share of banks still above 80 % by age: as counted, with a smooth curve where enough banks have crossed. */
export function SurvivalPart({ page: { survival, poolSurvival, cellType } }: { page: CellPage }) {
  const shown = survival ?? poolSurvival;
  if (!shown)
    return (
      <Stack gap="s">
        <Heading level={2}>Banks still above 80 %</Heading>
        <Quiet>Too few owners stand behind this to say anything of it yet.</Quiet>
      </Stack>
    );
  const of = survival ? cellType.name : 'all cell types';
  return (
    <Stack gap="s">
      <Heading level={2}>Banks still above 80 %</Heading>
      {!survival && <Text>Too few owners of this cell type yet: these are the banks of all cell types.</Text>}
      <SurvivalChart
        title={`Share of banks of ${of} still above 80 %, by age`}
        points={shown.points}
        finding={survivalSentence(shown)}
        computed={
          <Text>
            A bank falls below 80 % somewhere between two of its checks, and joins with its first one: the
            share is the estimate for such data (Turnbull). Where it can’t be told more closely, both ends are
            given. The range is Wilson’s, with the banks whose standing is known at that age. The smooth curve
            (Weibull) is fitted to the same checks and drawn only where banks of five owners have crossed.
            Banks in every use are in it, and banks that stopped reporting may have done worse.
          </Text>
        }
      />
    </Stack>
  );
}
