import type { BankFields } from '@/lib/contract/banks';

import { createDraws, type Draws, held } from './random';
import { heatOf, temperatureOfHeat, truth, type TrueUse } from './truth';

/** How a bank is truly used, the mean over its years. */
export interface BankUse {
  profile: Profile;
  depthFraction: number;
  dischargeIt: number;
  temperatureC: number;
  socMeanFraction: number;
  efcPerYear: number;
}

type Profile = 'gentle' | 'home' | 'hard';

interface ProfileFacts {
  depth: [number, number];
  rateIt: [number, number];
  cyclesPerDay: [number, number];
  soc: number;
  warmerC: number;
}

const profiles: Record<Profile, ProfileFacts> = {
  gentle: { depth: [0.2, 0.42], rateIt: [0.04, 0.12], cyclesPerDay: [0.6, 1], soc: 0.64, warmerC: 0 },
  home: { depth: [0.35, 0.8], rateIt: [0.06, 0.28], cyclesPerDay: [0.75, 1.05], soc: 0.55, warmerC: 0 },
  hard: { depth: [0.62, 0.96], rateIt: [0.31, 0.62], cyclesPerDay: [0.85, 1.2], soc: 0.55, warmerC: 1.5 },
};

const profileWeights: Record<Profile, number> = { gentle: 0.1, home: 0.68, hard: 0.22 };

/** Mean cell temperature over the year by climate band, °C. */
const bandTemperatureC = { cold: 14, cool: 17.5, mild: 21.5, warm: 26, hot: 32 };
const placeWarmerC = { indoors: 1.5, shed: 0, garage: 0.5, vehicle: 1, boat: -0.5 };

/** Draws how a bank is used, where it stands decided. */
export function drawUse(
  draws: Draws,
  fields: Pick<BankFields, 'climateBand' | 'place'>,
  profile?: Profile,
): BankUse {
  const chosen = profile ?? draws.weighted(profileWeights);
  const facts = profiles[chosen];
  const depthFraction = draws.uniform(...facts.depth);
  const standing = bandTemperatureC[fields.climateBand ?? 'mild'] + placeWarmerC[fields.place ?? 'shed'];
  return {
    profile: chosen,
    depthFraction,
    dischargeIt: draws.uniform(...facts.rateIt),
    temperatureC: draws.normal(standing + facts.warmerC, 1.5),
    socMeanFraction: draws.normalWithin(facts.soc, 0.08, 0.32, 0.85),
    efcPerYear: depthFraction * 365 * draws.uniform(...facts.cyclesPerDay),
  };
}

/** One stretch of a bank's life between two checks. */
export interface Period extends Omit<BankUse, 'profile'> {
  years: number;
}

/** A bank's use in one period: its mean use, a little different each time. */
export function drawPeriod(use: BankUse, years: number, seed: number, bank: number, place: number): Period {
  const draws = createDraws(seed, 3, bank, place);
  return {
    years,
    depthFraction: held(use.depthFraction * Math.exp(draws.normal(0, 0.04)), 0.08, 0.98),
    dischargeIt: use.dischargeIt * Math.exp(draws.normal(0, 0.04)),
    temperatureC: use.temperatureC + draws.normal(0, 0.5),
    socMeanFraction: held(use.socMeanFraction + draws.normal(0, 0.012), 0.25, 0.9),
    efcPerYear: use.efcPerYear * Math.exp(draws.normal(0, 0.06)),
  };
}

/**
 * Conditions to date of the periods so far: temperature as the Arrhenius-weighted mean, state of charge weighted by
 * time, depth and rate by full cycles.
 */
export function livedThrough(periods: readonly Period[], isClamped: boolean): TrueUse {
  const mean = (value: (period: Period) => number, weight: (period: Period) => number) => {
    let [sum, total] = [0, 0];
    for (const period of periods) {
      sum += value(period) * weight(period);
      total += weight(period);
    }
    return sum / total;
  };
  const byTime = ({ years }: Period) => years;
  const byCycles = ({ years, efcPerYear }: Period) => years * efcPerYear;
  const energy = truth.activationKjPerMol;
  const heat = Math.log(mean(({ temperatureC }) => Math.exp(energy * heatOf(temperatureC)), byTime)) / energy;
  return {
    depthFraction: mean(({ depthFraction }) => depthFraction, byCycles),
    dischargeIt: mean(({ dischargeIt }) => dischargeIt, byCycles),
    temperatureC: temperatureOfHeat(heat),
    socMeanFraction: mean(({ socMeanFraction }) => socMeanFraction, byTime),
    isClamped,
  };
}
