import Papa from 'papaparse';
import type { PoolCheck, ValueSource } from '../../lib/fit/poolCheck';
import { findProblems } from '../../lib/fit/pooled/validate';

/** Something wrong with a pool file, by line (the header is line 1) and column. */
export interface FileProblem {
  line: number;
  column: string;
  message: string;
}

export type PoolFile =
  { ok: true; checks: PoolCheck[]; lines: number[] } | { ok: false; problems: FileProblem[] };

/** Columns of a pool file, any order; more columns are ignored. */
const columns = {
  bank: 'bank',
  cellType: 'cell_type',
  isClamped: 'clamped',
  depthFraction: 'depth',
  dischargeIt: 'c_rate',
  temperatureC: 'temp_c',
  socMeanFraction: 'soc_mean',
  ageYears: 'years',
  efc: 'efc',
  ratedAh: 'rated_ah',
  capacityAh: 'capacity_ah',
  relSd: 'rel_sd',
} as const;
const otherNames: Record<string, string> = { model: 'cell_type' };
const optionalColumns = ['owner', 'temp_source', 'soc_source', 'clamping_unclear', 'keep', 'failed'];
const sources: readonly string[] = ['metered', 'readOff', 'estimated'];

/** Parse a pool file. Refuses it whole when a column or a value is wrong, naming line and column. */
export function parsePool(text: string): PoolFile {
  const rows = Papa.parse<string[]>(text.replace(/^\uFEFF/, ''), { delimiter: ',' }).data;
  const header = (rows[0] ?? []).map((name) => name.trim());
  const headerProblems = checkHeader(header);
  if (headerProblems.length > 0) return { ok: false, problems: headerProblems };
  const place = new Map(header.map((name, i) => [otherNames[name] ?? name, i]));
  const checks: PoolCheck[] = [];
  const lines: number[] = [];
  for (let i = 1; i < rows.length; i++) {
    const row = rows[i]!;
    if (row.length === 1 && row[0]!.trim() === '') continue;
    if (row.length !== header.length) {
      const message = `has ${row.length} values where the header has ${header.length}`;
      return { ok: false, problems: [{ line: i + 1, column: 'row', message }] };
    }
    checks.push(toCheck((name) => (place.has(name) ? row[place.get(name)!]!.trim() : '')));
    lines.push(i + 1);
  }
  const problems = findProblems(checks).map(({ row, column, message }) => ({
    line: lines[row]!,
    column: column in columns ? columns[column as keyof typeof columns] : column,
    message,
  }));
  return problems.length > 0 ? { ok: false, problems } : { ok: true, checks, lines };
}

function checkHeader(header: string[]): FileProblem[] {
  const problems: FileProblem[] = [];
  const known = header.map((name) => otherNames[name] ?? name);
  const wanted: string[] = Object.values(columns);
  const unknown = header.filter((name, i) => !wanted.includes(known[i]!) && !optionalColumns.includes(name));
  for (const column of [...wanted, ...optionalColumns]) {
    const times = known.filter((name) => name === column).length;
    if (times > 1) problems.push({ line: 1, column, message: 'is there twice' });
    if (times === 0 && wanted.includes(column)) {
      const hint = unknown.length > 0 ? ` (columns not understood: ${unknown.join(', ')})` : '';
      problems.push({ line: 1, column, message: `is missing${hint}` });
    }
  }
  return problems;
}

function toCheck(value: (name: string) => string): PoolCheck {
  const bank = value('bank');
  const check: PoolCheck = {
    bank,
    owner: value('owner') || bank,
    cellType: value('cell_type'),
    isClamped: toFlag(value('clamped')) as boolean,
    depthFraction: toNumber(value('depth')),
    dischargeIt: toNumber(value('c_rate')),
    temperatureC: toNumber(value('temp_c')),
    socMeanFraction: toNumber(value('soc_mean')),
    ageYears: toNumber(value('years')),
    efc: toNumber(value('efc')),
    ratedAh: toNumber(value('rated_ah')),
    capacityAh: toNumber(value('capacity_ah')),
    relSd: toNumber(value('rel_sd')),
  };
  if (sources.includes(value('temp_source'))) check.temperatureSource = value('temp_source') as ValueSource;
  if (sources.includes(value('soc_source'))) check.socSource = value('soc_source') as ValueSource;
  if (toFlag(value('clamping_unclear'))) check.isClampingUnclear = true;
  if (toFlag(value('keep'))) check.isKept = true;
  if (toFlag(value('failed'))) check.hasFailed = true;
  return check;
}

function toNumber(text: string): number {
  return text === '' || /[xob_]/i.test(text) ? NaN : Number(text);
}

/** Undefined is refused later, with its line. */
function toFlag(text: string): boolean | undefined {
  if (text === '1' || text.toLowerCase() === 'true') return true;
  return text === '0' || text.toLowerCase() === 'false' ? false : undefined;
}
