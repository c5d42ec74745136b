import { View } from 'react-native';

import { boughtWords, clampingWords, layoutLine } from '@/components/banks/bankWords';
import { StandingPart } from '@/components/banks/StandingPart';
import { Button, DefinitionList, Heading, Page, PageHead, Stack, Table } from '@/components/ui';
import type { RecordContent, SharedRecord } from '@/lib/contract/records';
import { formatDate, formatMonth, formatNumber, formatPercent, formatQuantity } from '@/lib/units';

import { RecordChart } from './RecordChart';
import { RecordNotes } from './RecordNotes';
import { digestWords } from './recordWords';

type InForce = Extract<SharedRecord, { state: 'inForce' }>;

/** A health record to read and to print; one page of paper wide on every screen. */
export function RecordSheet({ record: { content, digest } }: { record: InForce }) {
  const { bank, checks, standing, issuedOn } = content;
  return (
    <Page narrow>
      <PageHead
        title="Health record of a storage bank"
        documentTitle="Health record"
        sub={`Issued by Ebbline on ${formatDate(issuedOn)}, digest ${digestWords(digest)}.`}
        actions={
          <View dataSet={{ screenOnly: '' }}>
            <Button label="Print or save as PDF" onPress={() => window.print()} />
          </View>
        }
      />
      <Stack gap="xl">
        <Stack gap="m">
          <Heading>The bank</Heading>
          <DefinitionList columns={2} items={factsOf(bank)} />
        </Stack>
        <Stack gap="m">
          <Heading>Capacity checks</Heading>
          <Table caption="Approved checks, the oldest first" columns={columns} rows={checks} rowKey={keyOf} />
          <RecordChart content={content} />
        </Stack>
        <StandingPart standing={standing} />
        <RecordNotes digest={digest} checks={checks} />
      </Stack>
    </Page>
  );
}

const keyOf = ({ month, efc }: RecordContent['checks'][number]) => `${month} ${efc}`;

const factsOf = (bank: RecordContent['bank']) => [
  { label: 'Cell type', value: `${bank.maker} ${bank.cellType}` },
  { label: 'Layout', value: layoutLine(bank) },
  { label: 'Rated', value: formatQuantity(bank.ratedAh, 'Ah', { decimals: 0 }) },
  { label: 'Nominal', value: formatQuantity(bank.nominalV, 'V', { decimals: 1 }) },
  { label: 'Energy when new', value: formatQuantity(bank.energyKwh, 'kWh', { decimals: 1 }) },
  { label: 'First use', value: String(bank.firstUseYear) },
  { label: 'Bought', value: boughtWords[bank.bought] },
  { label: 'Held by', value: clampingWords[bank.clamping] },
];

const columns = [
  {
    key: 'month',
    title: 'Tested',
    cell: ({ month, isSetAside }: RecordContent['checks'][number]) =>
      `${formatMonth(month)}${isSetAside ? ', set aside' : ''}`,
  },
  {
    key: 'efc',
    title: 'Full cycles, about',
    figures: true,
    cell: ({ efc }: RecordContent['checks'][number]) => formatNumber(efc, { decimals: 0 }),
  },
  {
    key: 'soh',
    title: 'Of rated',
    figures: true,
    cell: ({ sohFraction, plusMinusFraction }: RecordContent['checks'][number]) =>
      `${formatNumber(sohFraction * 100, { decimals: 0 })} ± ${formatPercent(plusMinusFraction, 1)}`,
  },
  {
    key: 'by',
    title: 'Read from',
    cell: ({ isFromLog }: RecordContent['checks'][number]) => (isFromLog ? 'a log' : "the meter's display"),
  },
];
