import { type Moment, simulateDischarge } from '../../../data/demo/logs/simulateDischarge';
import { createDraws } from '../../../data/demo/random';
import type { LogResult } from '../../../lib/contract/uploads';
import { curveOf, likenessOf, type LogCurve } from '../../../server/moderation/curveLikeness';
import { sameCurve } from '../../../server/moderation/rules/sameCurve';
import type { ScreenContext } from '../../../server/moderation/screenTypes';

interface Counts {
  name: string;
  tried: number;
  doubtful: number;
  look: number;
}

const banks = 30;
const series = 16;
const seriesRows = 600;

type Change = (moments: readonly Moment[]) => Moment[];

const stepped = (value: number, step: number) => Math.round(value / step) * step;
const rounded = (moment: Moment, volts: number, amps: number, kelvins: number): Moment => ({
  ...moment,
  voltageV: stepped(moment.voltageV, volts),
  currentA: stepped(moment.currentA, amps),
  temperatureC: stepped(moment.temperatureC, kelvins),
});

/** What is done to a log so that its bytes are new. */
const changes: Record<string, Change> = {
  'rounded to 0.01 V, 0.1 A, 0.1 °C': (moments) => moments.map((moment) => rounded(moment, 0.01, 0.1, 0.1)),
  'rounded to 0.1 V, 0.5 A, 1 °C': (moments) => moments.map((moment) => rounded(moment, 0.1, 0.5, 1)),
  'thinned to a row a minute': (moments) => moments.filter((_, i) => i % 60 === 7),
  'current scaled by 1.1': (moments) =>
    moments.map((moment) => ({ ...moment, currentA: moment.currentA * 1.1 })),
  'day moved, first rows cut': (moments) =>
    moments.slice(500).map((moment) => ({ ...moment, timeS: moment.timeS + 86_400 })),
};

/** Screens logs that were copied in some way, and the same banks' logs of another year, against the first. */
export function screenCopies(seed: number): Counts[] {
  const tests = Array.from(
    { length: banks },
    (_, bank) => [simulate(seed, bank, 0), simulate(seed, bank, 1)] as const,
  );
  const count = (name: string, pairs: [LogCurve | null, LogCurve | null][]): Counts => {
    const severities = pairs.map(([one, other]) => severityOf(one, other));
    const of = (wanted: string) => severities.filter((severity) => severity === wanted).length;
    return { name, tried: pairs.length, doubtful: of('doubtful'), look: of('look') };
  };
  return [
    ...Object.entries(changes).map(([name, change]) =>
      count(
        `copy, ${name}`,
        tests.map(([first]) => [curveFrom(first), curveFrom(change(first))]),
      ),
    ),
    count(
      'honest, the same bank a year later',
      tests.map(([first, later]) => [curveFrom(first), curveFrom(later)]),
    ),
    count(
      'honest, another bank of the same make-up',
      tests.map(([first], i) => [curveFrom(first), curveFrom(tests[(i + 1) % banks]![0])]),
    ),
  ];
}

function simulate(seed: number, bank: number, year: number): Moment[] {
  const draws = createDraws(seed, 92, bank, year);
  const steady = createDraws(seed, 93, bank);
  // One maker's cells under the same load, so that the banks are as alike as can be.
  const { moments } = simulateDischarge({
    ...{ startsAt: '2026-11-07T07:00:00Z', series, ratedAh: 280, chargeV: 3.5, cutOffCellV: 2.6 },
    ...{ dischargeIt: 0.2, swingFraction: 0.02, seed: seed + 100 * bank + year },
    capacityAh: 280 * (steady.uniform(0.93, 0.97) - 0.008 * year + draws.normal(0, 0.002)),
    roomC: 21 + steady.normal(0, 1) + draws.normal(0, 1),
  });
  return moments.map((moment) => ({
    ...moment,
    voltageV: moment.voltageV * (1 + draws.normal(0, 0.0002)),
    currentA: moment.currentA * (1 + draws.normal(0, 0.001)),
  }));
}

/** The stored series of a log, its discharge as the window. */
function curveFrom(moments: readonly Moment[]): LogCurve | null {
  const loaded = moments.filter(({ currentA }) => currentA > 0);
  const [first, last] = [loaded[0]!, loaded[loaded.length - 1]!];
  const step = Math.max(1, Math.floor(moments.length / seriesRows));
  const kept = moments.filter((_, i) => i % step === 0);
  return curveOf({
    durationS: last.timeS - first.timeS,
    ...{ windowStartS: first.timeS, windowEndS: last.timeS },
    series: {
      timeS: kept.map(({ timeS }) => timeS),
      voltageV: kept.map(({ voltageV }) => voltageV),
      currentA: kept.map(({ currentA }) => currentA),
      temperatureC: kept.map(({ temperatureC }) => temperatureC),
    },
  } as LogResult);
}

function severityOf(one: LogCurve | null, other: LogCurve | null): string | undefined {
  const likeness = one && other && likenessOf(one, other);
  if (!likeness) return undefined;
  return sameCurve({ log: {}, nearestLog: likeness, sameLogCheckIds: [] } as unknown as ScreenContext)
    ?.severity;
}
