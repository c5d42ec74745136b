import { HistoryChart } from '@/components/charts';
import { leftOutStates, plusMinusFraction, sohLine } from '@/components/checks/checkWords';
import {
  ButtonLink,
  CheckStateChip,
  type Column,
  EmptyState,
  Heading,
  Link,
  Row,
  Stack,
  Table,
  Text,
} from '@/components/ui';
import type { Bank } from '@/lib/contract/banks';
import type { Check } from '@/lib/contract/checks';
import { formatDate, formatNumber, formatQuantity } from '@/lib/units';

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

/** A bank's checks as a curve of its own, and each with its state. */
export function BankChecks({ bank, checks }: { bank: Bank; checks: Check[] }) {
  if (checks.length === 0)
    return (
      <EmptyState title="No check yet" action={<AddEarlier bankId={bank.id} />}>
        <Text tone="quiet">
          {`A check is one full discharge with its charge counted, about once a year. Read the cautions first; they open "Add a check". The curve of ${bank.name} starts with the first one.`}
        </Text>
      </EmptyState>
    );
  return (
    <Stack gap="l">
      <HistoryChart
        title="Checks of this bank"
        checks={checks.map(({ id, computed, reading, state }) => ({
          id,
          x: computed.ageYears,
          soh: computed.sohFraction,
          plusMinus: plusMinusFraction(computed),
          when: formatDate(reading.testedOn),
          isLeftOut: leftOutStates.has(state),
        }))}
        computed={
          <Text>
            Bars are ± at 95 % (k = 2) of what is new at each check; the meter&apos;s own error, the same at
            each of its checks, is not in them. Each check&apos;s page shows its own budget and formulas.
          </Text>
        }
      />
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
      </Stack>
    </Stack>
  );
}

/** Years before the exchange, from one file. */
function AddEarlier({ bankId }: { bankId: string }) {
  return <ButtonLink href={{ pathname: '/banks/import', params: { bankId } }} label="Add earlier checks" />;
}
