/**
 * What is true in the demo's world: the fade every bank follows, in the centred forms of the pooled model, and the
 * sizes of what differs between banks, cell types and checks. README.md beside this file says it in words.
 */
export const truth = {
  /** ln of the capacity of a new cell over its rating: 2 % above. */
  c0: 0.02,
  /** Calendar fade after one year at 25 °C, half full. */
  lnA: Math.log(0.03),
  aT: 17,
  aS: 0.5,
  calendarExponent: 0.5,
  /** Cycling fade after 500 EFC at depth 0.5, 0.2 It, 25 °C. */
  lnB: Math.log(0.0365),
  z: 0.62,
  bD: 0.28,
  bC: 0.1,
  bT: 11,
  /** Clamping does nothing to the cycling fade up to 0.3 It, and lessens it above. */
  clampedUpToLimit: 0,
  clampedAboveLimit: -0.22,
  clampingLimitIt: 0.3,
  /** Banks of one cell type: sd of ln start capacity and of ln fade. */
  startSd: 0.012,
  fadeSd: 0.2,
  /** What a repeated test of one bank on one day varies by, beyond the meter's noise. */
  repeatSd: 0.006,
  /** Apparent activation energy that weighs temperatures over a bank's years, kJ/mol. */
  activationKjPerMol: 25,
} as const;

/** Errors of what owners report, by its source: sd of a bank's own standing error. */
export const reportErrors = {
  temperatureC: { metered: 0.3, readOff: 0.8, estimated: 2 },
  socFraction: { metered: 0.02, readOff: 0.03, estimated: 0.08 },
  /** Relative. */
  rate: { metered: 0.03, readOff: 0.06, estimated: 0.2 },
  depth: { metered: 0.02, readOff: 0.04, estimated: 0.1 },
  counter: { metered: 0.01, readOff: 0.015, estimated: 0.05 },
} as const;

/** A use as the model sees it: conditions to date. */
export interface TrueUse {
  depthFraction: number;
  dischargeIt: number;
  temperatureC: number;
  socMeanFraction: number;
  isClamped: boolean;
}

export interface TrueScenario extends TrueUse {
  efcPerYear: number;
}

/** The uses the demo's lives are stated for. */
export const scenarios = {
  /** What the list of cell types is stated at: 60 % deep once a day at 0.1 It. */
  standard: scenario(0.6, 0.1, 25, 0.5, 219, false),
  typical: scenario(0.7, 0.2, 25, 0.6, 200, false),
  typicalClamped: scenario(0.7, 0.2, 25, 0.6, 200, true),
  hard: scenario(0.9, 0.5, 33, 0.65, 300, false),
  hardClamped: scenario(0.9, 0.5, 33, 0.65, 300, true),
} as const satisfies Record<string, TrueScenario>;

function scenario(
  depthFraction: number,
  dischargeIt: number,
  temperatureC: number,
  socMeanFraction: number,
  efcPerYear: number,
  isClamped: boolean,
): TrueScenario {
  return { depthFraction, dischargeIt, temperatureC, socMeanFraction, efcPerYear, isClamped };
}

const gasConstantKj = 8.314e-3;

/** (1/298.15 - 1/T) / R, mol/kJ; zero at 25 °C. */
export function heatOf(temperatureC: number): number {
  return (1 / 298.15 - 1 / (temperatureC + 273.15)) / gasConstantKj;
}

/** The temperature that heatOf maps to a value, °C. */
export function temperatureOfHeat(heat: number): number {
  return 1 / (1 / 298.15 - heat * gasConstantKj) - 273.15;
}

/** q: share of the start capacity lost. `shift` is what cell type and bank add to ln q. */
export function trueFade(lived: TrueUse, ageYears: number, efc: number, shift = 0): number {
  const heat = heatOf(lived.temperatureC);
  const calendar =
    truth.lnA +
    truth.aT * heat +
    truth.aS * (lived.socMeanFraction - 0.5) +
    truth.calendarExponent * Math.log(ageYears);
  const isFast = lived.dischargeIt > truth.clampingLimitIt;
  const clamping = isFast ? truth.clampedAboveLimit : truth.clampedUpToLimit;
  const cycling =
    truth.lnB +
    truth.z * Math.log(Math.max(efc, 1) / 500) +
    truth.bD * Math.log(lived.depthFraction / 0.5) +
    truth.bC * Math.log(lived.dischargeIt / 0.2) +
    truth.bT * heat +
    (lived.isClamped ? clamping : 0);
  return Math.exp(shift) * (Math.exp(calendar) + Math.exp(cycling));
}

/** Capacity at reference conditions over the rating. `start` is the bank's own ln start beside c0. */
export function trueSoh(
  lived: TrueUse,
  ageYears: number,
  efc: number,
  effects: { shift?: number; start?: number } = {},
): number {
  // The model has no floor; a bank is dead long before.
  const fade = Math.min(0.9, trueFade(lived, ageYears, efc, effects.shift));
  return Math.exp(truth.c0 + (effects.start ?? 0)) * (1 - fade);
}

/** Smallest x in [low, high] at which a rising function reaches zero, by bisection. */
export function rootOf(rising: (x: number) => number, low: number, high: number): number {
  let [from, to] = [low, high];
  for (let step = 0; step < 80; step++) {
    const middle = (from + to) / 2;
    if (rising(middle) < 0) from = middle;
    else to = middle;
  }
  return (from + to) / 2;
}

/** Years until the capacity is 80 % of the rating. */
export function trueYearsTo80(scenario: TrueScenario, shift = 0): number {
  return rootOf((years) => 0.8 - trueSoh(scenario, years, scenario.efcPerYear * years, { shift }), 0.01, 500);
}
