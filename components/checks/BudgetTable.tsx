import { type Column, Table } from '@/components/ui';
import type { Computed } from '@/lib/contract/checks';
import { budgetPartLabels } from '@/lib/measure';
import { formatPercent } from '@/lib/units';

interface BudgetRow {
  name: string;
  half: string;
  relSd: number;
  varianceShare: number;
}

const columns: Column<BudgetRow>[] = [
  { key: 'part', title: 'Part', cell: ({ name }) => budgetPartLabels[name] ?? name },
  { key: 'half', title: 'Is', cell: ({ half }) => half },
  { key: 'relSd', title: 'u, relative', figures: true, cell: ({ relSd }) => formatPercent(relSd, 2) },
  {
    key: 'share',
    title: 'Of its half',
    figures: true,
    cell: ({ varianceShare }) => formatPercent(varianceShare),
  },
];

/** Every part of an uncertainty budget, in its two halves. */
export function BudgetTable({ budget }: { budget: Computed['budget'] }) {
  const rows: BudgetRow[] = [
    ...budget.newEachCheck.map((part) => ({ ...part, half: 'new at each check' })),
    ...budget.sameEachCheck.map((part) => ({ ...part, half: 'the same at each check' })),
  ];
  return (
    <Table
      caption="Uncertainty budget"
      columns={columns}
      rows={rows}
      rowKey={({ name }) => name}
      showCaption
    />
  );
}
