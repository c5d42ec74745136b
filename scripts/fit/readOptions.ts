import { parseArgs } from 'node:util';
import type { Scenario } from '../../lib/fit/pooled/use';

/** What was asked for on the command line. */
export interface FitArguments {
  file: string;
  json: string | null;
  exponent: number | undefined;
  isScreening: boolean;
  scenarios: Scenario[] | undefined;
  cellType: string | undefined;
  priorsFile: string | undefined;
}

export const usage = `Fit the pooled fade model to a file of capacity checks.

  npm run -s fit -- POOL.csv [options]

  --json FILE        write the fit as JSON (- for standard output, then nothing else is printed)
  --exponent 0.5     fix the calendar exponent (default: mixed over 0.38 to 0.62)
  --no-screen        do not look for outliers
  --scenario LIST    name=typical,depth=0.7,cRate=0.2,tempC=25,socMean=0.6,efcPerYear=200,clamped=1
                     (repeatable; default: mild, typical, typical_unclamped, hard, hard_clamped)
  --cell-type NAME   lives of one cell type in place of the average one
  --priors FILE      JSON of priors to replace: { "bK": { "mean": 0, "sd": 0.3 } }
  --seed N           accepted; changes nothing, since every interval is integrated and none is drawn

Columns, any order: bank cell_type (or model) clamped depth c_rate temp_c soc_mean years efc rated_ah
capacity_ah rel_sd; optional: owner temp_source soc_source (metered, readOff, estimated) clamping_unclear
keep (1: never taken out by the screen) failed (1: the bank is known to have failed).
Exit: 0 done, 2 input refused, 3 not converged.`;

/** A command line that can't be followed; the message says why. */
export class UsageError extends Error {}

/** Read the command line. @throws UsageError */
export function readOptions(args: string[]): FitArguments {
  const { values, positionals } = parse(args);
  const file = positionals[0];
  if (!file || positionals.length > 1) throw new UsageError('give one pool file');
  if (values.seed !== undefined && !/^\d+$/.test(values.seed))
    throw new UsageError('--seed wants a whole number');
  const exponent = values.exponent === undefined ? undefined : Number(values.exponent);
  if (exponent !== undefined && !(exponent > 0 && exponent <= 1.5)) {
    throw new UsageError('--exponent wants a number above 0 and at most 1.5');
  }
  return {
    ...{ file, exponent, json: values.json ?? null },
    isScreening: !values['no-screen'],
    scenarios: values.scenario?.map(parseScenario),
    cellType: values['cell-type'],
    priorsFile: values.priors,
  };
}

function parse(args: string[]) {
  try {
    return parseArgs({
      args,
      allowPositionals: true,
      options: {
        json: { type: 'string' },
        exponent: { type: 'string' },
        'no-screen': { type: 'boolean' },
        scenario: { type: 'string', multiple: true },
        'cell-type': { type: 'string' },
        priors: { type: 'string' },
        seed: { type: 'string' },
      },
    });
  } catch (error) {
    throw new UsageError(error instanceof Error ? error.message : String(error));
  }
}

const scenarioKeys = {
  depth: { key: 'depthFraction', from: 0.01, to: 1 },
  cRate: { key: 'dischargeIt', from: 0.001, to: 10 },
  tempC: { key: 'temperatureC', from: -40, to: 80 },
  socMean: { key: 'socMeanFraction', from: 0, to: 1 },
  efcPerYear: { key: 'efcPerYear', from: 0, to: 10_000 },
} as const;

/** name=...,depth=...,cRate=...,tempC=...,socMean=...,efcPerYear=...,clamped=0|1: all are wanted. */
export function parseScenario(text: string): Scenario {
  const pairs = new Map(
    text.split(',').map((pair): [string, string] => {
      const [key = '', ...rest] = pair.split('=');
      return [key.trim(), rest.join('=').trim()];
    }),
  );
  const wanted = ['name', 'clamped', ...Object.keys(scenarioKeys)];
  const unknown = [...pairs.keys()].find((key) => !wanted.includes(key));
  if (unknown !== undefined) throw new UsageError(`--scenario does not know "${unknown}"`);
  const name = pairs.get('name');
  if (!name) throw new UsageError('--scenario wants a name');
  const clamped = pairs.get('clamped');
  if (clamped !== '0' && clamped !== '1') throw new UsageError('--scenario wants clamped=0 or clamped=1');
  const numbers = Object.entries(scenarioKeys).map(([short, { key, from, to }]) => {
    const raw = pairs.get(short);
    const value = raw ? Number(raw) : NaN;
    if (!(value >= from && value <= to)) {
      throw new UsageError(`--scenario wants ${short} from ${from} to ${to}, got "${raw ?? ''}"`);
    }
    return [key, value];
  });
  return { name, isClamped: clamped === '1', ...Object.fromEntries(numbers) } as Scenario;
}
