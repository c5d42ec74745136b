import type { CurvePoint, Estimate, Life, Use } from '@/lib/contract/cells';
import {
  capacityAt,
  lifeAt,
  type LifeOptions,
  type PooledLife,
  type PublishedFit,
  statusAt,
  type Use as FitUse,
} from '@/lib/fit';

/** Days of the mean Gregorian year. */
const daysPerYear = 365.2425;
const curveSteps = 40;
/** The model has ln(years): a curve begins a few hours after the start. */
const firstYears = 0.001;

/** A life at a use with the curve that leads there. */
export interface Figure {
  life: Life;
  curve: CurvePoint[];
}

/** Full cycles a year at a use. */
export const efcPerYearOf = ({ depthFraction, cyclesPerDay }: Use): number =>
  depthFraction * cyclesPerDay * daysPerYear;

/** A use as the model takes it. */
export function fitUse(use: Use): FitUse {
  const { depthFraction, dischargeIt, temperatureC, socMeanFraction, isClamped } = use;
  return {
    ...{ depthFraction, dischargeIt, temperatureC, socMeanFraction, isClamped },
    efcPerYear: efcPerYearOf(use),
  };
}

const noCellType = 'no cell type';

/** The same model with a cell type that nothing is known of: its lives are the pool's, with the spread of cell types. */
const withUnknown = (fit: PublishedFit): PublishedFit => ({
  ...fit,
  cellTypes: [
    ...fit.cellTypes,
    { cellType: noCellType, m: 0, se: 0, banks: 0, owners: 0, checks: 0, ownShare: 0, reach: fit.reach },
  ],
});

/**
 * Life and curve of a cell type at a use. One with fewer than 10 banks or 5 owners, or none (null), gets the pool's
 * figure with its wider range.
 */
export function figureAt(fit: PublishedFit, use: Use, cellType: string | null): Figure {
  const known = cellType === null ? withUnknown(fit) : fit;
  const options: LifeOptions = { cellType: cellType ?? noCellType };
  const at = fitUse(use);
  const life = lifeAt(known, at, options);
  const row = fit.cellTypes.find((one) => one.cellType === cellType);
  return {
    life: presentLife(life, at, row?.ownShare ?? null),
    curve: curveOf(known, at, options, life.reach),
  };
}

/** Life of the average cell type, whose range leaves out how cell types differ. */
export function averageLife(fit: PublishedFit, use: Use): Life {
  return presentLife(lifeAt(fit, fitUse(use)), fitUse(use), null);
}

function presentLife(life: PooledLife, { efcPerYear }: FitUse, ownShare: number | null): Life {
  const { status, years, efc, rangeOfBanks, rangeOfBanksEfc, capacityAtReach, support, outside } = life;
  return {
    ...{ status, years, efc, rangeOfBanks, rangeOfBanksEfc, support, outside },
    leftAtReachFraction: capacityAtReach,
    reachYears: life.reach,
    reachEfc: life.reach * efcPerYear,
    basis: life.basis === 'cellType' ? 'cellType' : 'pool',
    priorShareFraction: life.priorShare,
    ownShareFraction: life.basis === 'cellType' ? ownShare : null,
  };
}

/** To three times the reach, denser early where the fade is steep, with points at the reach and at twice it. */
function curveOf(fit: PublishedFit, use: FitUse, options: LifeOptions, reach: number): CurvePoint[] {
  const turns = [reach, 2 * reach, 3 * reach];
  const grid = Array.from({ length: curveSteps }, (_, step) => 3 * reach * (step / curveSteps) ** 2)
    .map((years) => Math.max(years, firstYears))
    .filter((years) => turns.every((turn) => Math.abs(years - turn) > 1e-6 * turn));
  return [...grid, ...turns]
    .sort((a, b) => a - b)
    .map((years) => {
      const { estimate, lower, upper }: Estimate = capacityAt(fit, use, years, options);
      const edge = turns.find((turn) => years <= turn)!;
      return {
        ...{ years, efc: years * use.efcPerYear },
        ...{ sohFraction: estimate, lower, upper, status: statusAt(edge, reach) },
      };
    });
}
