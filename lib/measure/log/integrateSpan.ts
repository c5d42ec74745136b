import type { LogSamples } from './logTypes';

/** Readings oriented so that discharging is positive, in true order, seconds from the first stamp. */
export interface Trace {
  timeS: Float64Array;
  currentA: Float64Array;
  /** Power while discharging, W; null without voltage and power. */
  powerW: Float64Array | null;
  samples: LogSamples;
  /** Usual time between rows, s. */
  stepS: number;
  /** A current below this counts as none, A. */
  idleA: number;
}

/** A stretch without rows. */
export interface Gap {
  startS: number;
  lengthS: number;
  /** Charge the trapezoid counts across it, Ah. */
  chargeAh: number;
  energyWh: number;
  loadS: number;
  currentBeforeA: number;
  currentAfterA: number;
  atRow: number;
}

/** What a span of a trace amounts to. Charge is net: discharged minus charged. */
export interface SpanSums {
  chargeAh: number;
  /** Discharged and charged parts of it, both positive. */
  dischargedAh: number;
  chargedAh: number;
  energyWh: number | null;
  /** Time under load, s. */
  dischargingS: number;
  /** Rows inside the span. */
  rows: number;
  gaps: Gap[];
}

/** A step between rows over this many usual ones is a gap, if it is also over a minute or holds much charge. */
const gapSteps = 1.5;
const gapLengthS = 60;
/** A shorter gap counts when it holds more than this share of the charge. */
export const gapChargeShare = 0.01;

/** Part above zero of the trapezoid over one step, in value x seconds. */
export const positivePart = (from: number, to: number, seconds: number): number => {
  if (from >= 0 && to >= 0) return ((from + to) / 2) * seconds;
  if (from <= 0 && to <= 0) return 0;
  const high = Math.max(from, to);
  // The straight line crosses zero within the step.
  return ((high / 2) * high * seconds) / (high - Math.min(from, to));
};

/** Index of the last row at or before a time, at least 0. */
export const indexAt = (timeS: Float64Array, atS: number): number => {
  let low = 0;
  let high = timeS.length - 1;
  while (low < high) {
    const middle = Math.ceil((low + high) / 2);
    if ((timeS[middle] ?? 0) <= atS) low = middle;
    else high = middle - 1;
  }
  return low;
};

/**
 * Integrates a trace from one time to another by the trapezoid rule on the true stamps; readings at the ends of the
 * span are interpolated, so that adjoining spans add up. Energy is the trapezoid of the products of the readings.
 * @param leaveOutGaps count no charge, energy or load across gaps
 */
export function integrateSpan(trace: Trace, startS: number, endS: number, leaveOutGaps = false): SpanSums {
  const { timeS, currentA, powerW, idleA, stepS, samples } = trace;
  const sums: SpanSums = {
    chargeAh: 0,
    dischargedAh: 0,
    chargedAh: 0,
    energyWh: powerW ? 0 : null,
    dischargingS: 0,
    rows: 0,
    gaps: [],
  };
  const last = timeS.length - 1;
  const first = indexAt(timeS, startS);
  // Rows that share the first stamp belong to the span as well.
  let index = first;
  while (index > 0 && timeS[index - 1] === timeS[index] && (timeS[index] ?? 0) >= startS) index -= 1;
  for (; index <= last && (timeS[index] ?? 0) <= endS; index += 1) {
    const rowS = timeS[index] ?? 0;
    if (rowS >= startS) sums.rows += 1;
    if (index === last) break;
    const nextS = timeS[index + 1] ?? 0;
    const wholeS = nextS - rowS;
    const [fromS, toS] = [Math.max(rowS, startS), Math.min(nextS, endS)];
    const seconds = toS - fromS;
    if (wholeS <= 0 || seconds <= 0) continue;
    const [shareFrom, shareTo] = [(fromS - rowS) / wholeS, (toS - rowS) / wholeS];
    const [a, b] = [currentA[index] ?? 0, currentA[index + 1] ?? 0];
    const [from, to] = [a + (b - a) * shareFrom, a + (b - a) * shareTo];
    const discharged = positivePart(from, to, seconds) / 3600;
    const charged = positivePart(-from, -to, seconds) / 3600;
    const [p, q] = [powerW?.[index] ?? 0, powerW?.[index + 1] ?? 0];
    const energyWh = ((p + (q - p) * shareFrom + p + (q - p) * shareTo) / 2) * (seconds / 3600);
    const loadS = (from + to) / 2 > idleA ? seconds : 0;
    // The charge so far is less than the whole, so this keeps all that the last filter may keep.
    const mayMatter = wholeS > gapLengthS || discharged > gapChargeShare * sums.chargeAh;
    if (mayMatter && wholeS > gapSteps * stepS && (a > idleA || b > idleA)) {
      const atRow = samples.row[index + 1] ?? 0;
      const gap = { startS: fromS, lengthS: seconds, chargeAh: discharged, energyWh, loadS, atRow };
      sums.gaps.push({ ...gap, currentBeforeA: from, currentAfterA: to });
    }
    sums.chargeAh += ((from + to) / 2) * (seconds / 3600);
    sums.dischargedAh += discharged;
    sums.chargedAh += charged;
    sums.dischargingS += loadS;
    if (sums.energyWh !== null) sums.energyWh += energyWh;
  }
  sums.gaps = sums.gaps.filter(
    (gap) => gap.lengthS > gapLengthS || gap.chargeAh > gapChargeShare * sums.chargeAh,
  );
  return leaveOutGaps ? withoutGaps(sums) : sums;
}

const withoutGaps = (sums: SpanSums): SpanSums => {
  const total = (part: 'chargeAh' | 'energyWh' | 'loadS') =>
    sums.gaps.reduce((sum, gap) => sum + gap[part], 0);
  return {
    ...sums,
    chargeAh: sums.chargeAh - total('chargeAh'),
    dischargedAh: sums.dischargedAh - total('chargeAh'),
    energyWh: sums.energyWh === null ? null : sums.energyWh - total('energyWh'),
    dischargingS: sums.dischargingS - total('loadS'),
  };
};

/** Time-weighted mean of a channel over a span, missing values left out; null where there are none. */
export function meanOver(
  timeS: Float64Array,
  channel: Float64Array | null,
  startS: number,
  endS: number,
): number | null {
  if (!channel) return null;
  let area = 0;
  let total = 0;
  let plain: number | null = null;
  for (let index = indexAt(timeS, startS); index < timeS.length && (timeS[index] ?? 0) <= endS; index += 1) {
    const value = channel[index] ?? NaN;
    if (Number.isNaN(value)) continue;
    plain ??= value;
    const next = channel[index + 1] ?? NaN;
    const [rowS, nextS] = [timeS[index] ?? 0, timeS[index + 1] ?? NaN];
    const [fromS, toS] = [Math.max(rowS, startS), Math.min(nextS, endS)];
    if (Number.isNaN(next) || !(toS > fromS)) continue;
    const middle = value + ((next - value) * ((fromS + toS) / 2 - rowS)) / (nextS - rowS);
    area += middle * (toS - fromS);
    total += toS - fromS;
  }
  return total > 0 ? area / total : plain;
}

/** The value of a channel at a row, or the nearest one within `reach` rows; null where there is none. */
export function valueNear(channel: Float64Array | null, index: number, reach = 200): number | null {
  if (!channel) return null;
  for (let away = 0; away <= reach; away += 1) {
    for (const at of [index - away, index + away]) {
      const value = channel[at];
      if (value !== undefined && !Number.isNaN(value)) return value;
    }
  }
  return null;
}
