import type { LogResult } from '@/lib/contract/uploads';

import type { CurveLikeness } from './screenTypes';

/** A log's discharge on a grid of equal steps of time, as stored to be compared. */
export interface LogCurve {
  durationS: number;
  /** Over its mean; null where the log has no voltage. */
  voltage: number[] | null;
  /** Over its mean. */
  current: number[];
  /** °C, or null. */
  temperatureC: number[] | null;
}

const points = 96;
/** Part of the discharge that is compared: its first and last minutes turn on where the window begins and ends. */
const compared = { from: 0.05, to: 0.93 };
/** Width of the running mean that is taken out before details are compared. */
const smoothing = 9;
const digits = 5;

/** The curve of a log, over the discharge that was counted. Null where the stored series is too short. */
export function curveOf({ series, windowStartS, windowEndS, durationS }: LogResult): LogCurve | null {
  const inside = series.timeS.filter((time) => time >= windowStartS && time <= windowEndS).length;
  if (inside < points / 4) return null;
  const step = (compared.to - compared.from) / (points - 1);
  const grid = Array.from(
    { length: points },
    (_, i) => windowStartS + (windowEndS - windowStartS) * (compared.from + step * i),
  );
  const current = resample(series.timeS, series.currentA, grid);
  if (!current) return null;
  const voltage = resample(series.timeS, series.voltageV, grid);
  return {
    durationS,
    current: overMean(current),
    voltage: voltage && overMean(voltage),
    temperatureC:
      resample(series.timeS, series.temperatureC, grid)?.map((value) => Number(value.toFixed(2))) ?? null,
  };
}

/** How two curves compare; null where one of them has no voltage. Scaled copies compare as equal. */
export function likenessOf(one: LogCurve, other: LogCurve): CurveLikeness | null {
  if (!one.voltage || !other.voltage) return null;
  const hasTemperature = one.temperatureC && other.temperatureC;
  return {
    voltageFraction: rms(one.voltage, other.voltage),
    currentFraction: rms(one.current, other.current),
    temperatureK: hasTemperature ? rms(one.temperatureC!, other.temperatureC!) : null,
    durationFraction: Math.abs(one.durationS - other.durationS) / Math.max(one.durationS, other.durationS),
    detailCorrelation: correlation(detailOf(one.voltage), detailOf(other.voltage)),
  };
}

/** Straight between the samples that have a value; null where fewer than a quarter of the grid has any near. */
function resample(
  times: readonly number[],
  values: readonly (number | null)[],
  grid: readonly number[],
): number[] | null {
  const known = times.flatMap((time, i) =>
    typeof values[i] === 'number' ? [[time, values[i]] as const] : [],
  );
  if (known.length < points / 4) return null;
  let place = 0;
  return grid.map((time) => {
    while (place < known.length - 2 && known[place + 1]![0] < time) place += 1;
    const [fromTime, from] = known[place]!;
    const [toTime, to] = known[place + 1]!;
    const share = toTime > fromTime ? Math.min(1, Math.max(0, (time - fromTime) / (toTime - fromTime))) : 0;
    return from + share * (to - from);
  });
}

function overMean(values: readonly number[]): number[] {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  return values.map((value) => (mean === 0 ? 0 : Number((value / mean).toFixed(digits))));
}

const rms = (one: readonly number[], other: readonly number[]) =>
  Math.sqrt(one.reduce((sum, value, i) => sum + (value - other[i]!) ** 2, 0) / one.length);

/** What is left of a curve after its running mean. */
function detailOf(values: readonly number[]): number[] {
  const half = (smoothing - 1) / 2;
  return values.map((value, i) => {
    const near = values.slice(Math.max(0, i - half), i + half + 1);
    return value - near.reduce((sum, one) => sum + one, 0) / near.length;
  });
}

function correlation(one: readonly number[], other: readonly number[]): number {
  const dot = (a: readonly number[], b: readonly number[]) =>
    a.reduce((sum, value, i) => sum + value * b[i]!, 0);
  const scale = Math.sqrt(dot(one, one) * dot(other, other));
  return scale === 0 ? 0 : dot(one, other) / scale;
}
