import { useQuery } from '@tanstack/react-query';

import { sohLine } from '@/components/checks/checkWords';
import { QueryView } from '@/components/QueryView';
import {
  ButtonLink,
  CheckStateChip,
  type Column,
  EmptyState,
  Heading,
  Link,
  LoadingState,
  Row,
  Skeleton,
  SkeletonRows,
  Stack,
  Table,
  Text,
} from '@/components/ui';
import { standingQuery } from '@/lib/client/standing';
import { type Bank, endingOf } from '@/lib/contract/banks';
import type { Check } from '@/lib/contract/checks';
import { formatDate, formatNumber, formatQuantity } from '@/lib/units';

import { BankCurve } from './BankCurve';
import { StandingPart } from './StandingPart';
import { contributionSentence } from './standingWords';
import { WhatIfPart } from './WhatIfPart';

const columns: Column<Check>[] = [
  {
    key: 'date',
    title: 'Tested',
    cell: ({ id, bankId, reading }) => (
      <Link
        href={{ pathname: '/banks/[bankId]/checks/[checkId]', params: { bankId, checkId: id } }}
        description={`${formatDate(reading.testedOn)}: open this check`}
      >
        {formatDate(reading.testedOn)}
      </Link>
    ),
  },
  {
    key: 'age',
    title: 'Age',
    figures: true,
    cell: ({ computed }) => formatQuantity(computed.ageYears, 'y', { decimals: 1 }),
  },
  {
    key: 'efc',
    title: 'Full cycles',
    figures: true,
    cell: ({ computed }) => formatNumber(computed.efc, { decimals: 0 }),
  },
  {
    key: 'capacity',
    title: 'At 25 °C, 0.2 It',
    figures: true,
    cell: ({ computed }) => formatQuantity(computed.capacityRefAh, 'Ah', { decimals: 1 }),
  },
  {
    key: 'soh',
    title: 'Of rated',
    figures: true,
    cell: ({ computed }) => sohLine(computed),
  },
  {
    key: 'state',
    title: 'State',
    cell: ({ state }) => (
      <Row>
        <CheckStateChip state={state} />
      </Row>
    ),
  },
];

/** A bank's checks among banks used like it, its forecast, and each check with its state. */
export function BankChecks({ bank, checks }: { bank: Bank; checks: Check[] }) {
  const query = useQuery(standingQuery(bank.id));
  if (checks.length === 0 && endingOf(bank.events))
    return <EmptyState title="No check was made">That it was there, and how it ended, is kept.</EmptyState>;
  if (checks.length === 0)
    return (
      <EmptyState title="No check yet" action={<AddEarlier bankId={bank.id} />}>
        <Text tone="quiet">
          {`A check is one full discharge with its charge counted, about once a year. Read the cautions first; they open "Add a check". The curve of ${bank.name} starts with the first one.`}
        </Text>
      </EmptyState>
    );
  const standing = query.data;
  return (
    <Stack gap="xl">
      {query.isPending ? (
        <LoadingState label="Loading the curve">
          <Skeleton height={500} />
        </LoadingState>
      ) : (
        <BankCurve checks={checks} standing={standing} />
      )}
      <QueryView
        query={query}
        loading={
          <LoadingState label="Comparing it with banks used like it">
            <SkeletonRows count={3} height={40} />
          </LoadingState>
        }
      >
        {(loaded) => <StandingPart standing={loaded} />}
      </QueryView>
      <Stack gap="s">
        <Heading>Checks</Heading>
        <Table
          caption="Checks of this bank, the newest first"
          columns={columns}
          rows={[...checks].reverse()}
          rowKey={({ id }) => id}
        />
        <Row>
          <AddEarlier bankId={bank.id} />
        </Row>
        {standing && <Text>{contributionSentence(standing.contribution)}</Text>}
      </Stack>
      {standing && <WhatIfPart bankId={bank.id} standing={standing} />}
    </Stack>
  );
}

/** Years before the exchange, from one file. */
function AddEarlier({ bankId }: { bankId: string }) {
  return <ButtonLink href={{ pathname: '/banks/import', params: { bankId } }} label="Add earlier checks" />;
}
