import { Table } from '@/components/ui';
import type { PublishedFit } from '@/lib/fit/pooled/published';

import type { PlanText } from './planForm';
import { detailsOf } from './PlanResults';
import { usePlan } from './usePlan';

/** Two plans, row by row. */
export function PlanComparison({ fit, texts }: { fit: PublishedFit; texts: [PlanText, PlanText] }) {
  const first = usePlan(fit, texts[0]);
  const second = usePlan(fit, texts[1]);
  if (!first || !second) return null;
  const other = detailsOf(second.plan, second.choices.currency);
  const rows = detailsOf(first.plan, first.choices.currency).map(({ label, value }, index) => ({
    label,
    one: value,
    two: other[index]?.value ?? '',
  }));
  return (
    <Table
      caption="Both plans"
      showCaption
      rows={rows}
      rowKey={({ label }) => label}
      columns={[
        { key: 'label', title: 'Figure', cell: ({ label }) => label },
        { key: 'one', title: 'Plan 1', figures: true, cell: ({ one }) => one },
        { key: 'two', title: 'Plan 2', figures: true, cell: ({ two }) => two },
      ]}
    />
  );
}
