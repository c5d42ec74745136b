import { type Column, Heading, Quiet, Stack, Table, Text } from '@/components/ui';
import type { FitParameter, PublicFit } from '@/lib/contract/fits';
import { formatNumber, formatPercent } from '@/lib/units';

import { parameterWords } from './parameterWords';

const figure = (value: number) => formatNumber(value, { decimals: Math.abs(value) < 10 ? 3 : 1 });
const withSpread = (mean: number, sd: number) => `${figure(mean)} ± ${figure(sd)}`;

const columns: Column<FitParameter>[] = [
  { key: 'name', title: 'Parameter', cell: ({ name }) => parameterWords(name) },
  { key: 'estimate', title: 'Fitted', figures: true, cell: ({ estimate, se }) => withSpread(estimate, se) },
  {
    key: 'prior',
    title: 'Prior',
    figures: true,
    cell: ({ priorMean, priorSd }) => withSpread(priorMean, priorSd),
  },
  {
    key: 'share',
    title: 'From the prior',
    figures: true,
    cell: ({ priorShareFraction }) => formatPercent(priorShareFraction),
    sortValue: ({ priorShareFraction }) => priorShareFraction,
  },
  { key: 'source', title: 'Where the prior comes from', cell: ({ source }) => source },
];

/** Every parameter beside its prior, with the prior's source. */
export function PriorsPart({ fit }: { fit: PublicFit['fit'] }) {
  if (!fit) return <Quiet>The pool has not been fitted yet, so there are no parameters to show.</Quiet>;
  return (
    <Stack gap="m">
      <Heading>The priors, and what became of them</Heading>
      <Text>
        Centres come from published studies of LFP cells, widths are judgement, meant to span the cells that
        were published. No benefit of clamping is assumed: its prior is centred on none. Single parameters
        lean on their priors more than lives do, since heat and time can partly stand for each other.
      </Text>
      <Table
        caption="Parameters of the public fit beside their priors"
        columns={columns}
        rows={fit.parameters}
        rowKey={({ name }) => name}
      />
    </Stack>
  );
}
