import { logFailure } from './logTypes';
import type { LogFailure, LogMapping, LogSamples, LogWarning } from './logTypes';
import { positivePart } from './integrateSpan';

/** Sign to multiply the current by so that discharging is positive. */
export interface Orientation {
  ok: true;
  sign: 1 | -1;
  idleA: number;
  warnings: LogWarning[];
}

/** Currents below this share of the usual largest one count as idle (judgement: meters and the BMS draw that much). */
const idleShare = 0.02;
/** Relative change of voltage that tells charging from discharging. */
const clearChange = 0.01;

/** What one sign of the current amounts to, and how the voltage fares under it. */
interface Side {
  chargeAh: number;
  /** Relative change of the voltage over the side's largest run, negative while discharging. */
  change: number | null;
  meanV: number | null;
}

/**
 * Tells which sign of the current is discharging: the voltage falls while it flows, and lies lower than while the
 * other flows. Where the log cannot tell, that is an expected failure, to be asked about.
 */
export function orientCurrent(
  samples: LogSamples,
  wanted: NonNullable<LogMapping['dischargeSign']> = 'auto',
): Orientation | LogFailure {
  const { currentA } = samples;
  const idleA = idleShare * usualLargest(currentA);
  if (!(idleA > 0)) return logFailure('noDischarge', 'The current is zero all through the log.');
  const warnings: LogWarning[] = [];
  const plus = sideOf(samples, 1, idleA);
  const minus = sideOf(samples, -1, idleA);
  if (wanted !== 'auto') {
    const sign = wanted === 'positive' ? 1 : -1;
    const chosen = sign === 1 ? plus : minus;
    if (chosen.chargeAh > 0) return { ok: true, sign, idleA, warnings };
    return logFailure('noDischarge', `No ${wanted} current was found, and that was chosen as discharging.`);
  }
  const [main, other, sign] =
    plus.chargeAh >= minus.chargeAh ? [plus, minus, 1 as const] : [minus, plus, -1 as const];
  if (other.chargeAh < 0.01 * main.chargeAh) {
    if (main.change !== null && main.change > clearChange) {
      return logFailure('noDischarge', 'Only charging was found: the voltage rises while the current flows.');
    }
    if (main.change === null || main.change > -clearChange) {
      warnings.push({
        code: 'directionAssumed',
        text: 'The current has one sign and the voltage does not tell its direction; it was taken as discharging.',
      });
    }
    return { ok: true, sign, idleA, warnings };
  }
  const score = difference(other.change, main.change) + difference(other.meanV, main.meanV, main.meanV);
  if (Math.abs(score) < clearChange) {
    return logFailure(
      'signUnclear',
      'The log has currents of both signs and its voltage does not tell which is discharging. Choose the sign.',
    );
  }
  return { ok: true, sign: score > 0 ? sign : sign === 1 ? -1 : 1, idleA, warnings };
}

const difference = (one: number | null, other: number | null, scale: number | null = 1): number =>
  one === null || other === null || !scale ? 0 : (one - other) / scale;

/** The 98 % quantile of the size of the current, of at most some 10,000 rows. */
const usualLargest = (currentA: Float64Array): number => {
  const stride = Math.max(1, Math.floor(currentA.length / 10_000));
  const sizes: number[] = [];
  for (let index = 0; index < currentA.length; index += stride) sizes.push(Math.abs(currentA[index] ?? 0));
  return sizes.sort((one, other) => one - other)[Math.floor((sizes.length - 1) * 0.98)] ?? 0;
};

const sideOf = (
  { timeS, currentA, voltageV, lowestCellV }: LogSamples,
  sign: 1 | -1,
  idleA: number,
): Side => {
  const volts = voltageV ?? lowestCellV;
  const side: Side = { chargeAh: 0, change: null, meanV: null };
  let largest = 0;
  let run = { chargeAh: 0, first: NaN, last: NaN };
  let sum = 0;
  let count = 0;
  for (let index = 0; index < currentA.length; index += 1) {
    const amps = sign * (currentA[index] ?? 0);
    const next = sign * (currentA[index + 1] ?? NaN);
    const seconds = (timeS[index + 1] ?? NaN) - (timeS[index] ?? 0);
    const charge = seconds > 0 ? positivePart(amps, next, seconds) / 3600 : 0;
    side.chargeAh += charge;
    if (amps < -idleA) run = { chargeAh: 0, first: NaN, last: NaN };
    if (amps <= idleA) continue;
    const value = volts?.[index] ?? NaN;
    run.chargeAh += charge;
    if (Number.isNaN(value)) continue;
    sum += value;
    count += 1;
    if (Number.isNaN(run.first)) run.first = value;
    run.last = value;
    if (run.chargeAh > largest) {
      largest = run.chargeAh;
      side.change = (run.last - run.first) / run.first;
    }
  }
  if (count > 0) side.meanV = sum / count;
  return side;
};
