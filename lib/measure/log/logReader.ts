import { formatCount } from '@/lib/units';

import { logFailure } from './logTypes';
import type { LogFailure, LogMapping, LogQuantity, LogSamples, LogWarning } from './logTypes';
import { planMapping } from './mappingPlan';
import { createColumn } from './sampleStore';
import { splitFields } from './splitFields';

export interface LogReaderOptions {
  mapping: LogMapping;
  /** More rows of data than this are an expected failure. */
  maxRows?: number;
  /** Called with the rows read so far, every 20,000 rows. */
  onProgress?: (rowsRead: number) => void;
}

/** Takes a log as decoded text in pieces of any size; keeps numbers only. */
export interface LogReader {
  /** Reads a piece. Answers a failure as soon as the log cannot be used; later pieces are then ignored. */
  push(text: string): LogFailure | undefined;
  /** Reads what is left and answers the readings, or why there are none. */
  finish(): LogSamples | LogFailure;
}

const maxLineLength = 200_000;

/**
 * Makes a reader of a log whose columns are known. Rows without a time or a current are skipped and counted. A mapping
 * that cannot be followed (it comes from a person) is an expected failure of every call.
 */
export function createLogReader({ mapping, maxRows = 1_000_000, onProgress }: LogReaderOptions): LogReader {
  const plan = planMapping(mapping);
  if (!plan.ok) return { push: () => plan, finish: () => plan };
  const { parseStamp, columnsOf, lastIndex } = plan;
  const valueOf = (
    fields: string[],
    quantity: LogQuantity,
    combine: (values: number[]) => number,
  ): number => {
    const sources = columnsOf[quantity];
    if (sources.length === 1) return plan.number(fields, sources[0]!);
    const values = sources
      .map((source) => plan.number(fields, source))
      .filter((value) => !Number.isNaN(value));
    return values.length === 0 ? NaN : combine(values);
  };
  const has = (quantity: LogQuantity) => columnsOf[quantity].length > 0;
  const optional = (isThere: boolean) => (isThere ? createColumn() : null);

  const time = createColumn();
  const current = createColumn();
  const voltage = optional(has('voltage'));
  const power = optional(has('power'));
  const temperature = optional(has('temperature'));
  const lowest = optional(has('lowestCell') || has('cell'));
  const highest = optional(has('highestCell') || has('cell'));
  const counter = optional(has('counter'));
  const lineOf = createColumn();

  let rest = '';
  let lineEnd = '';
  let line = 0;
  const headerTexts = new Set<string>();
  let rowsRead = 0;
  let failure: LogFailure | undefined;
  const skipped = { time: 0, value: 0, first: 0 };
  const derivesCurrent = !has('current');

  const mean = (values: number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;

  const readLine = (text: string) => {
    line += 1;
    if (line - 1 <= mapping.headerLine) {
      if (line - 1 >= mapping.headerLine - 1) headerTexts.add(text);
      return;
    }
    // Loggers write their header again when they restart.
    if (text.trim() === '' || headerTexts.has(text)) return;
    rowsRead += 1;
    if (rowsRead > maxRows) {
      failure = logFailure('tooManyRows', `The log has more than ${formatCount(maxRows)} rows.`, {
        row: line,
      });
      return;
    }
    if (onProgress && rowsRead % 20_000 === 0) onProgress(rowsRead);
    const fields = splitFields(text, mapping.delimiter, lastIndex);
    const stamp = parseStamp(plan.stampOf(fields));
    const volts = has('voltage') ? valueOf(fields, 'voltage', mean) : NaN;
    const watts = has('power') ? valueOf(fields, 'power', mean) : NaN;
    const amps = derivesCurrent ? watts / volts : valueOf(fields, 'current', mean);
    if (!Number.isFinite(stamp) || !Number.isFinite(amps)) {
      if (Number.isFinite(stamp)) skipped.value += 1;
      else skipped.time += 1;
      skipped.first ||= line;
      return;
    }
    time.push(stamp);
    current.push(amps);
    voltage?.push(volts);
    power?.push(watts);
    temperature?.push(valueOf(fields, 'temperature', mean));
    lowest?.push(valueOf(fields, has('lowestCell') ? 'lowestCell' : 'cell', (values) => Math.min(...values)));
    highest?.push(
      valueOf(fields, has('highestCell') ? 'highestCell' : 'cell', (values) => Math.max(...values)),
    );
    counter?.push(valueOf(fields, 'counter', mean));
    lineOf.push(line);
  };

  const push = (piece: string): LogFailure | undefined => {
    if (failure) return failure;
    if (piece.includes('\u0000')) {
      failure = logFailure('binary', 'This file is not text. Send the log as CSV.', { row: line + 1 });
      return failure;
    }
    const text = rest === '' && line === 0 ? piece.replace(/^\ufeff/, '') : rest + piece;
    lineEnd ||= text.includes('\n') ? '\n' : /\r[^\n]/.test(text) ? '\r' : '';
    let from = 0;
    if (lineEnd !== '') {
      for (let end = text.indexOf(lineEnd); end >= 0 && !failure; end = text.indexOf(lineEnd, from)) {
        readLine(text.charCodeAt(end - 1) === 13 ? text.slice(from, end - 1) : text.slice(from, end));
        from = end + 1;
      }
    }
    rest = text.slice(from);
    if (rest.length > maxLineLength)
      failure ??= logFailure('lineTooLong', 'A line of the log never ends.', { row: line + 1 });
    return failure;
  };

  const finish = (): LogSamples | LogFailure => {
    const warnings: LogWarning[] = [];
    const last = rest.replace(/\r$/, '');
    if (!failure && last.trim() !== '') {
      const isCut =
        splitFields(last, mapping.delimiter, lastIndex).length <= lastIndex && line > mapping.headerLine;
      if (isCut) {
        warnings.push({
          code: 'truncatedLastLine',
          text: 'The last line is cut short and was left out.',
          atRow: line + 1,
        });
      } else readLine(last);
    }
    if (failure) return failure;
    const timeS = time.finish();
    const refusal = refuse(timeS.length, rowsRead, skipped);
    if (refusal) return refusal;
    const rowsSkipped = skipped.time + skipped.value;
    if (rowsSkipped > 0) {
      warnings.push({
        code: 'rowsSkipped',
        text: `${formatCount(rowsSkipped)} of ${formatCount(rowsRead)} rows have no readable time or current and were left out.`,
        count: rowsSkipped,
        atRow: skipped.first,
      });
    }
    if (derivesCurrent) {
      warnings.push({
        code: 'currentFromPower',
        text: 'The current was worked out as power divided by voltage.',
      });
    }
    return {
      ok: true,
      timeS,
      currentA: current.finish(),
      voltageV: voltage?.finish() ?? null,
      powerW: power?.finish() ?? null,
      temperatureC: temperature?.finish() ?? null,
      lowestCellV: lowest?.finish() ?? null,
      highestCellV: highest?.finish() ?? null,
      counterAh: counter?.finish() ?? null,
      row: Int32Array.from(lineOf.finish()),
      timeFormat: plan.timeFormat,
      rowsRead,
      rowsSkipped,
      warnings,
    };
  };
  return { push, finish };
}

const refuse = (
  used: number,
  rowsRead: number,
  skipped: { time: number; value: number; first: number },
): LogFailure | undefined => {
  if (rowsRead === 0) return logFailure('empty', 'The log has a header but no rows.');
  const lost = skipped.time + skipped.value;
  if (lost > rowsRead * 0.2) {
    return skipped.time >= skipped.value
      ? logFailure('unreadableTime', 'Most times cannot be read that way. Choose how they are written.', {
          row: skipped.first,
        })
      : logFailure('unreadableRows', 'Too many rows have no readable current. Check its column.', {
          row: skipped.first,
        });
  }
  if (used < 2) return logFailure('tooFewRows', 'The log has fewer than two usable rows.');
  return undefined;
};
