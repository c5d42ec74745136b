import { normalQuantile } from '../distributions';

/** One subject whose time of the event is known, or that left without it. */
export interface SurvivalTime {
  /** Under observation only after this time (delayed entry); 0 when left out. */
  entry?: number;
  time: number;
  /** True: the event came at `time`; false: left without it (right-censored). */
  isEvent: boolean;
}

export interface SurvivalStep {
  time: number;
  atRisk: number;
  events: number;
  survival: number;
  /** Greenwood's standard error. */
  standardError: number;
  /** Interval on the scale of log(-log S); null where S is 0. */
  lower: number | null;
  upper: number | null;
}

/**
 * Product-limit estimate of the share still without the event, at each time of an event. A subject counts
 * as at risk after its entry and up to its own time. Sources: Kaplan and Meier 1958, J. Amer. Statist.
 * Assoc. 53, 457-481; variance: Greenwood 1926; interval: Kalbfleisch and Prentice 1980, section 1.3.
 *
 * Throws RangeError on times that are not finite or not after the entry.
 */
export function kaplanMeier(subjects: readonly SurvivalTime[], confidence = 0.9): SurvivalStep[] {
  if (!(confidence > 0 && confidence < 1))
    throw new RangeError('kaplanMeier requires a confidence in (0, 1)');
  for (const { entry = 0, time } of subjects) {
    if (!(Number.isFinite(time) && entry >= 0 && time > entry)) {
      throw new RangeError('kaplanMeier requires finite times after the entry');
    }
  }
  const z = normalQuantile(0.5 + confidence / 2);
  const eventTimes = [...new Set(subjects.filter(({ isEvent }) => isEvent).map(({ time }) => time))];
  let survival = 1;
  let greenwood = 0;
  return eventTimes
    .sort((a, b) => a - b)
    .map((time) => {
      const atRisk = subjects.filter((subject) => (subject.entry ?? 0) < time && subject.time >= time).length;
      const events = subjects.filter((subject) => subject.isEvent && subject.time === time).length;
      survival *= 1 - events / atRisk;
      greenwood += events / (atRisk * (atRisk - events));
      const interval = logLogInterval(survival, greenwood, z);
      const standardError = survival > 0 ? survival * Math.sqrt(greenwood) : 0;
      return { time, atRisk, events, survival, standardError, ...interval };
    });
}

/**
 * Time by which a share `fraction` had the event: the first time the curve is at or below 1 - fraction,
 * the middle of the flat part where it equals it; null when the curve does not come down so far.
 * `read` picks the estimate (default) or one end of the interval.
 */
export function survivalQuantile(
  steps: readonly SurvivalStep[],
  fraction: number,
  read: (step: SurvivalStep) => number | null = (step) => step.survival,
): number | null {
  const level = 1 - fraction;
  const first = steps.findIndex((step) => (read(step) ?? NaN) <= level + 1e-9);
  if (first < 0) return null;
  const { time } = steps[first] as SurvivalStep;
  const isFlatAtLevel = Math.abs((read(steps[first] as SurvivalStep) as number) - level) <= 1e-9;
  const next = steps[first + 1];
  return isFlatAtLevel && next ? (time + next.time) / 2 : time;
}

function logLogInterval(survival: number, greenwood: number, z: number) {
  if (survival <= 0) return { lower: null, upper: null };
  const log = Math.log(survival);
  const half = (z * Math.sqrt(greenwood)) / Math.abs(log);
  return { lower: Math.exp(log * Math.exp(half)), upper: Math.exp(log * Math.exp(-half)) };
}
