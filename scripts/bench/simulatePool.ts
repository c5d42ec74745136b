import type { PoolCheck } from '../../lib/fit/poolCheck';
import { fadePoint, lnKept } from '../../lib/fit/pooled/fade';
import { at, referenceRelSd } from '../../lib/fit/pooled/parameters';
import { defaultPriors } from '../../lib/fit/pooled/priors';
import type { Use } from '../../lib/fit/pooled/use';
import { createDice, type Dice } from './dice';

/** What a simulated pool was made from. */
export interface PoolTruth {
  psi: number[];
  exponent: number;
}

/** Options of a simulated pool. */
export interface SimulateOptions {
  banks: number;
  seed: number;
  truth: PoolTruth;
  /** Errors in what owners state: temperature ±2 °C, charge level ±0.08, rate ±20 %, depth ±10 %. */
  hasNoisyInputs?: boolean;
  /** Share of checks with a gross mistake of 5 to 50 %. */
  outlierShare?: number;
  cellTypes?: number;
}

/** A simulated pool; `isOutlier` marks the planted mistakes, row by row. */
export interface SimulatedPool {
  checks: PoolCheck[];
  isOutlier: boolean[];
}

const checksShares = [0.25, 0.43, 0.59, 0.72, 0.83, 0.91, 0.96, 1];
// Owners retire a bank once it shows less than 60 % of its rating.
const lnRetired = Math.log(0.6);
const ratings = [100, 105, 230, 280, 304, 314];

/**
 * A pool like the reference fixtures: 1 to 8 yearly checks a bank, cells at 22 ± 5.5 °C, charge level 0.4-0.8, depth
 * 0.15-0.95, rate about 0.2 It, 0.4-1.05 cycles a day, 43 % clamped, instruments of 0.6, 1.2 and 2.4 %; a bank is retired
 * once it shows less than 60 %.
 */
export function simulatePool(options: SimulateOptions): SimulatedPool {
  const { banks, truth, seed } = options;
  const dice = createDice(seed);
  const cellTypes = options.cellTypes ?? Math.round(4.4 * Math.pow(banks / 60, 0.55));
  const effects = Array.from({ length: cellTypes }, () => dice.normal() * Math.exp(truth.psi[at.lnSm]!));
  const pool: SimulatedPool = { checks: [], isOutlier: [] };
  for (let bank = 0; bank < banks; bank++) {
    // Popular cell types have most of the banks.
    const cellType = Math.min(cellTypes - 1, Math.floor(cellTypes * dice.uniform() ** 1.6));
    addBank(pool, dice, options, bank, cellType, effects[cellType]!);
  }
  return pool;
}

function addBank(
  pool: SimulatedPool,
  dice: Dice,
  options: SimulateOptions,
  bank: number,
  cellType: number,
  effect: number,
): void {
  const { psi, exponent } = options.truth;
  const use = drawUse(dice);
  const start = psi[at.c0]! + Math.exp(psi[at.lnSc]!) * dice.normal();
  const shift = effect + Math.exp(psi[at.lnSu]!) * dice.normal();
  const place = dice.uniform();
  const count = 1 + checksShares.findIndex((share) => place <= share);
  const instrument = dice.uniform();
  const relSd = instrument < 0.3 ? 0.006 : instrument < 0.81 ? 0.012 : 0.024;
  const ratedAh = ratings[cellType % ratings.length]!;
  const stated = options.hasNoisyInputs ? misstate(dice, use) : use;
  let ageYears = 0.4 + 1.2 * dice.uniform();
  for (let check = 0; check < count; check++) {
    const kept = lnKept(fadePoint({ psi, exponent, shift }, use, ageYears).fade);
    const noise = Math.exp(psi[at.lnS]!) * (relSd / referenceRelSd) * dice.normal();
    const isOutlier = dice.uniform() < (options.outlierShare ?? 0);
    const mistake = isOutlier ? grossMistake(dice) : 0;
    const check: PoolCheck = {
      bank: `B${bank}`,
      owner: `O${bank}`,
      cellType: `T${cellType}`,
      isClamped: stated.isClamped,
      depthFraction: stated.depthFraction,
      dischargeIt: stated.dischargeIt,
      temperatureC: stated.temperatureC,
      socMeanFraction: stated.socMeanFraction,
      ageYears,
      efc: use.efcPerYear * ageYears,
      ratedAh,
      capacityAh: ratedAh * Math.exp(start + kept + noise + mistake),
      relSd,
    };
    if (options.hasNoisyInputs) {
      check.temperatureSource = 'estimated';
      check.socSource = 'estimated';
    }
    pool.checks.push(check);
    pool.isOutlier.push(isOutlier);
    if (start + kept + noise < lnRetired) return;
    ageYears += Math.max(0.4, 1 + 0.15 * dice.normal());
  }
}

/** Conditions of one bank. */
export function drawUse(dice: Dice): Use {
  const depthFraction = 0.15 + 0.8 * dice.uniform();
  return {
    depthFraction,
    dischargeIt: clip(0.2 * Math.exp(0.5 * dice.normal()), 0.05, 0.8),
    temperatureC: clip(22 + 5.5 * dice.normal(), 8, 38),
    socMeanFraction: 0.4 + 0.4 * dice.uniform(),
    efcPerYear: depthFraction * 365 * (0.4 + 0.65 * dice.uniform()),
    isClamped: dice.uniform() < 0.43,
  };
}

function misstate(dice: Dice, use: Use): Use {
  return {
    ...use,
    depthFraction: clip(use.depthFraction * (1 + 0.1 * dice.normal()), 0.05, 1),
    dischargeIt: use.dischargeIt * Math.exp(0.2 * dice.normal()),
    temperatureC: use.temperatureC + 2 * dice.normal(),
    socMeanFraction: clip(use.socMeanFraction + 0.08 * dice.normal(), 0, 1),
  };
}

/** ln of a factor 5 to 50 % off, mostly too low (a test ended early). */
function grossMistake(dice: Dice): number {
  const size = 0.05 + 0.45 * dice.uniform();
  return Math.log(dice.uniform() < 0.7 ? 1 - size : 1 + size);
}

function clip(value: number, from: number, to: number): number {
  return Math.min(to, Math.max(from, value));
}

/** A truth drawn around the priors with a share of their widths; the exponent stays at 0.5 unless spread. */
export function drawTruth(seed: number, share: number, exponentSd = 0): PoolTruth {
  const dice = createDice(seed);
  return {
    psi: defaultPriors.map(({ mean, sd }) => mean + share * sd * dice.normal()),
    exponent: clip(0.5 + exponentSd * dice.normal(), 0.25, 0.8),
  };
}

/** A truth 2 prior sd off in each of the named effects, to either side, and at the priors' centre elsewhere. */
export function truthOffPriors(seed: number, places: readonly number[]): PoolTruth {
  const dice = createDice(seed);
  return {
    psi: defaultPriors.map(({ mean, sd }, i) =>
      places.includes(i) ? mean + (dice.uniform() < 0.5 ? -2 : 2) * sd : mean + 0.5 * sd * dice.normal(),
    ),
    exponent: 0.5,
  };
}
