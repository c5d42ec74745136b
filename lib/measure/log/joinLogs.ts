import { formatCount, formatDuration } from '@/lib/units';

import { logFailure, timeFormatLabels } from './logTypes';
import type { LogFailure, LogSamples, LogWarning } from './logTypes';
import { type OrderedSamples, orderStamps } from './orderStamps';
import { isDated } from './timeStamp';

/** One of the files that a recorder split a log into, as it was read. */
export interface LogFile {
  name: string;
  samples: LogSamples;
}

interface Part extends OrderedSamples {
  name: string;
}

/** What a log may lack. */
type Channel = 'voltageV' | 'powerW' | 'temperatureC' | 'lowestCellV' | 'highestCellV' | 'counterAh';

/** Apart by more than this (and by three rows) is said. */
const longestSilentGapS = 60;

/**
 * Makes one log of several files, in the order of their stamps. Where files overlap the rows of the earlier one stand;
 * overlaps and the time between files are said. Counts of seconds that start again in each file can't be put in order,
 * which is an expected failure, as are files that write their times in different ways.
 * @throws RangeError without a file
 */
export function joinLogs(files: readonly LogFile[]): LogSamples | LogFailure {
  const [first] = files;
  if (!first) throw new RangeError('joinLogs requires at least one file');
  if (files.length === 1) return first.samples;
  const other = files.find(({ samples }) => samples.timeFormat !== first.samples.timeFormat);
  if (other) {
    const [one, two] = [first, other].map(({ samples }) => timeFormatLabels[samples.timeFormat]);
    return logFailure(
      'filesDiffer',
      `The files write their times differently (${first.name}: ${one}; ${other.name}: ${two}). Upload them one by one.`,
    );
  }
  const parts = files
    .map(({ name, samples }): Part => ({ name, ...orderStamps(samples) }))
    .sort((one, two) => one.originS - two.originS);
  if (!isDated(first.samples.timeFormat) && parts.some((part, index) => startsBefore(parts[index - 1], part)))
    return logFailure(
      'filesUnordered',
      'The files have no dates, and each starts its times anew, so that their order can not be told. Join them in one file, or upload the one with the discharge.',
    );
  return first.samples.timeFormat === 'clock' ? joined(roundTheClock(parts), [byClock]) : joined(parts, []);
}

const daySeconds = 86_400;
const byClock: LogWarning = {
  code: 'filesByClock',
  text: 'The files have no dates; they were put in order by the time of day, beginning after the longest pause.',
};

/** Files that lie on both sides of midnight: the longest pause is the one before the first of them. */
function roundTheClock(parts: readonly Part[]): Part[] {
  const pauses = parts.map((part, index) => {
    const before = parts[index - 1];
    return before ? part.originS - endOf(before) : part.originS + daySeconds - endOf(parts.at(-1)!);
  });
  const start = pauses.indexOf(Math.max(...pauses));
  const nextDay = parts.slice(0, start).map((part) => ({ ...part, originS: part.originS + daySeconds }));
  return [...parts.slice(start), ...nextDay];
}

const endOf = ({ originS, samples }: Part) => originS + (samples.timeS.at(-1) ?? 0);
const startsBefore = (before: Part | undefined, part: Part) =>
  before !== undefined && part.originS < endOf(before);

function joined(parts: readonly Part[], remarks: readonly LogWarning[]): LogSamples {
  const ofFiles = parts.flatMap(({ name, samples, warnings: ordering }) =>
    [...samples.warnings, ...ordering].map((warning) => ({ ...warning, text: `${name}: ${warning.text}` })),
  );
  const warnings: LogWarning[] = [...remarks, ...ofFiles];
  const kept: { part: Part; from: number }[] = [];
  let highS = -Infinity;
  let earlier = '';
  for (const part of parts) {
    const { timeS } = part.samples;
    const found = timeS.findIndex((seconds) => part.originS + seconds > highS);
    const from = found < 0 ? timeS.length : found;
    if (earlier !== '') warnings.push(...seamWarnings(earlier, part, { highS, left: from }));
    kept.push({ part, from });
    if (from < timeS.length) earlier = part.name;
    highS = Math.max(highS, endOf(part));
  }
  const rows = kept.reduce((sum, { part, from }) => sum + part.samples.timeS.length - from, 0);
  const collect = (pick: (part: Part, index: number) => number): Float64Array => {
    const all = new Float64Array(rows);
    let at = 0;
    for (const { part, from } of kept)
      for (let index = from; index < part.samples.timeS.length; index += 1) all[at++] = pick(part, index);
    return all;
  };
  const channel = (name: Channel) =>
    parts.some(({ samples }) => samples[name] !== null)
      ? collect(({ samples }, index) => samples[name]?.[index] ?? NaN)
      : null;
  const total = (name: 'rowsRead' | 'rowsSkipped') =>
    parts.reduce((sum, { samples }) => sum + samples[name], 0);
  const [voltageV, powerW, temperatureC] = [channel('voltageV'), channel('powerW'), channel('temperatureC')];
  return {
    ok: true,
    timeS: collect(({ originS, samples }, index) => originS + (samples.timeS[index] ?? NaN)),
    currentA: collect(({ samples }, index) => samples.currentA[index] ?? NaN),
    ...{ voltageV, powerW, temperatureC },
    lowestCellV: channel('lowestCellV'),
    highestCellV: channel('highestCellV'),
    counterAh: channel('counterAh'),
    row: Int32Array.from(collect(({ samples }, index) => samples.row[index] ?? 0)),
    timeFormat: parts[0]!.samples.timeFormat,
    rowsRead: total('rowsRead'),
    rowsSkipped: total('rowsSkipped'),
    warnings,
  };
}

/** What is to be said where one file ends and the next begins. */
function seamWarnings(
  earlier: string,
  { name, originS, stepS, samples }: Part,
  { highS, left }: { highS: number; left: number },
): LogWarning[] {
  if (left === samples.timeS.length)
    return [
      {
        code: 'filesOverlap',
        text: `${name} lies wholly within the time of ${earlier} and was left out.`,
        count: left,
      },
    ];
  if (left > 0)
    return [
      {
        code: 'filesOverlap',
        text: `${earlier} and ${name} overlap by ${formatDuration(highS - originS)}; ${formatCount(left)} rows of the later one were left out.`,
        count: left,
      },
    ];
  const apartS = originS - highS;
  if (apartS <= Math.max(longestSilentGapS, 3 * stepS)) return [];
  return [
    {
      code: 'filesApart',
      text: `Between ${earlier} and ${name} lie ${formatDuration(apartS)} without rows.`,
    },
  ];
}
