/**
 * Fit the pooled fade model to a file of capacity checks and print a summary, or write the fit as JSON.
 * npm run -s fit -- POOL.csv [options]; see scripts/fit/readOptions.ts for the options.
 * Exit: 0 done, 2 input refused, 3 not converged.
 */
import { createHash } from 'node:crypto';
import { readFileSync, writeFileSync } from 'node:fs';
import { fitPool } from '../lib/fit/pooled/fitPool';
import type { FitPoolResult } from '../lib/fit/pooled/fitTypes';
import { priorsWith } from '../lib/fit/pooled/priors';
import { summaryText } from './fit/summaryText';
import { parsePool, type FileProblem } from './fit/readPool';
import { readOptions, usage, UsageError, type FitArguments } from './fit/readOptions';

const timeLimitMs = 30 * 60 * 1000;
const exitCode = { done: 0, refused: 2, unconverged: 3 };

process.exitCode = run(process.argv.slice(2));

function run(args: string[]): number {
  if (args.includes('--help') || args.length === 0) {
    console.log(usage);
    return args.length === 0 ? exitCode.refused : exitCode.done;
  }
  try {
    return fitFile(readOptions(args));
  } catch (error) {
    if (!(error instanceof UsageError) && !(error instanceof RangeError)) throw error;
    console.error(`fit: ${error.message}\nRun with --help for the options.`);
    return exitCode.refused;
  }
}

function fitFile(options: FitArguments): number {
  const bytes = read(options.file);
  const pool = parsePool(bytes.toString('utf8'));
  if (!pool.ok) return refuse(options, pool.problems);
  const started = Date.now();
  const result = fitPool(pool.checks, {
    ...{ exponent: options.exponent, isScreening: options.isScreening },
    ...{ scenarios: options.scenarios, cellType: options.cellType },
    priors: options.priorsFile === undefined ? undefined : readPriors(options.priorsFile),
    sha256: createHash('sha256').update(bytes).digest('hex'),
    shouldStop: () => Date.now() - started > timeLimitMs,
  });
  if (!result.ok) {
    write(options, { ok: false, converged: false, reason: result.reason });
    console.error(`fit: ${result.reason}`);
    return result.kind === 'input' ? exitCode.refused : exitCode.unconverged;
  }
  const answer = withLines(result, pool.lines);
  write(options, answer);
  if (options.json !== '-') console.log(summaryText(answer));
  return exitCode.done;
}

/** Rows as a reader of the file counts them: from 1, with the line of the file beside. */
function withLines(fit: Extract<FitPoolResult, { ok: true }>, lines: number[]) {
  const inFile = <T extends { row: number }>(entry: T) => ({
    ...entry,
    row: entry.row + 1,
    line: lines[entry.row]!,
  });
  return { ...fit, screen: fit.screen.map(inFile), excluded: fit.excluded.map(inFile) };
}

function refuse(options: FitArguments, problems: FileProblem[]): number {
  const words = problems.map(({ line, column, message }) => `line ${line}, ${column}: ${message}`);
  write(options, { ok: false, converged: false, reason: words[0] ?? 'the file can not be read', problems });
  console.error([`fit: ${options.file} is refused:`, ...words.map((word) => `  ${word}`)].join('\n'));
  return exitCode.refused;
}

function write(options: FitArguments, answer: object): void {
  if (options.json === null) return;
  const text = `${JSON.stringify(answer, null, 1)}\n`;
  if (options.json === '-') process.stdout.write(text);
  else writeFileSync(options.json, text);
}

function read(file: string): Buffer {
  try {
    return readFileSync(file);
  } catch {
    throw new UsageError(`can not read ${file}`);
  }
}

function readPriors(file: string) {
  let changes: unknown;
  try {
    changes = JSON.parse(read(file).toString('utf8'));
  } catch (error) {
    if (error instanceof UsageError) throw error;
    throw new UsageError(`${file} is not JSON`);
  }
  if (typeof changes !== 'object' || changes === null || Array.isArray(changes)) {
    throw new UsageError(`${file} must hold an object of priors by name`);
  }
  return priorsWith(changes as Record<string, { mean?: number; sd?: number }>);
}
