import type { PublicModel } from '@/lib/contract/model';
import { minimumOwners } from '@/lib/contract/limits';
import type { PublishedFit } from '@/lib/fit';

import type { FitInForce } from './currentFit';

/** What the published numbers are rounded to: far finer than anything that is told from them. */
const digits = 9;
const rounded = (value: number) => Number(value.toPrecision(digits));

/**
 * The model of a public fit for everyone, with the effects of some cell types: of those that have a figure of their
 * own, since one that fewer stand behind must not be read out of it.
 */
export function presentModel(
  fit: FitInForce | null,
  isAsked: (cellType: string) => boolean,
): PublicModel | null {
  if (!fit || fit.output.pool.evidence.owners < minimumOwners) return null;
  const { model } = fit.output;
  const places = model.cellTypes.flatMap(({ cellType }, place) =>
    isAsked(cellType) && hasOwnFigure(fit, cellType) ? [place] : [],
  );
  return {
    components: model.components.map((component) => presentComponent(component, places)),
    priors: model.priors.map(({ name, mean, sd }) => ({ name, mean, sd })),
    cellTypes: places.map((place) => {
      const { cellType, m, se, ownShare, reach } = model.cellTypes[place]!;
      return {
        ...{ id: cellType, m: rounded(m), se: rounded(se), ownShareFraction: rounded(ownShare) },
        ...{ reachYears: reach.years, reachEfc: reach.efc },
      };
    }),
    tQuantile: model.tQuantile,
    reachYears: model.reach.years,
    reachEfc: model.reach.efc,
    conditions: model.reach.conditions,
    hasClamped: model.reach.clampedBanks > 0,
    hasUnclamped: model.reach.unclampedBanks > 0,
  };
}

/** Whether a cell type is told by its own figure, and not by the pool's. */
export function hasOwnFigure({ output: { figures, views } }: FitInForce, cellTypeId: string): boolean {
  return (
    figures.some(({ cellType }) => cellType === cellTypeId) &&
    views.some(
      ({ cellType, bandKey, evidence }) => cellType === cellTypeId && bandKey === null && evidence !== null,
    )
  );
}

type Component = PublishedFit['components'][number];

function presentComponent(component: Component, places: number[]): PublicModel['components'][number] {
  const { exponent, weight, psi, covariance, cellTypes } = component;
  const size = psi.length;
  return {
    exponent,
    weight: rounded(weight),
    psi: psi.map(rounded),
    covariance: psi.flatMap((_, row) =>
      Array.from({ length: row + 1 }, (__, column) => rounded(covariance[row * size + column]!)),
    ),
    cellTypes: places.map((place) => {
      const { m, variance, slope } = cellTypes[place]!;
      return { m: rounded(m), variance: rounded(variance), slope: slope.map(rounded) };
    }),
  };
}
