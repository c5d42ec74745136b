import { at, endOfLifeShare, tangentFade, tau } from './parameters';
import type { Use } from './use';

/** Fade of a use at an age, with its derivatives. */
export interface FadePoint {
  /** q, the share of the start capacity lost. */
  fade: number;
  lnFade: number;
  calendarShare: number;
  /** dln q/dpsi for c0 lnA ... ln sm (zero for c0 and the sds). */
  slope: Float64Array;
  /** dln q/dln t with n = R t. */
  ageSlope: number;
}

/** What a fade curve is computed from. */
export interface FadeInputs {
  psi: ArrayLike<number>;
  exponent: number;
  /** Effect of the cell type and of the bank on ln q (default 0). */
  shift?: number;
}

/** Equations 2 to 4 of the README at one use and age: q = e^shift (GA + GB), n = R t (at least 1). */
export function fadePoint(inputs: FadeInputs, use: Use, years: number, extra = 0): FadePoint {
  const { psi, exponent } = inputs;
  const heat = tau(use.temperatureC);
  const lnEfc = Math.log(Math.max(use.efcPerYear * years, 1) / 500);
  const lnDepth = Math.log(use.depthFraction / 0.5);
  const lnRate = Math.log(use.dischargeIt / 0.2);
  const soc = use.socMeanFraction - 0.5;
  const clamped = use.isClamped ? 1 : 0;
  const lnCalendar = psi[at.lnA]! + psi[at.aT]! * heat + psi[at.aS]! * soc + exponent * Math.log(years);
  const lnCycling =
    psi[at.lnB]! +
    psi[at.z]! * lnEfc +
    psi[at.bD]! * lnDepth +
    psi[at.bC]! * lnRate +
    psi[at.bT]! * heat +
    psi[at.bK]! * clamped +
    (psi[at.extra] ?? 0) * extra;
  const top = Math.max(lnCalendar, lnCycling);
  const lnFade = (inputs.shift ?? 0) + top + Math.log(Math.exp(lnCalendar - top) + Math.exp(lnCycling - top));
  const share = 1 / (1 + Math.exp(lnCycling - lnCalendar));
  const slope = new Float64Array(psi.length);
  slope.set([share, share * heat, share * soc], at.lnA);
  const cycling = 1 - share;
  slope.set(
    [1, lnEfc, lnDepth, lnRate, heat, clamped].map((x) => cycling * x),
    at.lnB,
  );
  if (psi.length > at.extra) slope[at.extra] = cycling * extra;
  const isCounting = use.efcPerYear * years > 1;
  return {
    fade: Math.exp(lnFade),
    lnFade,
    calendarShare: share,
    slope,
    ageSlope: share * exponent + (isCounting ? cycling * psi[at.z]! : 0),
  };
}

/** ln(1 - q), continued by its tangent beyond q = 0.9. */
export function lnKept(fade: number): number {
  return fade < tangentFade
    ? Math.log(1 - fade)
    : Math.log(1 - tangentFade) - (fade - tangentFade) / (1 - tangentFade);
}

/** The fade q at which capacity is down to a share of the rating: c0 + c + ln(1 - q) = ln(share). */
export function fadeAtShare(start: number, share: number = endOfLifeShare): number {
  return 1 - share * Math.exp(-start);
}

const lnYearsFrom = -8;
const lnYearsTo = 12;

/** A step so small that the next would be rounding. */
const settled = 1e-13;
const maxSteps = 60;

/**
 * ln of the years until ln q reaches a level (README equation 18): Newton's steps on ln t, along which ln q is nearly
 * straight, each held within what is known to bracket the crossing and halved where it is not.
 * Levels not met between e^-8 and e^12 years give those bounds.
 */
export function lnYearsToFade(inputs: FadeInputs, use: Use, lnLevel: number, extra = 0): number {
  let low = lnYearsFrom;
  let high = lnYearsTo;
  // A guess: about eight years.
  let place = 2;
  for (let i = 0; i < maxSteps; i++) {
    const point = fadePoint(inputs, use, Math.exp(place), extra);
    const short = lnLevel - point.lnFade;
    if (short > 0) low = place;
    else high = place;
    const newton = place + short / Math.max(point.ageSlope, 1e-6);
    const next = newton > low && newton < high ? newton : 0.5 * (low + high);
    const step = Math.abs(next - place);
    place = next;
    if (step < settled) break;
  }
  return place;
}

/** ln T80 with its gradient over psi and its derivative by a shift of ln q. */
export interface LnLife {
  lnYears: number;
  gradient: Float64Array;
  shiftSlope: number;
}

/**
 * ln of the years to 80 % of the rating, c0 + ln(1 - q) = ln 0.8, and its derivatives by implicit differentiation
 * (README equation 18).
 */
export function lnLife(inputs: FadeInputs, use: Use, share = endOfLifeShare, extra = 0): LnLife {
  const level = fadeAtShare(inputs.psi[at.c0]!, share);
  // A start so low that 80 % is already passed when new leaves no life to speak of.
  const lnLevel = Math.log(Math.max(level, 1e-9));
  const lnYears = lnYearsToFade(inputs, use, lnLevel, extra);
  const point = fadePoint(inputs, use, Math.exp(lnYears), extra);
  const ageSlope = Math.max(point.ageSlope, 1e-6);
  const gradient = point.slope.map((slope) => -slope / ageSlope);
  gradient[at.c0] = level > 1e-9 ? (1 - level) / level / ageSlope : 0;
  return { lnYears, gradient, shiftSlope: -1 / ageSlope };
}
