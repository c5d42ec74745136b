import type { LogSeries } from './logTypes';
import type { Trace } from './integrateSpan';

/** Four points a bucket and the two ends make 598. */
const buckets = 149;

/**
 * Thins a trace for drawing to at most 600 points. Each of 149 equal spans of time keeps the rows of its lowest and
 * highest voltage and current; the first and the last row stay.
 */
export function thinSeries({ timeS, currentA, samples }: Trace): LogSeries {
  const { voltageV, temperatureC } = samples;
  const last = timeS.length - 1;
  const kept = new Set<number>([0, last]);
  const spanS = (timeS[last] ?? 0) / buckets || 1;
  let index = 0;
  for (let bucket = 1; bucket <= buckets; bucket += 1) {
    const isLastBucket = bucket === buckets;
    const from = index;
    while (index <= last && (isLastBucket || (timeS[index] ?? 0) < bucket * spanS)) index += 1;
    if (index === from) continue;
    for (const channel of [currentA, voltageV]) {
      if (!channel) continue;
      let [lowest, highest] = [from, from];
      for (let at = from; at < index; at += 1) {
        const value = channel[at] ?? NaN;
        if (value < (channel[lowest] ?? NaN) || Number.isNaN(channel[lowest])) lowest = at;
        if (value > (channel[highest] ?? NaN) || Number.isNaN(channel[highest])) highest = at;
      }
      kept.add(lowest).add(highest);
    }
  }
  const rows = [...kept].sort((one, other) => one - other);
  const orNull = (channel: Float64Array | null) =>
    rows.map((row) => {
      const value = channel?.[row] ?? NaN;
      return Number.isNaN(value) ? null : value;
    });
  return {
    timeS: rows.map((row) => timeS[row] ?? 0),
    voltageV: orNull(voltageV),
    currentA: rows.map((row) => currentA[row] ?? 0),
    temperatureC: orNull(temperatureC),
  };
}
