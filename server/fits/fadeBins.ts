import type { FadeBin } from '@/lib/contract/cells';
import type { PoolCheck } from '@/lib/fit/poolCheck';

import { type Cutting, cutInto } from './bins';
import type { Bin, FitOutput } from './fitOutput';

/** Along which the raw checks of a cell type are summed up, with preset cuts. */
const axes = {
  years: { along: ({ ageYears }) => ageYears, step: 1, most: 15 },
  efc: { along: ({ efc }) => efc, step: 200, most: 4000 },
} as const satisfies Record<keyof Axes, { along: (row: PoolCheck) => number; step: number; most: number }>;

interface Axes {
  years: FadeBin[];
  efc: FadeBin[];
}

const axisNames = Object.keys(axes) as (keyof Axes)[];
const seriesOf = (cellType: string, axis: keyof Axes) => `fade:${axis}:${cellType}`;

/** Medians and middle 80 % of each cell type's checks by age and by full cycles, before anything is held back. */
export function fadeBinsOf(rows: readonly PoolCheck[]): Bin[] {
  const byCellType = new Map<string, { row: PoolCheck }[]>();
  for (const row of rows) {
    const known = byCellType.get(row.cellType);
    if (known) known.push({ row });
    else byCellType.set(row.cellType, [{ row }]);
  }
  return [...byCellType].flatMap(([cellType, members]) =>
    axisNames.flatMap((axis) => {
      const { along, step, most } = axes[axis];
      const cutting: Cutting<{ row: PoolCheck }> = {
        series: seriesOf(cellType, axis),
        cuts: Array.from({ length: most / step }, (_, i) => (i + 1) * step),
        along: ({ row }) => along(row),
        value: ({ row }) => row.capacityAh / row.ratedAh,
      };
      return cutInto(members, cutting);
    }),
  );
}

/** Those of one cell type that may be told, in order. */
export function presentFadeBins({ bins }: Pick<FitOutput, 'bins'>, cellType: string): Axes {
  const along = (axis: keyof Axes) =>
    bins
      .filter(({ series }) => series === seriesOf(cellType, axis))
      .flatMap(({ from, to, summary }): FadeBin[] => {
        if (!summary || to === null) return [];
        const { median, lower, upper } = summary;
        return [{ from: from ?? 0, to, median, lower, upper }];
      });
  return { years: along('years'), efc: along('efc') };
}
