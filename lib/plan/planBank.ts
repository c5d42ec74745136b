import {
  lifeAt,
  typicalFade,
  type LifeOptions,
  type PublishedFit,
  type Ranged,
  type TypicalFade,
  type Use,
} from '@/lib/fit/pooled/published';

import { capacityPath, type CapacityPath, type NightUse } from './capacityPath';
import { breakEvenYears, levelisedCost, type YearFlow } from './money';
import type { PlanInput, PlanResult } from './planTypes';

/** Beyond this multiple of the reach no figure is given, so that a plan counts no further either. */
const reachMultiple = 3;
/** A bank that has not come to its end by then is counted no further. */
const longestYears = 60;

/**
 * A plan for a bank (product calculation 6): the night's energy stays, the depth rises as the bank fades; lives, energy
 * and money follow, with the 90 % range of the typical bank's pace.
 * @throws RangeError on inputs without physical sense or a cell type the fit does not know
 */
export function planBank(
  fit: PublishedFit,
  input: PlanInput,
  options: Pick<LifeOptions, 'cellType'> = {},
): PlanResult {
  requireSound(input);
  const fade = typicalFade(fit, options);
  const night = nightOf(input);
  const whole = capacityPath(fade, night, { horizonYears: longestYears });
  const life = lifeAt(fit, whole.use, options);
  const horizonYears = Math.min(reachMultiple * life.reach, longestYears);
  const isCapped = (whole.lifeYears ?? longestYears) > horizonYears;
  const paces = pacesOf(fade, whole, life.years);
  const [typical, fast, slow] = [1, paces.fast, paces.slow].map((pace) =>
    capacityPath(fade, night, { pace, horizonYears }),
  ) as [CapacityPath, CapacityPath, CapacityPath];
  const outcomes = [typical, fast, slow].map((path) => outcomeOf(input, path)) as [Outcome, Outcome, Outcome];
  const ranged = (of: (outcome: Outcome) => number): Ranged => {
    const [estimate, ...ends] = outcomes.map(of) as [number, number, number];
    return { estimate, lower: Math.min(estimate, ...ends), upper: Math.max(estimate, ...ends) };
  };
  const calendarYears = aloneYears(fade, whole.use, (share) => share);
  const cyclingYears = aloneYears(fade, whole.use, (share) => 1 - share);
  return {
    first: {
      depthFraction: typical.points[0]!.wantedDepthFraction,
      dischargeIt: night.dischargeIt,
      peakIt: cellPower(input, input.peakW) / input.ratedWh,
    },
    points: typical.points,
    life,
    years: ranged(({ years }) => years),
    isCapped,
    calendarYears,
    cyclingYears,
    endedBy: calendarYears < cyclingYears ? 'calendar' : 'cycling',
    shortYears: typical.shortYears,
    deliveredKwh: ranged(({ deliveredKwh }) => deliveredKwh),
    firstCostMinor: input.cellsMinor + input.otherMinor,
    costMinorPerKwh: ranged(({ costMinorPerKwh }) => costMinorPerKwh),
    gainMinor: ranged(({ gainMinor }) => gainMinor),
    breakEvenYears: outcomes[0].breakEvenYears,
    outside: life.outside,
  };
}

/** The night as the cells see it. Half of the round trip's loss (on the scale of logarithms) falls on the way out. */
export function nightOf(input: PlanInput): NightUse {
  const cellWh = cellPower(input, input.nightWh);
  return {
    cellWh,
    nightsPerYear: input.nightsPerYear,
    ratedWh: input.ratedWh,
    usableFraction: input.usableFraction,
    dischargeIt: cellWh / input.nightHours / input.ratedWh,
    temperatureC: input.temperatureC,
    socMeanFraction: input.socMeanFraction,
    isClamped: input.isClamped,
  };
}

function cellPower({ roundTripFraction }: PlanInput, loads: number): number {
  return loads / Math.sqrt(roundTripFraction);
}

/** The paces at which the path ends at the ends of the life's range: ln q moves by its own slope in ln t. */
function pacesOf(fade: TypicalFade, { use, lifeYears }: CapacityPath, range: Ranged) {
  const end = lifeYears ?? range.estimate;
  const slope = Math.log(fade.at(use, end * 1.01).fade / fade.at(use, end).fade) / Math.log(1.01);
  const paceFor = (years: number) => Math.exp(-slope * Math.log(years / range.estimate));
  return { fast: paceFor(range.lower), slow: paceFor(range.upper) };
}

interface Outcome {
  years: number;
  deliveredKwh: number;
  costMinorPerKwh: number;
  gainMinor: number;
  breakEvenYears: number | null;
}

function outcomeOf(input: PlanInput, path: CapacityPath): Outcome {
  const years = path.points.at(-1)!.years;
  const flows = yearFlows(input, path);
  const firstCost = input.cellsMinor + input.otherMinor;
  const gains = flows.map((flow) => ({
    years: flow.years,
    gain: flow.deliveredKwh * input.tariffMinorPerKwh - flow.cost,
  }));
  const { discountedCost, discountedKwh, costPerKwh } = levelisedCost(firstCost, flows, input.discountRate);
  return {
    years,
    deliveredKwh: flows.reduce((sum, { deliveredKwh }) => sum + deliveredKwh, 0),
    costMinorPerKwh: costPerKwh,
    gainMinor: discountedKwh * input.tariffMinorPerKwh - discountedCost,
    breakEvenYears: breakEvenYears(firstCost, gains, input.discountRate),
  };
}

/** Costs and energy by years, the last one as long as the bank still lives. */
export function yearFlows(input: PlanInput, { points }: CapacityPath): YearFlow[] {
  const end = points.at(-1)!.years;
  const outFraction = Math.sqrt(input.roundTripFraction);
  const flows: YearFlow[] = [];
  let before = 0;
  for (let from = 0; from < end; from++) {
    const years = Math.min(from + 1, end);
    const taken = takenBy(points, years);
    const deliveredKwh = ((taken - before) * outFraction) / 1000;
    const chargedKwh = deliveredKwh / input.roundTripFraction;
    const cost = input.upkeepMinorPerYear * (years - from) + chargedKwh * input.chargingMinorPerKwh;
    flows.push({ years, cost, deliveredKwh });
    before = taken;
  }
  return flows;
}

/** Energy taken since new at some years, on the straight line between two points of a path. */
function takenBy(points: CapacityPath['points'], years: number): number {
  const next = points.findIndex((point) => point.years >= years);
  const to = points[Math.max(next, 1)]!;
  const from = points[Math.max(next, 1) - 1]!;
  return from.takenWh + ((years - from.years) / (to.years - from.years)) * (to.takenWh - from.takenWh);
}

/** Years to 80 % if only one part of the fade went on. */
function aloneYears(fade: TypicalFade, use: Use, part: (calendarShare: number) => number): number {
  let low = -6;
  let high = 8;
  for (let i = 0; i < 50; i++) {
    const middle = 0.5 * (low + high);
    const { fade: lost, calendarShare } = fade.at(use, Math.exp(middle));
    if (fade.start * (1 - lost * part(calendarShare)) > 0.8) low = middle;
    else high = middle;
  }
  return Math.exp(0.5 * (low + high));
}

function requireSound(input: PlanInput): void {
  const { nightWh, nightHours, ratedWh, usableFraction, nightsPerYear, roundTripFraction } = input;
  const isSound =
    [nightWh, nightHours, ratedWh, nightsPerYear].every((value) => value > 0 && Number.isFinite(value)) &&
    nightHours <= 24 &&
    nightsPerYear <= 366 &&
    usableFraction > 0 &&
    usableFraction <= 1 &&
    roundTripFraction > 0 &&
    roundTripFraction <= 1;
  if (!isSound) throw new RangeError('a plan requires energies, hours and shares within physical limits');
}
