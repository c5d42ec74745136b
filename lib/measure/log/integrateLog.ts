import { formatCount, formatDuration, formatPercent, formatQuantity } from '@/lib/units';

import { findDischarge } from './findDischarge';
import type { DischargeWindow } from './findDischarge';
import { gapChargeShare, indexAt, integrateSpan, meanOver, valueNear } from './integrateSpan';
import type { Gap, SpanSums, Trace } from './integrateSpan';
import { logFailure } from './logTypes';
import type { LogFailure, LogMapping, LogResult, LogSamples, LogWarning } from './logTypes';
import { orderStamps } from './orderStamps';
import { orientCurrent } from './orientCurrent';
import { thinSeries } from './thinSeries';
import { isDated } from './timeStamp';

export type IntegrateLogOptions = Pick<LogMapping, 'window' | 'dischargeSign' | 'gaps'>;

/**
 * Calculation 1: turns the readings of a log into the capacity, energy, mean current, temperatures and voltages of its
 * discharge, by the trapezoid rule on the true time stamps.
 */
export function integrateLog(samples: LogSamples, options: IntegrateLogOptions = {}): LogResult | LogFailure {
  const ordered = orderStamps(samples);
  const oriented = orientCurrent(ordered.samples, options.dischargeSign ?? 'auto');
  if (!oriented.ok) return oriented;
  const warnings = [...samples.warnings, ...ordered.warnings, ...oriented.warnings];
  const trace = traceOf(ordered.samples, oriented.sign, oriented.idleA, ordered.stepS, warnings);
  const found = options.window ? windowByHand(trace, options.window) : findDischarge(trace);
  if (!found) return logFailure('noDischarge', 'No discharge was found in the log.');
  if ('ok' in found) return found;
  const sums = integrateSpan(trace, found.startS, found.endS, options.gaps === 'leaveOut');
  if (!(sums.chargeAh > 0) || !(sums.dischargingS > 0)) {
    return logFailure('noDischarge', 'No charge was taken out in that part of the log.');
  }
  warnings.push(...windowWarnings(trace, found, sums, options.window != null));
  const gaps = gapFigures(sums, options.gaps === 'leaveOut');
  warnings.push(...gapWarnings(sums, trace.stepS, options.gaps === 'leaveOut'));
  const { timeS } = trace;
  const { temperatureC, voltageV, lowestCellV, highestCellV } = trace.samples;
  const startIndex = indexAt(timeS, found.startS);
  const full = fullIndex(trace, found.firstIndex);
  const endIndex = found.lastIndex;
  warnings.push(...counterWarning(trace, startIndex, indexAt(timeS, found.endS), sums.chargeAh));
  return {
    ok: true,
    capacityAh: sums.chargeAh,
    energyWh: sums.energyWh,
    meanCurrentA: (sums.chargeAh * 3600) / sums.dischargingS,
    meanTemperatureC: meanOver(timeS, temperatureC, found.startS, found.endS),
    startTemperatureC: valueNear(temperatureC, startIndex),
    endTemperatureC: valueNear(temperatureC, endIndex),
    startVoltageV: valueNear(voltageV, startIndex),
    endVoltageV: valueNear(voltageV, endIndex),
    lowestCellAtStartV: valueNear(lowestCellV, startIndex),
    highestCellAtStartV: valueNear(highestCellV, startIndex),
    lowestCellAtFullV: full === undefined ? null : valueNear(lowestCellV, full),
    highestCellAtFullV: full === undefined ? null : valueNear(highestCellV, full),
    lowestCellAtEndV: valueNear(lowestCellV, endIndex),
    highestCellAtEndV: valueNear(highestCellV, endIndex),
    durationS: found.endS - found.startS,
    dischargingS: sums.dischargingS,
    windowStartS: found.startS,
    windowEndS: found.endS,
    firstStamp: firstStampOf(samples, ordered.originS),
    rowsRead: samples.rowsRead,
    rowsUsed: sums.rows,
    rowsSkipped: samples.rowsSkipped,
    legs: found.legs,
    ...gaps,
    warnings,
    series: thinSeries(trace),
  };
}

const traceOf = (
  samples: LogSamples,
  sign: 1 | -1,
  idleA: number,
  stepS: number,
  warnings: LogWarning[],
): Trace => {
  const currentA = sign === 1 ? samples.currentA : samples.currentA.map((amps) => -amps);
  const trace = { timeS: samples.timeS, currentA, samples, stepS, idleA };
  if (samples.voltageV) {
    const { values, missing } = filled(samples.voltageV);
    if (missing > 0) {
      warnings.push({
        code: 'voltageMissing',
        text: `${formatCount(missing)} rows have no voltage; the one before was used for the energy.`,
        count: missing,
      });
    }
    return { ...trace, powerW: currentA.map((amps, index) => amps * (values[index] ?? NaN)) };
  }
  if (!samples.powerW) return { ...trace, powerW: null };
  warnings.push({
    code: 'energyFromPower',
    text: 'Without a voltage column the energy was taken from the power.',
  });
  const { values } = filled(samples.powerW);
  // A meter may give power without a sign.
  return {
    ...trace,
    powerW: values.map((watts, index) => Math.abs(watts) * Math.sign(currentA[index] ?? 0)),
  };
};

/** Values carried forward over missing ones (backward at the start), and how many were missing. */
const filled = (channel: Float64Array): { values: Float64Array; missing: number } => {
  let last = channel.find((value) => !Number.isNaN(value)) ?? 0;
  let missing = 0;
  const values = channel.map((value) => {
    if (Number.isNaN(value)) missing += 1;
    else last = value;
    return last;
  });
  return { values, missing };
};

/** Last row before the load that still charges: where the cells were full. Undefined where the log begins later. */
const fullIndex = ({ currentA, idleA }: Trace, firstIndex: number): number | undefined => {
  for (let index = firstIndex - 1; index >= 0; index -= 1) {
    const amps = currentA[index] ?? 0;
    if (amps > idleA) return undefined;
    if (amps < -idleA) return index;
  }
  return undefined;
};

const windowByHand = (
  trace: Trace,
  window: { startS: number; endS: number },
): DischargeWindow | LogFailure => {
  const lastS = trace.timeS.at(-1) ?? 0;
  const [startS, endS] = [Math.max(0, window.startS), Math.min(lastS, window.endS)];
  if (!(endS > startS)) {
    return logFailure(
      'badWindow',
      `Choose a part between 0 and ${formatQuantity(lastS, 's', { decimals: 0 })}.`,
    );
  }
  const [firstIndex, lastIndex] = [indexAt(trace.timeS, startS), lastUnderLoad(trace, startS, endS)];
  return { startS, endS, firstIndex, lastIndex, legs: 1, longestPauseS: 0, chargedOutsideAh: 0, others: 0 };
};

const lastUnderLoad = ({ timeS, currentA, idleA }: Trace, startS: number, endS: number): number => {
  const last = indexAt(timeS, endS);
  for (let index = last; index >= 0 && (timeS[index] ?? 0) >= startS; index -= 1) {
    if ((currentA[index] ?? 0) > idleA) return index;
  }
  return last;
};

const ah = (value: number) => formatQuantity(value, 'Ah', { significant: 3 });

const windowWarnings = (
  trace: Trace,
  found: DischargeWindow,
  sums: SpanSums,
  isByHand: boolean,
): LogWarning[] => {
  const rowAt = (index: number) => trace.samples.row[index] ?? 0;
  const warnings: LogWarning[] = [];
  const add = (code: string, text: string, more: Partial<LogWarning> = {}) =>
    warnings.push({ code, text, ...more });
  if (found.legs > 1) {
    const pause = formatDuration(found.longestPauseS);
    add(
      'legsJoined',
      `The discharge has ${found.legs} legs; they were joined. The longest pause lasts ${pause}.`,
      {
        count: found.legs,
      },
    );
  }
  if (found.chargedOutsideAh > 0.01 * sums.chargeAh) {
    add(
      'chargeLeftOut',
      `Charging before or after the discharge was left out: ${ah(found.chargedOutsideAh)}.`,
    );
  }
  if (found.others > 0) {
    const text = 'The log holds further discharges of similar size; the one with most charge was taken.';
    add('severalDischarges', text, { count: found.others });
  }
  if (sums.chargedAh > 0.001 * sums.chargeAh) {
    add('chargeInside', `${ah(sums.chargedAh)} were charged in between and are taken off.`);
  }
  if (!isByHand && found.firstIndex === 0) {
    add('startsUnderLoad', 'The log begins under load; what was taken out before is not counted.', {
      atRow: rowAt(0),
    });
  }
  if (!isByHand && found.lastIndex === trace.timeS.length - 1) {
    add('endsUnderLoad', 'The log ends under load; what was taken out after is not counted.', {
      atRow: rowAt(found.lastIndex),
    });
  }
  return warnings;
};

/**
 * What a gap's charge may be off by: the current may have stepped from one end's reading to the other's at any time
 * within it, and may have wandered by a tenth besides (judgement); a rectangular distribution, JCGM 100:2008, 4.3.7.
 */
const gapSdAh = ({ chargeAh, currentBeforeA, currentAfterA, lengthS }: Gap): number =>
  ((Math.abs(currentBeforeA - currentAfterA) / 2) * (lengthS / 3600) + 0.1 * chargeAh) / Math.sqrt(3);

const gapFigures = ({ gaps, chargeAh }: SpanSums, isLeftOut: boolean) => {
  let [counted, largest, variance] = [0, 0, 0];
  for (const gap of gaps) {
    // What is left out may be missing whole.
    variance += isLeftOut ? gap.chargeAh ** 2 / 3 : gapSdAh(gap) ** 2;
    if (isLeftOut) continue;
    counted += gap.chargeAh;
    largest = Math.max(largest, gap.chargeAh);
  }
  return {
    gapChargeFraction: counted / chargeAh,
    largestGapFraction: largest / chargeAh,
    gapRelSd: Math.sqrt(variance) / chargeAh,
  };
};

const gapWarnings = (sums: SpanSums, stepS: number, isLeftOut: boolean): LogWarning[] => {
  const warnings: LogWarning[] = [];
  if (stepS > 60) {
    warnings.push({
      code: 'coarse',
      text: `The log has one row every ${formatDuration(stepS)}; short loads may be missed.`,
    });
  }
  const longest = sums.gaps.reduce<Gap | undefined>(
    (one, gap) => (one && one.lengthS >= gap.lengthS ? one : gap),
    undefined,
  );
  if (!longest) return warnings;
  const held = sums.gaps.reduce((total, gap) => total + gap.chargeAh, 0);
  const share = formatPercent(held / (sums.chargeAh + (isLeftOut ? held : 0)), 1);
  const asked = held > gapChargeShare * sums.chargeAh && !isLeftOut;
  warnings.push({
    code: asked ? 'gapHoldsCharge' : 'gap',
    text:
      `${sums.gaps.length === 1 ? 'One gap' : `${formatCount(sums.gaps.length)} gaps`} without rows, the longest of ` +
      `${formatDuration(longest.lengthS)}, ${isLeftOut ? 'left out' : `counted as ${ah(held)} (${share})`}.` +
      (asked ? ' If the load was off in between, leave the gaps out.' : ''),
    count: sums.gaps.length,
    atRow: longest.atRow,
  });
  return warnings;
};

const counterWarning = (trace: Trace, start: number, end: number, chargeAh: number): LogWarning[] => {
  const [from, to] = [valueNear(trace.samples.counterAh, start), valueNear(trace.samples.counterAh, end)];
  if (from === null || to === null) return [];
  const counted = Math.abs(to - from);
  if (Math.abs(counted - chargeAh) <= 0.02 * chargeAh) return [];
  const text = `The log's own counter says ${ah(counted)}, its currents add up to ${ah(chargeAh)}.`;
  return [{ code: 'counterDiffers', text }];
};

const firstStampOf = (samples: LogSamples, originS: number): string | null => {
  if (!isDated(samples.timeFormat)) return null;
  const date = new Date(originS * 1000);
  return Number.isNaN(date.getTime()) ? null : date.toISOString();
};
