import { quantile } from 'simple-statistics';

import {
  bandsByLever,
  capacityAt,
  looResiduals,
  type PoolCheck,
  type PublishedFit,
  type Use,
} from '@/lib/fit';

import { digestsOf, evidenceOf } from './describeRows';
import type { Bin, Coverage } from './fitOutput';

/** A check with what the fit expected of it from its bank's other checks. */
export interface ExpectedCheck {
  row: PoolCheck;
  predicted: number;
  seen: number;
  t: number;
}

/** Conditions the residuals are laid out against, with preset cuts, so that a bin means the same in every fit. */
export const residualCuts = {
  ageYears: [1, 2, 3, 4, 5, 6, 7],
  efc: [200, 400, 600, 800, 1000, 1200, 1400],
  depthFraction: [0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9],
  dischargeIt: [0.08, 0.12, 0.16, 0.2, 0.3, 0.4, 0.5],
  temperatureC: [15, 18, 21, 24, 27, 30, 33],
  socMeanFraction: [0.4, 0.45, 0.5, 0.55, 0.6, 0.65, 0.7],
} as const satisfies Partial<Record<keyof PoolCheck, readonly number[]>>;
export type ResidualCondition = keyof typeof residualCuts;

const predictedCuts = [0.8, 0.82, 0.84, 0.86, 0.88, 0.9, 0.92, 0.94, 0.96, 0.98, 1];

/** Leave-one-out expectations of the checks a fit used. */
export function expectChecks(used: readonly PoolCheck[], fit: PublishedFit): ExpectedCheck[] {
  return looResiduals(used, fit).map(({ row, predicted, seen, t }) => ({
    row: used[row]!,
    ...{ predicted, seen, t },
  }));
}

/** Every bin of the diagnostic pictures, before anything is held back. */
export function binsOf(expected: readonly ExpectedCheck[], fit: PublishedFit): Bin[] {
  const conditions = Object.keys(residualCuts) as ResidualCondition[];
  return [
    ...conditions.flatMap((condition) =>
      cutInto(expected, {
        series: `residual:${condition}`,
        cuts: residualCuts[condition],
        along: ({ row }) => row[condition],
        value: ({ seen, predicted }) => seen / predicted - 1,
      }),
    ),
    ...cutInto(expected, {
      series: 'predicted',
      cuts: predictedCuts,
      along: ({ predicted }) => predicted,
      value: ({ seen }) => seen,
    }),
    ...strataOf(expected, fit),
  ];
}

/** How checks are cut into bins, and what is summed up in each. */
export interface Cutting<Checked> {
  series: string;
  cuts: readonly number[];
  along: (check: Checked) => number;
  value: (check: Checked) => number;
  model?: (members: readonly Checked[]) => number;
}

export function cutInto<Checked extends { row: PoolCheck }>(
  checks: readonly Checked[],
  { series, cuts, along, value, model }: Cutting<Checked>,
): Bin[] {
  const edges = [null, ...cuts, null];
  return edges.slice(1).flatMap((to, i): Bin[] => {
    const from = edges[i]!;
    const members = checks.filter(
      (check) => (from === null || along(check) >= from) && (to === null || along(check) < to),
    );
    if (members.length === 0) return [];
    const values = members.map(value).sort((a, b) => a - b);
    const rows = members.map(({ row }) => row);
    return [
      {
        ...{ series, from, to, key: `${series}|${from ?? ''}` },
        summary: {
          evidence: evidenceOf(rows),
          median: quantile(values, 0.5),
          lower: quantile(values, 0.1),
          upper: quantile(values, 0.9),
          model: model?.(members) ?? null,
        },
        owners: digestsOf(rows),
      },
    ];
  });
}

/** Raw capacities by class of heat and rate, clamped and not, per year of age, beside the model at their mean use. */
function strataOf(expected: readonly ExpectedCheck[], fit: PublishedFit): Bin[] {
  return bandsByLever.heat.flatMap((heat) =>
    bandsByLever.rate.flatMap((rate) =>
      bandsByLever.clamping.flatMap((held) => {
        const inside = expected.filter(
          ({ row }) => heat.includes(row) && rate.includes(row) && held.includes(row),
        );
        return cutInto(inside, {
          series: `strata:${heat.key}:${rate.key}:${held.key}`,
          cuts: residualCuts.ageYears,
          along: ({ row }) => row.ageYears,
          value: ({ seen }) => seen,
          model: (members) => capacityOf(fit, members),
        });
      }),
    ),
  );
}

function capacityOf(fit: PublishedFit, members: readonly ExpectedCheck[]): number {
  const mean = (value: (row: PoolCheck) => number) =>
    members.reduce((sum, { row }) => sum + value(row), 0) / members.length;
  const use: Use = {
    depthFraction: mean(({ depthFraction }) => depthFraction),
    dischargeIt: mean(({ dischargeIt }) => dischargeIt),
    temperatureC: mean(({ temperatureC }) => temperatureC),
    socMeanFraction: mean(({ socMeanFraction }) => socMeanFraction),
    efcPerYear: mean(({ efc, ageYears }) => efc / ageYears),
    isClamped: members[0]!.row.isClamped,
  };
  return capacityAt(
    fit,
    use,
    mean(({ ageYears }) => ageYears),
  ).estimate;
}

/** Two-sided standard normal quantiles. */
const levels = [
  { level: 0.5, z: 0.6744897501960817 },
  { level: 0.8, z: 1.2815515655446004 },
  { level: 0.9, z: 1.6448536269514722 },
];

/** How often the ranges predicted for single checks hold them. */
export function coverageOf(expected: readonly ExpectedCheck[]): Coverage {
  const share = (z: number) => expected.filter(({ t }) => Math.abs(t) <= z).length / expected.length;
  return {
    checks: expected.length,
    within: levels.map(({ level, z }) => ({ level, shareFraction: share(z) })),
  };
}
