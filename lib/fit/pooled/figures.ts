import { statusAt } from '../curve/status';
import { capacityAt, lifeAt, type LifeOptions } from './life';
import type { OutsidePool, PooledLife, PooledLifeStatus, PublishedFit, Ranged } from './types';
import type { Use } from './use';

/** Days of the mean Gregorian year. */
const daysPerYear = 365.2425;
const curveSteps = 40;
/** The model has ln(years): a curve begins a few hours after the start. */
const firstYears = 0.001;

/** A use as a household says it: how often in place of full cycles a year. */
export interface HomeUse extends Omit<Use, 'efcPerYear'> {
  cyclesPerDay: number;
}

/** A life as answers and pages give it; years and EFC of everything, shares 0..1. */
export interface LifeFigure {
  status: PooledLifeStatus;
  years: Ranged;
  efc: Ranged;
  rangeOfBanks: { lower: number; upper: number };
  rangeOfBanksEfc: { lower: number; upper: number };
  leftAtReachFraction: Ranged;
  reachYears: number;
  reachEfc: number;
  basis: 'cellType' | 'pool';
  priorShareFraction: number;
  support: PooledLife['support'];
  /** Null where no part of the figure is the cell type's own. */
  ownShareFraction: number | null;
  outside: OutsidePool[];
}

/** Capacity left at an age, share of the rating, with its 90 % range. */
export interface CurveFigure {
  efc: number;
  years: number;
  sohFraction: number;
  lower: number;
  upper: number;
  status: PooledLifeStatus;
}

/** A life at a use with the curve that leads there. */
export interface Figure {
  life: LifeFigure;
  curve: CurveFigure[];
}

/** Full cycles a year at a use. */
export const efcPerYearOf = ({
  depthFraction,
  cyclesPerDay,
}: Pick<HomeUse, 'depthFraction' | 'cyclesPerDay'>): number => depthFraction * cyclesPerDay * daysPerYear;

/** A use as the model takes it. */
export function fitUse(use: HomeUse): Use {
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
 * Life of a cell type at a use. One with fewer than 10 banks or 5 owners, or none (null), gets the pool's figure with
 * its wider range.
 * @throws RangeError on a use without physical sense or a cell type the fit does not know
 */
export function lifeFigureAt(fit: PublishedFit, use: HomeUse, cellType: string | null): LifeFigure {
  const { known, options } = asked(fit, cellType);
  const ownShare = fit.cellTypes.find((one) => one.cellType === cellType)?.ownShare ?? null;
  return figureOf(lifeAt(known, fitUse(use), options), use, ownShare);
}

/** The same with the curve that leads there, to three times the reach. */
export function figureAt(fit: PublishedFit, use: HomeUse, cellType: string | null): Figure {
  const life = lifeFigureAt(fit, use, cellType);
  const { known, options } = asked(fit, cellType);
  return { life, curve: curveOf(known, fitUse(use), options, life.reachYears) };
}

/** Life of the average cell type, whose range leaves out how cell types differ. */
export const averageFigure = (fit: PublishedFit, use: HomeUse): LifeFigure =>
  figureOf(lifeAt(fit, fitUse(use)), use, null);

function asked(fit: PublishedFit, cellType: string | null): { known: PublishedFit; options: LifeOptions } {
  return { known: cellType === null ? withUnknown(fit) : fit, options: { cellType: cellType ?? noCellType } };
}

function figureOf(life: PooledLife, use: HomeUse, ownShare: number | null): LifeFigure {
  const { status, years, efc, rangeOfBanks, rangeOfBanksEfc, capacityAtReach, support, outside } = life;
  return {
    ...{ status, years, efc, rangeOfBanks, rangeOfBanksEfc, support, outside },
    leftAtReachFraction: capacityAtReach,
    reachYears: life.reach,
    reachEfc: life.reach * efcPerYearOf(use),
    basis: life.basis === 'cellType' ? 'cellType' : 'pool',
    priorShareFraction: life.priorShare,
    ownShareFraction: life.basis === 'cellType' ? ownShare : null,
  };
}

/** To three times the reach, denser early where the fade is steep, with points at the reach and at twice it. */
function curveOf(fit: PublishedFit, use: Use, options: LifeOptions, reach: number): CurveFigure[] {
  const turns = [reach, 2 * reach, 3 * reach];
  const grid = Array.from({ length: curveSteps }, (_, step) => 3 * reach * (step / curveSteps) ** 2)
    .map((years) => Math.max(years, firstYears))
    .filter((years) => turns.every((turn) => Math.abs(years - turn) > 1e-6 * turn));
  return [...grid, ...turns]
    .sort((a, b) => a - b)
    .map((years) => {
      const { estimate, lower, upper } = capacityAt(fit, use, years, options);
      const edge = turns.find((turn) => years <= turn)!;
      return {
        ...{ years, efc: years * use.efcPerYear },
        ...{ sohFraction: estimate, lower, upper, status: statusAt(edge, reach) },
      };
    });
}
