import { GrowthChart, HistoryChart } from '@/components/charts';
import type { RecordContent } from '@/lib/contract/records';
import { formatMonth } from '@/lib/units';

/** The bank's checks as the record has them, on the lines of banks used like it. */
export function RecordChart({ content: { checks, standing } }: { content: RecordContent }) {
  const points = checks.map(({ month, years, sohFraction, plusMinusFraction, isSetAside }, index) => ({
    id: `${month} ${index}`,
    x: years,
    soh: sohFraction,
    plusMinus: plusMinusFraction,
    when: formatMonth(month),
    isLeftOut: isSetAside,
  }));
  if (standing.state !== 'ready') return <HistoryChart title="Checks of this bank" checks={points} />;
  return (
    <GrowthChart
      title="Checks of this bank, among banks used like it"
      unit="years"
      checks={points}
      bands={standing.bands.flatMap(({ years, quantiles, status }) =>
        status === 'beyond' ? [] : [{ x: years, quantiles, status }],
      )}
    />
  );
}
