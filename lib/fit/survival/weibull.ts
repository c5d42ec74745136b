import { normalQuantile } from '../distributions';
import type { RangedFigure } from '../curve/types';
import { assertIntervals, type IntervalObservation } from './observation';

/** Weibull curve S(t) = exp(-(t / scale)^shape), as log t = mu + sigma w (w: smallest extreme value). */
export interface WeibullFit {
  ok: true;
  mu: number;
  sigma: number;
  shape: number;
  scale: number;
  /** Of mu and ln sigma, in this order. */
  covariance: [[number, number], [number, number]];
  logLikelihood: number;
  iterations: number;
}

const MAX_STEPS = 100;
const MAX_HALVINGS = 40;

/**
 * Weibull curve by maximum likelihood from events known exactly (left = right), between two times, or not
 * seen yet (right = Infinity), with delayed entry. Newton's method with exact derivatives.
 *
 * Returns `{ ok: false }` when no event was seen (the scale is then unbounded) or the search does not
 * settle. Throws RangeError unless 0 <= entry <= left <= right.
 */
export function weibull(
  observations: readonly IntervalObservation[],
): WeibullFit | { ok: false; reason: 'noEvents' | 'notConverged' } {
  assertIntervals(observations, 'weibull', true);
  const events = observations.filter(({ right }) => Number.isFinite(right));
  if (events.length === 0) return { ok: false, reason: 'noEvents' };
  // Start: the exponential curve with as many events per time under observation.
  const exposure = observations.reduce((sum, { left, right, entry = 0 }) => {
    return sum + (Number.isFinite(right) ? (left + right) / 2 : left) - entry;
  }, 0);
  let mu = Math.log(exposure / events.length);
  let logSigma = 0;
  let here = likelihood(observations, mu, logSigma);
  for (let iteration = 1; iteration <= MAX_STEPS; iteration++) {
    const step = newtonStep(here);
    if (step.decrement < 1e-20 * Math.max(1, Math.abs(here.value))) {
      return finished(mu, logSigma, here, iteration);
    }
    let share = Math.min(1, 1 / Math.max(Math.abs(step.mu), Math.abs(step.logSigma)));
    let next = here;
    let halving = 0;
    for (; halving < MAX_HALVINGS; halving++) {
      next = likelihood(observations, mu + share * step.mu, logSigma + share * step.logSigma);
      if (next.value > here.value) break;
      share /= 2;
    }
    if (halving === MAX_HALVINGS) {
      // Rounding allows no further increase: done when what was left to gain is negligible.
      return step.decrement < 1e-9
        ? finished(mu, logSigma, here, iteration)
        : { ok: false, reason: 'notConverged' };
    }
    mu += share * step.mu;
    logSigma += share * step.logSigma;
    here = next;
  }
  return { ok: false, reason: 'notConverged' };
}

/** Share without the event at `time`. */
export function weibullSurvival({ mu, sigma }: WeibullFit, time: number): number {
  return time <= 0 ? 1 : Math.exp(-Math.exp((Math.log(time) - mu) / sigma));
}

/** Time by which a share `fraction` had the event, with an interval by the delta method on its logarithm. */
export function weibullQuantile(
  { mu, sigma, covariance }: WeibullFit,
  fraction: number,
  confidence = 0.9,
): RangedFigure {
  if (!(fraction > 0 && fraction < 1)) throw new RangeError('weibullQuantile requires a fraction in (0, 1)');
  const w = Math.log(-Math.log(1 - fraction));
  const logTime = mu + sigma * w;
  const slope = sigma * w;
  const variance = covariance[0][0] + 2 * slope * covariance[0][1] + slope ** 2 * covariance[1][1];
  const half = normalQuantile(0.5 + confidence / 2) * Math.sqrt(variance);
  return { estimate: Math.exp(logTime), lower: Math.exp(logTime - half), upper: Math.exp(logTime + half) };
}

interface Derivatives {
  value: number;
  /** First derivatives by mu and ln sigma, and the second ones. */
  m: number;
  s: number;
  mm: number;
  ms: number;
  ss: number;
}

const ZERO: Derivatives = { value: 0, m: 0, s: 0, mm: 0, ms: 0, ss: 0 };

function likelihood(observations: readonly IntervalObservation[], mu: number, logSigma: number): Derivatives {
  const sum = { ...ZERO };
  for (const { left, right, entry = 0 } of observations) {
    if (left === right) accumulate(sum, exactTerm(left, mu, logSigma), 1);
    else accumulate(sum, intervalTerm(hazard(left, mu, logSigma), right, mu, logSigma), 1);
    // Seen only because without the event at entry: divided by S(entry).
    if (entry > 0) accumulate(sum, hazard(entry, mu, logSigma), 1);
  }
  return sum;
}

function accumulate(sum: Derivatives, term: Derivatives, factor: number): void {
  for (const key of ['value', 'm', 's', 'mm', 'ms', 'ss'] as const) sum[key] += factor * term[key];
}

// Cumulative hazard H = e^z, z = (ln t - mu) / sigma: dz = (-1/sigma, -z), d2z = (0, 1/sigma, z).
function hazard(time: number, mu: number, logSigma: number): Derivatives {
  if (time <= 0) return ZERO;
  const slope = Math.exp(-logSigma);
  const z = (Math.log(time) - mu) * slope;
  const value = Math.exp(z);
  return {
    value,
    m: -value * slope,
    s: -value * z,
    mm: value * slope * slope,
    ms: value * (z * slope + slope),
    ss: value * (z * z + z),
  };
}

// ln f = z - H - ln sigma - ln t.
function exactTerm(time: number, mu: number, logSigma: number): Derivatives {
  const slope = Math.exp(-logSigma);
  const z = (Math.log(time) - mu) * slope;
  const h = hazard(time, mu, logSigma);
  return {
    value: z - h.value - logSigma - Math.log(time),
    m: -slope - h.m,
    s: -z - h.s - 1,
    mm: -h.mm,
    ms: slope - h.ms,
    ss: z - h.ss,
  };
}

// ln(S(left) - S(right)) = -H_left + ln(1 - e^-D), D = H_right - H_left.
function intervalTerm(left: Derivatives, right: number, mu: number, logSigma: number): Derivatives {
  const term = { ...ZERO };
  accumulate(term, left, -1);
  if (!Number.isFinite(right)) return term;
  const d = { ...hazard(right, mu, logSigma) };
  accumulate(d, left, -1);
  const odds = 1 / Math.expm1(d.value);
  const curvature = -odds * (1 + odds);
  return {
    value: term.value + Math.log(-Math.expm1(-d.value)),
    m: term.m + odds * d.m,
    s: term.s + odds * d.s,
    mm: term.mm + odds * d.mm + curvature * d.m * d.m,
    ms: term.ms + odds * d.ms + curvature * d.m * d.s,
    ss: term.ss + odds * d.ss + curvature * d.s * d.s,
  };
}

// Away from the maximum the information may be indefinite; a ridge makes the step an ascent.
function newtonStep({ m, s, mm, ms, ss }: Derivatives) {
  let ridge = 0;
  for (;;) {
    const [a, b, c] = [-mm + ridge, -ms, -ss + ridge];
    const determinant = a * c - b * b;
    if (a > 0 && determinant > 1e-12 * a * Math.abs(c)) {
      const step = { mu: (c * m - b * s) / determinant, logSigma: (a * s - b * m) / determinant };
      return { ...step, decrement: step.mu * m + step.logSigma * s };
    }
    ridge = ridge === 0 ? 1e-3 * (Math.abs(mm) + Math.abs(ss) + 1) : ridge * 10;
  }
}

function finished(
  mu: number,
  logSigma: number,
  { mm, ms, ss, value }: Derivatives,
  iterations: number,
): WeibullFit {
  const determinant = mm * ss - ms * ms;
  const sigma = Math.exp(logSigma);
  return {
    ok: true,
    mu,
    sigma,
    shape: 1 / sigma,
    scale: Math.exp(mu),
    covariance: [
      [-ss / determinant, ms / determinant],
      [ms / determinant, -mm / determinant],
    ],
    logLikelihood: value,
    iterations,
  };
}
