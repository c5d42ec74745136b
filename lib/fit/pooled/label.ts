import { derive } from './derived';
import { fadeAtShare, fadePoint, lnLife, lnYearsToFade } from './fade';
import { z90 } from './normal';
import { at, endOfLifeShare } from './parameters';
import { basisOf, type LifeOptions } from './life';
import { outsideOf } from './support';
import type { OutsidePool, PublishedFit, Ranged } from './types';
import type { Use } from './use';

const hoursPerYear = 8766;

/** What a data sheet claims, with its conditions; `null` where it is silent. */
export interface LabelClaim {
  /** Cycles at `depthFraction`, until capacity is `endShare` of the rating. */
  cycles: number;
  depthFraction: number;
  endShare: number;
  dischargeIt: number | null;
  chargeIt: number | null;
  temperatureC: number | null;
  isClamped: boolean | null;
  /** Mean state of charge of the test (default 0.5, the middle of a full cycle). */
  socMeanFraction?: number;
}

/** The label beside the pool, at a visitor's own use. */
export type LabelAtUse =
  | {
      ok: true;
      /** What multiplies the model's fade so that it meets the claim. */
      kappa: number;
      /** How long the claimed test lasts at its own currents, and its full cycles. */
      claimYears: number;
      claimEfc: number;
      /** Life at the visitor's use, as the label implies it and as the pool measures it. */
      impliedYears: Ranged;
      measuredYears: Ranged;
      /** measured / implied; null where the use lies outside what the pool supports. */
      ratio: Ranged | null;
      outside: OutsidePool[];
    }
  | { ok: false; reason: 'conditions not stated' | 'claim can not be met by any fade' };

/**
 * The label at your use (README equation 27). A claim of N cycles at depth d lasts d N (1/C_dis + 1/C_ch) hours; kappa
 * solves c0 + ln(1 - kappa q_claim) = ln(end share); the same model with kappa at the visitor's use gives the implied life.
 * With a cell type, kappa and the measured life are that one's; what is implied is not, since its effect e^m is met by kappa.
 * @throws RangeError when the claim's numbers have no physical sense, or on a cell type the fit does not know
 */
export function labelAtYourUse(
  fit: PublishedFit,
  claim: LabelClaim,
  use: Use,
  options: Pick<LifeOptions, 'cellType'> = {},
): LabelAtUse {
  const { cycles, depthFraction, endShare, dischargeIt, chargeIt, temperatureC, isClamped } = claim;
  if (!(cycles > 0) || !(depthFraction > 0 && depthFraction <= 1) || !(endShare > 0.1 && endShare < 1)) {
    throw new RangeError('labelAtYourUse requires cycles above 0, a depth to 1 and an end share of 0.1 to 1');
  }
  if (dischargeIt === null || chargeIt === null || temperatureC === null || isClamped === null) {
    return { ok: false, reason: 'conditions not stated' };
  }
  if (!(dischargeIt > 0) || !(chargeIt > 0)) throw new RangeError('labelAtYourUse requires rates above 0');
  const claimEfc = cycles * depthFraction;
  const claimYears = (claimEfc * (1 / dischargeIt + 1 / chargeIt)) / hoursPerYear;
  const claimUse: Use = {
    ...{ depthFraction, dischargeIt, temperatureC, isClamped },
    socMeanFraction: claim.socMeanFraction ?? 0.5,
    efcPerYear: claimEfc / claimYears,
  };

  if (fit.components.some(({ psi }) => fadeAtShare(psi[at.c0]!, endShare) <= 0)) {
    return { ok: false, reason: 'claim can not be met by any fade' };
  }
  const parts = (psi: ArrayLike<number>, exponent: number) =>
    impliedLife({ psi, exponent }, claimUse, claimYears, endShare, use);
  const basis = basisOf(fit, options.cellType);
  const implied = derive(fit, basis, ({ psi, exponent }) => {
    const { lnYears, gradient } = parts(psi, exponent);
    return { value: lnYears, gradient };
  });
  const measured = derive(fit, basis, ({ psi, exponent }, shift) => {
    const life = lnLife({ psi, exponent, shift }, use);
    return { value: life.lnYears, gradient: life.gradient, shiftSlope: life.shiftSlope };
  });
  const ratio = derive(fit, basis, ({ psi, exponent }, shift) => {
    const life = lnLife({ psi, exponent, shift }, use);
    const label = parts(psi, exponent);
    return {
      value: life.lnYears - label.lnYears,
      gradient: life.gradient.map((value, i) => value - label.gradient[i]!),
      shiftSlope: life.shiftSlope,
    };
  });
  const lnKappa = derive(fit, basis, ({ psi, exponent }, shift) => ({
    value: parts(psi, exponent).lnKappa - shift,
    gradient: new Float64Array(psi.length),
  })).mean;
  const outside = outsideOf(fit.reach, use);
  return {
    ...{ ok: true, kappa: Math.exp(lnKappa), claimYears, claimEfc, outside },
    impliedYears: ranged(implied, fit.tQuantile),
    measuredYears: ranged(measured, fit.tQuantile),
    ratio: outside.length === 0 ? ranged(ratio, z90) : null,
  };
}

/** ln kappa and the implied ln life at one psi, with the life's gradient. */
function impliedLife(
  inputs: { psi: ArrayLike<number>; exponent: number },
  claimUse: Use,
  claimYears: number,
  endShare: number,
  use: Use,
): { lnKappa: number; lnYears: number; gradient: Float64Array } {
  const c0 = inputs.psi[at.c0]!;
  const claimed = fadePoint(inputs, claimUse, claimYears);
  const endFade = fadeAtShare(c0, endShare);
  // kappa q_claim is the fade at the claimed end, so that kappa is exact wherever 1 - kappa q > 0.
  const lnKappa = Math.log(endFade) - claimed.lnFade;
  const shifted = { ...inputs, shift: lnKappa };
  const level = fadeAtShare(c0, endOfLifeShare);
  const lnYears = lnYearsToFade(shifted, use, Math.log(Math.max(level, 1e-9)));
  const point = fadePoint(shifted, use, Math.exp(lnYears));
  const ageSlope = Math.max(point.ageSlope, 1e-6);
  // ln q(use) + ln kappa = ln level, differentiated: what moves kappa moves the life.
  const gradient = point.slope.map((slope, i) => (claimed.slope[i]! - slope) / ageSlope);
  gradient[at.c0] = ((1 - level) / level - (1 - endFade) / endFade) / ageSlope;
  return { lnKappa, lnYears, gradient };
}

function ranged({ mean, se }: { mean: number; se: number }, quantile: number): Ranged {
  return {
    estimate: Math.exp(mean),
    lower: Math.exp(mean - quantile * se),
    upper: Math.exp(mean + quantile * se),
  };
}
