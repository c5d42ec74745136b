import { useMemo } from 'react';

import { BandLineChart } from '@/components/charts';
import { Table } from '@/components/ui';
import type { PublishedFit } from '@/lib/fit/pooled/published';
import { sizeCurve, type PlanResult, type SizePoint } from '@/lib/plan';
import { formatNumber, formatPercent, formatQuantity } from '@/lib/units';

import type { PlanChoices } from './planForm';
import { costRange, pricePerKwh, rangedWords } from './planWords';

interface SizePartProps {
  fit: PublishedFit;
  choices: PlanChoices;
  cellType: string | undefined;
  plan: PlanResult;
}

const kwh = (wh: number) => formatQuantity(wh / 1000, 'kWh', { decimals: 1 });

/** Which size of bank gives the cheapest kWh. */
export function SizePart({ fit, choices, cellType, plan }: SizePartProps) {
  const { input, currency } = choices;
  const curve = useMemo(() => sizeCurve(fit, input, { cellType }), [fit, input, cellType]);
  const cheapest = curve.reduce((best, point) =>
    point.costMinorPerKwh.estimate < best.costMinorPerKwh.estimate ? point : best,
  );
  const reading = (point: SizePoint) =>
    `${kwh(point.ratedWh)}: ${pricePerKwh(point.costMinorPerKwh.estimate, currency)} per kWh, ${formatPercent(point.firstDepthFraction)} deep at first, ${formatNumber(point.years.estimate, { decimals: 0 })} years`;
  // Within its own range of the cheapest, sizes can't be told apart by price.
  const alike = curve.filter((point) => point.costMinorPerKwh.estimate <= cheapest.costMinorPerKwh.upper);
  return (
    <BandLineChart
      title="Cost per kWh delivered over bank size"
      points={curve.map((point) => ({
        x: point.ratedWh / 1000,
        y: point.costMinorPerKwh.estimate / 100,
        lower: point.costMinorPerKwh.lower / 100,
        upper: point.costMinorPerKwh.upper / 100,
        reading: reading(point),
      }))}
      marks={[
        { x: cheapest.ratedWh / 1000, y: cheapest.costMinorPerKwh.estimate / 100, label: 'cheapest' },
        ...(isOnCurve(curve, input.ratedWh)
          ? [{ x: input.ratedWh / 1000, y: plan.costMinorPerKwh.estimate / 100, label: 'this plan' }]
          : []),
      ]}
      xTitle="rated energy, kWh"
      yTitle={`${currency} per kWh delivered`}
      formatX={(value) => formatNumber(value, { decimals: 0 })}
      formatY={(value) => formatNumber(value, { decimals: 2 })}
      finding={`The cheapest is about ${kwh(cheapest.ratedWh)}; from ${kwh(alike[0]!.ratedWh)} to ${kwh(alike.at(-1)!.ratedWh)} the price can hardly be told apart.`}
      table={() => (
        <Table
          caption="Cost per kWh delivered over bank size"
          rows={curve}
          rowKey={({ ratedWh }) => String(ratedWh)}
          columns={[
            { key: 'size', title: 'Rated energy', figures: true, cell: ({ ratedWh }) => kwh(ratedWh) },
            {
              key: 'cost',
              title: 'Per kWh delivered',
              figures: true,
              cell: ({ costMinorPerKwh }) => costRange(costMinorPerKwh, currency),
            },
            { key: 'years', title: 'Years', figures: true, cell: ({ years }) => rangedWords(years, 0) },
            {
              key: 'depth',
              title: 'Depth at first',
              figures: true,
              cell: ({ firstDepthFraction }) => formatPercent(firstDepthFraction),
            },
          ]}
        />
      )}
    />
  );
}

const isOnCurve = (curve: readonly SizePoint[], ratedWh: number) =>
  ratedWh >= curve[0]!.ratedWh && ratedWh <= curve.at(-1)!.ratedWh;
