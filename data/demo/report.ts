import type { CheckFields } from '@/lib/contract/checks';
import type { FieldSource } from '@/lib/contract/fields';

import { type Draws, held, toStep } from './random';
import { reportErrors } from './truth';
import type { Reporter, TrueState } from './types';

type Conditions = CheckFields['conditions'];
type Sources = CheckFields['sources'];

const sourceWeights = { metered: 0.34, readOff: 0.34, estimated: 0.32 } as const;

/** Draws how a bank's owner knows its conditions, and how far off each figure stands. */
export function drawReporter(draws: Draws): Reporter {
  const sources = {
    temperature: draws.weighted<FieldSource>(sourceWeights),
    soc: draws.weighted<FieldSource>({ metered: 0.05, readOff: 0.5, estimated: 0.45 }),
    rate: draws.weighted<FieldSource>({ metered: 0.3, readOff: 0.35, estimated: 0.35 }),
    depth: draws.weighted<FieldSource>({ metered: 0.25, readOff: 0.4, estimated: 0.35 }),
    counter: draws.weighted<FieldSource>({ metered: 0.4, readOff: 0.6, estimated: 0 }),
  };
  return {
    sources,
    temperatureErrorC: draws.normal(0, reportErrors.temperatureC[sources.temperature]),
    socError: draws.normal(0, reportErrors.socFraction[sources.soc]),
    rateFactor: Math.exp(draws.normal(0, reportErrors.rate[sources.rate])),
    depthFactor: Math.exp(draws.normal(0, reportErrors.depth[sources.depth])),
    counterFactor: 1 + draws.normal(0, reportErrors.counter[sources.counter]),
    counterKind: drawCounter(draws),
    givesWindow: draws.chance(0.35),
    isAir: sources.temperature === 'estimated' && draws.chance(0.2),
  };
}

function drawCounter(draws: Draws): Reporter['counterKind'] {
  const kind = draws.weighted({ efc: 0.36, ah: 0.26, kwh: 0.2, none: 0.18 });
  return kind === 'none' ? null : kind;
}

/** Step a figure is given to: a guess is rounder than a reading. */
const steps = {
  temperature: { metered: 0.1, readOff: 0.5, estimated: 1 },
  soc: { metered: 0.01, readOff: 0.01, estimated: 0.05 },
  rate: { metered: 0.005, readOff: 0.01, estimated: 0.01 },
  depth: { metered: 0.01, readOff: 0.01, estimated: 0.05 },
} as const;

/** What the owner reports of the time since the previous check. `ratedAh` and `nominalV` are the whole bank's. */
export function reportConditions(
  draws: Draws,
  reporter: Reporter,
  state: TrueState,
  bank: { ratedAh: number; nominalV: number },
): { conditions: Conditions; sources: Sources } {
  const { since } = state;
  const { sources: of } = reporter;
  const air = reporter.isAir ? 1.5 : 0;
  const temperature = since.temperatureC + reporter.temperatureErrorC + draws.normal(0, 0.2) - air;
  const temperatureMeanC = toStep(temperature, steps.temperature[of.temperature]);
  const depthFraction = held(
    toStep(since.depthFraction * reporter.depthFactor, steps.depth[of.depth]),
    0.05,
    1,
  );
  const dischargeIt = Math.max(0.01, toStep(since.dischargeIt * reporter.rateFactor, steps.rate[of.rate]));
  const soc = held(since.socMeanFraction + reporter.socError, 0.15, 0.95);
  const swing = draws.uniform(4, 9);
  const cyclesPerDay = toStep(since.efcPerYear / 365.2425 / since.depthFraction, 0.05);
  const hasCounter = reporter.counterKind !== null;
  const socOf = reporter.givesWindow
    ? windowAround(soc, depthFraction)
    : { socMeanFraction: toStep(soc, steps.soc[of.soc]) };
  const conditions: Conditions = {
    depthFraction,
    dischargeIt,
    chargeIt: draws.chance(0.8) ? toStep(held(dischargeIt * draws.uniform(0.6, 1.3), 0.02, 0.9), 0.01) : null,
    peakIt: draws.chance(0.5) ? toStep(held(dischargeIt * draws.uniform(2, 4), 0.05, 2.5), 0.05) : null,
    temperatureMeanC,
    temperatureHottestC: draws.chance(0.7) ? toStep(temperatureMeanC + swing, 1) : null,
    temperatureColdestC: draws.chance(0.7) ? toStep(temperatureMeanC - swing, 1) : null,
    temperatureOf: reporter.isAir ? 'air' : 'cells',
    coldestChargingC: draws.chance(0.4) ? toStep(Math.max(temperatureMeanC - swing, 2), 1) : null,
    ...{ socMeanFraction: null, socLowFraction: null, socHighFraction: null },
    ...socOf,
    counterKind: reporter.counterKind,
    counterValue: counterValue(reporter, state, bank),
    cyclesPerDay: !hasCounter || draws.chance(0.7) ? cyclesPerDay : null,
    idleDays: draws.chance(0.6) ? draws.int(0, 21) : null,
    idleSocFraction: draws.chance(0.3) ? draws.pick([0.3, 0.4, 0.5, 0.6]) : null,
  };
  return { conditions, sources: sourcesOf(reporter) };
}

function windowAround(soc: number, depth: number) {
  const half = Math.min(depth / 2, soc - 0.02, 1 - soc);
  const low = toStep(soc - half, 0.01);
  return { socLowFraction: low, socHighFraction: Math.max(toStep(soc + half, 0.01), low + 0.01) };
}

function counterValue(reporter: Reporter, state: TrueState, bank: { ratedAh: number; nominalV: number }) {
  const efc = state.countedEfc * reporter.counterFactor;
  if (reporter.counterKind === 'efc') return Math.round(efc);
  if (reporter.counterKind === 'ah') return Math.round(efc * bank.ratedAh);
  if (reporter.counterKind === 'kwh') return Math.round((efc * bank.ratedAh * bank.nominalV) / 1000);
  return null;
}

function sourcesOf({ sources: of, counterKind, givesWindow }: Reporter): Sources {
  return {
    ...{ capacityAh: 'metered', energyWh: 'metered', meanCurrentA: 'metered' },
    ...{ temperatureStartC: 'metered', temperatureEndC: 'metered' },
    ...{ lowestCellAtEndV: 'readOff', highestCellAtFullV: 'readOff' },
    depthFraction: of.depth,
    dischargeIt: of.rate,
    temperatureMeanC: of.temperature,
    ...(givesWindow ? { socLowFraction: of.soc, socHighFraction: of.soc } : { socMeanFraction: of.soc }),
    ...(counterKind ? { counterValue: of.counter } : { cyclesPerDay: 'estimated' as const }),
  };
}
