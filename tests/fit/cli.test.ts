import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { parsePool } from '@/scripts/fit/readPool';
import { parseScenario, readOptions, UsageError } from '@/scripts/fit/readOptions';
import { numbersIn, readPoolReference, readPoolText } from '../support/pools';
import { referencePath } from '../support/reference';

jest.setTimeout(120_000);

const root = resolve(__dirname, '../..');
const folder = mkdtempSync(join(tmpdir(), 'fit-cli-'));
afterAll(() => rmSync(folder, { recursive: true }));
const text = readPoolText('pool-small');
const lines = text.trim().split('\n');

function run(...args: string[]) {
  const { status, stdout, stderr } = spawnSync(
    process.execPath,
    ['--import', 'tsx', 'scripts/fit.ts', ...args],
    {
      cwd: root,
      encoding: 'utf8',
      maxBuffer: 1e8,
    },
  );
  return { status, stdout, stderr };
}

function file(name: string, content: string): string {
  const path = join(folder, name);
  writeFileSync(path, content);
  return path;
}

describe('npm run fit', () => {
  const small = referencePath('fit/pool-small.csv');

  it('writes the fit as JSON to standard output and nothing else, within 0.01 SE of R', () => {
    const { status, stdout, stderr } = run(small, '--exponent', '0.5', '--no-screen', '--json', '-');
    expect({ status, stderr }).toEqual({ status: 0, stderr: '' });
    const fit = JSON.parse(stdout) as Record<string, never> & {
      parameters: { name: string; estimate: number; se: number }[];
      data: object;
    };
    for (const { name, estimate } of fit.parameters) {
      const expected = readPoolReference('pool-small').estimates[name]!;
      expect(Math.abs(estimate - expected.estimate) / expected.se).toBeLessThan(0.01);
    }
    const sha256 = createHash('sha256').update(readFileSync(small)).digest('hex');
    expect(fit.data).toMatchObject({ rows: 412, used: 412, banks: 120, cellTypes: 8, sha256 });
    expect(fit).toMatchObject({ ok: true, converged: true, exponent: { mode: 'fixed', value: 0.5 } });
    const parts = ['iterations', 'covariance', 'cellTypes', 'lifetimes', 'effects', 'interactions', 'screen'];
    expect(Object.keys(fit)).toEqual(expect.arrayContaining([...parts, 'influence', 'balance']));
    expect(numbersIn(fit).every(({ value }) => Number.isFinite(value))).toBe(true);
  });

  it('prints a summary with units and verdicts, and writes JSON beside it', () => {
    const json = join(folder, 'out.json');
    const { status, stdout } = run(
      ...[small, '--json', json, '--seed', '5', '--cell-type', 'M01'],
      ...['--scenario', 'name=shed,depth=0.6,cRate=0.1,tempC=15,socMean=0.55,efcPerYear=120,clamped=0'],
    );
    expect(status).toBe(0);
    for (const words of [
      '412 of 412 checks',
      'Life to 80 % of the rating',
      'prior share',
      'Bear in mind',
      '°C',
    ]) {
      expect(stdout).toContain(words);
    }
    expect(stdout).toMatch(/could be none, or x \d\.\d\d to \d\.\d\d|not measured yet|shown: life x/);
    const fit = JSON.parse(readFileSync(json, 'utf8')) as {
      lifetimes: { scenario: string; basis: string }[];
    };
    expect(fit.lifetimes).toHaveLength(1);
    expect(fit.lifetimes[0]).toMatchObject({ scenario: 'shed', basis: 'cellType' });
  });

  it('names a quarantined row as a reader of the file counts it', () => {
    const spoiled = lines.map((line, i) => (i === 3 ? line.replace(/,[\d.]+,([\d.]+)$/, ',150,$1') : line));
    const { stdout } = run(file('spoiled.csv', spoiled.join('\n')), '--exponent', '0.5', '--json', '-');
    const { screen } = JSON.parse(stdout) as {
      screen: { row: number; line: number; bank: string; action: string }[];
    };
    // Line 4 of the file: the header is line 1, so this is data row 3.
    expect(screen).toContainEqual(
      expect.objectContaining({ row: 3, line: 4, bank: 'B00001', action: 'quarantine' }),
    );
  });

  it('takes priors from a file', () => {
    const priors = file('priors.json', JSON.stringify({ bK: { mean: 0.5, sd: 0.001 } }));
    const { stdout } = run(small, '--exponent', '0.5', '--no-screen', '--priors', priors, '--json', '-');
    const { parameters } = JSON.parse(stdout) as { parameters: { name: string; estimate: number }[] };
    expect(parameters.find(({ name }) => name === 'bK')!.estimate).toBeCloseTo(0.5, 2);
  });

  it('refuses a bad row with its line and column, as text and as JSON, and exits with 2', () => {
    const bad = lines.map((line, i) =>
      i === 5 ? line.replace(/^([^,]*,[^,]*,[^,]*),[^,]*/, '$1,-0.3') : line,
    );
    const { status, stdout, stderr } = run(file('bad.csv', bad.join('\n')), '--json', '-');
    expect(status).toBe(2);
    expect(stderr).toContain('line 6, depth');
    expect(JSON.parse(stdout)).toMatchObject({
      ok: false,
      converged: false,
      problems: [{ line: 6, column: 'depth' }],
    });
  });

  it('exits with 3 and publishes nothing when it does not converge', () => {
    // A start a hundred thousand prior sd from the data can't be left in 60 steps of at most 2 sd.
    const priors = file(
      'far.json',
      JSON.stringify({ c0: { mean: 5, sd: 0.00001 }, ln_s: { mean: -9, sd: 0.0001 } }),
    );
    const { status, stdout } = run(
      small,
      '--exponent',
      '0.5',
      '--no-screen',
      '--priors',
      priors,
      '--json',
      '-',
    );
    expect(status).toBe(3);
    const answer = JSON.parse(stdout) as Record<string, unknown>;
    expect(answer).toMatchObject({ ok: false, converged: false });
    expect(answer.parameters).toBeUndefined();
  });

  it.each([
    ['no file', []],
    ['a file that is not there', ['nowhere.csv']],
    ['an unknown option', [small, '--frobnicate']],
    ['a seed that is no number', [small, '--seed', 'x']],
    ['a cell type that is not in the pool', [small, '--cell-type', 'none']],
    ['priors that are not there', [small, '--priors', 'nowhere.json']],
    ['priors of an unknown name', [small, '--priors', file('unknown.json', '{"bX":{"mean":0}}')]],
    ['priors that are no object', [small, '--priors', file('list.json', '[1]')]],
  ])('exits with 2 on %s', (_, args) => {
    expect(run(...args).status).toBe(2);
  });
});

describe('parsePool', () => {
  const change = (index: number, edit: (line: string) => string) =>
    parsePool(lines.map((line, i) => (i === index ? edit(line) : line)).join('\n'));
  const problemsOf = (pool: ReturnType<typeof parsePool>) => (pool.ok ? [] : pool.problems);

  it('reads the columns in any order, more of them, cell_type for model, a byte order mark and blank lines', () => {
    const turned = lines.map((line, i) => ['x', ...line.split(',').reverse()].join(i === 0 ? ',' : ','));
    const header = turned[0]!.replace('model', 'cell_type').replace('x,', 'note,');
    const pool = parsePool(`\uFEFF${[header, '', ...turned.slice(1)].join('\r\n')}\r\n`);
    const plain = parsePool(text);
    if (!pool.ok || !plain.ok) throw new Error('refused');
    expect(pool.checks).toEqual(plain.checks);
    expect(pool.lines[0]).toBe(plain.lines[0]! + 1);
  });

  it('reads owner and the sources of conditions where they are given', () => {
    const [header, ...rows] = lines;
    const wide = [
      `${header},owner,temp_source,soc_source`,
      ...rows.map((row) => `${row},O1,estimated,readOff`),
    ];
    const pool = parsePool(wide.slice(0, 4).join('\n'));
    if (!pool.ok) throw new Error('refused');
    expect(pool.checks[0]).toMatchObject({
      owner: 'O1',
      temperatureSource: 'estimated',
      socSource: 'readOff',
    });
  });

  it.each([
    ['missing', (header: string) => header.replace('depth,', ''), 'depth', /is missing/],
    ['renamed', (header: string) => header.replace('depth', 'dod'), 'depth', /is missing.*dod/],
    ['there twice', (header: string) => header.replace('c_rate', 'depth'), 'depth', /is there twice/],
    [
      'there twice by two names',
      (header: string) => header.replace('years', 'cell_type'),
      'cell_type',
      /twice/,
    ],
  ])('refuses a column that is %s', (_, edit, column, message) => {
    const problem = problemsOf(change(0, edit)).find((one) => one.column === column)!;
    expect(problem.line).toBe(1);
    expect(problem.message).toMatch(message);
  });

  it.each([
    ['an empty value', ''],
    ['text', 'abc'],
    ['a hexadecimal number', '0x10'],
    ['a decimal comma in quotes', '"0,5"'],
    ['NaN', 'NaN'],
    ['Infinity', 'Infinity'],
    ['a negative number', '-1'],
    ['zero', '0'],
    ['an absurd number', '1e9'],
  ])('refuses %s with line and column', (_, value) => {
    const pool = change(9, (line) => {
      const cells = line.split(',');
      cells[10] = value;
      return cells.join(',');
    });
    expect(problemsOf(pool)[0]).toMatchObject({ line: 10, column: 'capacity_ah' });
  });

  it('refuses a row with a value too few, naming its line', () => {
    const pool = change(4, (line) => line.slice(0, line.lastIndexOf(',')));
    expect(problemsOf(pool)[0]).toMatchObject({ line: 5, column: 'row' });
  });

  it('reads an empty file as one without its columns', () => {
    expect(problemsOf(parsePool('')).map(({ message }) => message)[0]).toMatch(/is missing/);
  });
});

describe('readOptions', () => {
  it('reads a scenario whole', () => {
    expect(
      parseScenario('name=typical,depth=0.7,cRate=0.2,tempC=25,socMean=0.6,efcPerYear=200,clamped=1'),
    ).toEqual({
      ...{ name: 'typical', depthFraction: 0.7, dischargeIt: 0.2, temperatureC: 25 },
      ...{ socMeanFraction: 0.6, efcPerYear: 200, isClamped: true },
    });
  });

  it.each([
    'depth=0.7',
    'name=a,depth=2,cRate=0.2,tempC=25,socMean=0.6,efcPerYear=200,clamped=1',
    'name=a,depth=0.7,cRate=x,tempC=25,socMean=0.6,efcPerYear=200,clamped=1',
    'name=a,depth=0.7,cRate=0.2,tempC=25,socMean=0.6,efcPerYear=200,clamped=maybe',
    'name=a,depth=0.7,cRate=0.2,tempC=25,socMean=0.6,efcPerYear=200,clamped=1,wind=3',
  ])('refuses the scenario %s', (scenario) => {
    expect(() => parseScenario(scenario)).toThrow(UsageError);
  });

  it('refuses an exponent without sense', () => {
    expect(() => readOptions(['a.csv', '--exponent', '-1'])).toThrow(UsageError);
    expect(readOptions(['a.csv', '--exponent', '0.5'])).toMatchObject({ exponent: 0.5, isScreening: true });
  });
});
