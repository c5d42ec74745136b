import { useQuery } from '@tanstack/react-query';

import { QueryView } from '@/components/QueryView';
import {
  type Column,
  Disclosure,
  Heading,
  LoadingState,
  Quiet,
  SkeletonRows,
  Stack,
  Table,
} from '@/components/ui';
import { effectQuery } from '@/lib/client/moderation';
import type { LifeWith, Submission, SubmissionEffect } from '@/lib/contract/moderation';
import { formatCount, formatNumber, formatPercent, formatQuantity, formatRange } from '@/lib/units';

interface LifeRow {
  name: string;
  life: LifeWith;
}
type Neighbour = SubmissionEffect['neighbours'][number];

const lifeColumns = (cellType: string, basis: LifeWith['basis']): Column<LifeRow>[] => [
  {
    key: 'name',
    title: `${basis === 'cellType' ? cellType : 'The pool'}, standard use`,
    cell: ({ name }) => name,
  },
  { key: 'years', title: 'Years to 80 %', figures: true, cell: ({ life }) => yearsWords(life) },
  { key: 'banks', title: 'Banks', figures: true, cell: ({ life }) => formatCount(life.banks) },
  { key: 'checks', title: 'Checks', figures: true, cell: ({ life }) => formatCount(life.checks) },
];

const neighbourColumns: Column<Neighbour>[] = [
  {
    key: 'age',
    title: 'Age',
    figures: true,
    cell: ({ ageYears }) => formatQuantity(ageYears, 'y', { decimals: 1 }),
  },
  { key: 'efc', title: 'Full cycles', figures: true, cell: ({ efc }) => formatNumber(efc, { decimals: 0 }) },
  { key: 'depth', title: 'Depth', figures: true, cell: ({ depthFraction }) => formatPercent(depthFraction) },
  {
    key: 'heat',
    title: 'Heat',
    figures: true,
    cell: ({ temperatureC }) => formatQuantity(temperatureC, '°C', { decimals: 0 }),
  },
  { key: 'clamped', title: 'Clamped', cell: ({ isClamped }) => (isClamped ? 'yes' : 'no') },
  {
    key: 'soh',
    title: 'Capacity left',
    figures: true,
    cell: ({ sohFraction }) => formatPercent(sohFraction, 1),
  },
];

const absences: Record<NonNullable<SubmissionEffect['absence']>, string> = {
  notOfThePool: 'The bank was not bought new: the check moves no pooled life.',
  tooFewChecks: 'The pool is too small for a fit.',
  notConverged: 'The fits did not settle, so there is no figure.',
};

/** What the working life of the cell type is without this check and with it, and the checks nearest to it. */
export function EffectPanel({ submission: { checkId, version, bank } }: { submission: Submission }) {
  const query = useQuery(effectQuery(checkId, version));
  return (
    <Stack gap="s">
      <Heading>What it would move</Heading>
      <QueryView
        query={query}
        loading={
          <LoadingState label="Fitting without this check and with it">
            <SkeletonRows count={3} height={32} />
          </LoadingState>
        }
      >
        {(effect) => <Effect effect={effect} cellType={bank.cellType.name} />}
      </QueryView>
    </Stack>
  );
}

function Effect({ effect, cellType }: { effect: SubmissionEffect; cellType: string }) {
  const { absence, without, with: with_, asAh, isSetAside, neighbours } = effect;
  const asWhat = asAh === null ? 'as it stands' : `as ${formatQuantity(asAh, 'Ah', { decimals: 1 })}`;
  return (
    <Stack gap="m">
      {absence && <Quiet>{absences[absence]}</Quiet>}
      {without && with_ && (
        <Table
          caption="The working life without this check and with it"
          columns={lifeColumns(cellType, with_.basis)}
          rows={[
            { name: 'without this check', life: without },
            { name: `with it, ${asWhat}`, life: with_ },
          ]}
          rowKey={({ name }) => name}
        />
      )}
      {isSetAside && (
        <Quiet>{`With it ${asWhat} the fit sets this check aside as an outlier, so it moves nothing.`}</Quiet>
      )}
      {neighbours.length > 0 && (
        <Disclosure label="Nearest checks of other banks">
          <Table
            caption="Approved checks nearest in age and use"
            columns={neighbourColumns}
            rows={neighbours}
            rowKey={(one) => `${one.ageYears} ${one.efc} ${one.sohFraction}`}
          />
        </Disclosure>
      )}
    </Stack>
  );
}

const yearsWords = ({ years, status }: LifeWith) =>
  status === 'beyond'
    ? 'beyond reach'
    : `${formatNumber(years.estimate, { decimals: 1 })} (${formatRange(years.lower, years.upper, { decimals: 1 })})`;
