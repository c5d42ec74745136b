import type { ReactNode } from 'react';
import { formatNumber, formatPercent } from '@/lib/units';
import { Table } from '../ui';
import { ChartFrame } from './ChartFrame';
import type { FadeUnit } from './fadeWords';
import { GrowthDrawing } from './GrowthDrawing';
import { type GrowthBand, growthLines, growthSummary } from './growthSeries';
import { growthHeight } from './heights';
import type { HistoryCheck } from './historySeries';

export interface GrowthChartProps {
  title: string;
  unit: FadeUnit;
  /** The bank's own checks, `x` in the unit. */
  checks: readonly HistoryCheck[];
  /** Where banks used like it lie. */
  bands: readonly GrowthBand[];
  controls?: ReactNode;
  computed?: ReactNode;
}

/** A bank's own checks on the lines below which 10 to 90 % of banks used like it lie. */
export function GrowthChart({ title, unit, checks, bands, controls, computed }: GrowthChartProps) {
  return (
    <ChartFrame
      title={title}
      hasHeading
      summary={growthSummary(title, { checks, bands, unit })}
      height={growthHeight + 40}
      controls={controls}
      computed={computed}
      table={() => <GrowthTable {...{ title, unit, checks, bands }} />}
    >
      {(width) => <GrowthDrawing {...{ width, title, unit, checks, bands }} />}
    </ChartFrame>
  );
}

function GrowthTable({ title, unit, checks, bands }: Omit<GrowthChartProps, 'controls' | 'computed'>) {
  const x = (value: number) =>
    unit === 'years' ? formatNumber(value, { decimals: 1 }) : formatNumber(value, { decimals: 0 });
  const along = unit === 'years' ? 'Years' : 'Full cycles';
  return (
    <>
      <Table
        caption={`${title}: own checks`}
        rows={checks}
        rowKey={({ id }) => id}
        columns={[
          { key: 'when', title: 'Check', cell: ({ when }) => when },
          { key: 'x', title: along, figures: true, cell: (check) => x(check.x) },
          { key: 'soh', title: 'Left', figures: true, cell: ({ soh }) => formatPercent(soh, 1) },
          {
            key: 'pm',
            title: '± at 95 %',
            figures: true,
            cell: ({ plusMinus }) => formatPercent(plusMinus, 1),
          },
        ]}
      />
      <Table
        caption={`${title}: capacity below which so many banks lie`}
        rows={bands}
        rowKey={(band) => String(band.x)}
        columns={[
          { key: 'x', title: along, figures: true, cell: (band) => x(band.x) },
          ...growthLines.map((line, i) => ({
            key: line,
            title: `${line} % of banks`,
            figures: true,
            cell: ({ quantiles }: GrowthBand) => formatPercent(quantiles[i]!, 1),
          })),
          { key: 'status', title: 'Standing', cell: ({ status }) => status },
        ]}
      />
    </>
  );
}
