/** How a bank is used: the conditions a life is computed for. */
export interface Use {
  /** Typical depth of discharge, 0..1. */
  depthFraction: number;
  /** Mean discharge rate, It (1/h). */
  dischargeIt: number;
  /** Mean cell temperature, °C. */
  temperatureC: number;
  /** Mean state of charge, 0..1. */
  socMeanFraction: number;
  /** Equivalent full cycles per year. */
  efcPerYear: number;
  /** Cells held between end plates. */
  isClamped: boolean;
}

/** A use with its name. */
export interface Scenario extends Use {
  name: string;
}

/** The five uses every fit is summarised for. */
export const defaultScenarios: readonly Scenario[] = [
  scenario('mild', 0.5, 0.15, 22, 0.5, 120, false),
  scenario('typical', 0.7, 0.2, 25, 0.6, 200, true),
  scenario('typical_unclamped', 0.7, 0.2, 25, 0.6, 200, false),
  scenario('hard', 0.9, 0.5, 33, 0.65, 300, false),
  scenario('hard_clamped', 0.9, 0.5, 33, 0.65, 300, true),
];

function scenario(
  name: string,
  depthFraction: number,
  dischargeIt: number,
  temperatureC: number,
  socMeanFraction: number,
  efcPerYear: number,
  isClamped: boolean,
): Scenario {
  return { name, depthFraction, dischargeIt, temperatureC, socMeanFraction, efcPerYear, isClamped };
}

/** One of the default scenarios. */
export function scenarioNamed(name: string): Scenario {
  const found = defaultScenarios.find((one) => one.name === name);
  if (!found) throw new RangeError(`scenarioNamed requires the name of a default scenario, got "${name}"`);
  return found;
}
