import type { PublicModel } from '@/lib/contract/model';
import type { PublishedFit } from '@/lib/fit/pooled/published';

/** Cell types are in a published model only with this many banks and owners behind them. */
const leastBanks = 10;
const leastOwners = 5;

/** The published model as lib/fit computes from it. Counts are what it promises at least. */
export function publishedFitOf(model: PublicModel): PublishedFit {
  return {
    components: model.components.map((component) => ({
      ...component,
      covariance: wholeMatrix(component.covariance, component.psi.length),
    })),
    priors: model.priors.map(({ name, mean, sd }) => ({
      ...{ name: name as PublishedFit['priors'][number]['name'], mean, sd, source: '' },
    })),
    cellTypes: model.cellTypes.map(({ id, m, se, ownShareFraction, reachYears, reachEfc }) => ({
      ...{ cellType: id, m, se, ownShare: ownShareFraction },
      ...{ banks: leastBanks, owners: leastOwners, checks: leastBanks },
      reach: { years: reachYears, efc: reachEfc },
    })),
    tQuantile: model.tQuantile,
    reach: {
      ...{ years: model.reachYears, efc: model.reachEfc, conditions: model.conditions },
      clampedBanks: Number(model.hasClamped),
      unclampedBanks: Number(model.hasUnclamped),
    },
  };
}

/** A symmetric matrix, row by row, from its lower triangle. */
function wholeMatrix(triangle: readonly number[], size: number): number[] {
  return Array.from({ length: size * size }, (_, place) => {
    const [row, column] = [Math.floor(place / size), place % size];
    const [long, short] = row >= column ? [row, column] : [column, row];
    return triangle[(long * (long + 1)) / 2 + short]!;
  });
}
