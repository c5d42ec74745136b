import { useState } from 'react';

import { Chip, type Column, Link, Row, Segmented, Stack, Table, Text } from '@/components/ui';
import type { EarlierReport, EarlierRow } from '@/lib/contract/earlierChecks';
import { formatCount, formatDate, formatPercent, formatQuantity, isCalendarDate } from '@/lib/units';

import { outcomeWords, rowRemarks } from './reportWords';

const tones = { good: 'moss', there: 'plain', problem: 'rust' } as const;

const columns: Column<EarlierRow>[] = [
  { key: 'row', title: 'Row', cell: ({ row }) => `Row\u00a0${row}` },
  { key: 'bank', title: 'Bank', cell: ({ bankName }) => bankName },
  { key: 'tested', title: 'Tested', cell: (row) => <Tested row={row} /> },
  {
    key: 'capacity',
    title: 'At 25 °C, 0.2 It; of rated',
    figures: true,
    cell: ({ capacityRefAh, sohFraction }) =>
      capacityRefAh === null || sohFraction === null
        ? null
        : `${formatQuantity(capacityRefAh, 'Ah', { decimals: 1 })}, ${formatPercent(sohFraction, 1)}`,
  },
  {
    key: 'outcome',
    title: 'Row is',
    cell: ({ outcome }) => (
      <Row>
        <Chip tone={tones[outcome]}>{outcomeWords[outcome]}</Chip>
      </Row>
    ),
  },
  {
    key: 'remarks',
    title: 'Remarks',
    cell: (row) =>
      rowRemarks(row).length > 0 ? (
        <Stack gap="xs">
          {rowRemarks(row).map((remark) => (
            <Text key={remark} size="small" tone={row.outcome === 'problem' ? 'rust' : 'quiet'}>
              {remark}
            </Text>
          ))}
        </Stack>
      ) : null,
  },
];

function Tested({ row: { testedOn, bankId, checkId } }: { row: EarlierRow }) {
  const day = isCalendarDate(testedOn) ? formatDate(testedOn) : testedOn;
  if (bankId === null || checkId === null) return day;
  return (
    <Link
      href={{ pathname: '/banks/[bankId]/checks/[checkId]', params: { bankId, checkId } }}
      description={`${day}: open this check`}
    >
      {day}
    </Link>
  );
}

const shown = [
  { value: 'all', label: 'All rows' },
  { value: 'problem', label: 'With a problem' },
] as const;

/** Every row of the file with what becomes of it; those with a problem alone where there are any. */
export function ReportTable({ report: { rows, counts } }: { report: EarlierReport }) {
  const [which, setWhich] = useState<(typeof shown)[number]['value']>('all');
  const hasBoth = counts.problem > 0 && counts.problem < rows.length;
  const listed = hasBoth && which === 'problem' ? rows.filter(({ outcome }) => outcome === which) : rows;
  return (
    <Stack gap="m">
      {hasBoth && <Segmented label="Rows shown" value={which} onChange={setWhich} options={shown} />}
      <Table
        caption={`${formatCount(listed.length)} rows of the file`}
        columns={columns}
        rows={listed}
        rowKey={({ row }) => String(row)}
      />
    </Stack>
  );
}
