import type { PoolCheck } from '@/lib/fit/poolCheck';
import { fitPool } from '@/lib/fit/pooled/fitPool';
import type { PooledFit } from '@/lib/fit/pooled/fitTypes';
import { drawTruth, simulatePool } from '@/scripts/bench/simulatePool';
import { numbersIn } from '../support/pools';

const pool = simulatePool({ banks: 70, seed: 31, truth: drawTruth(3, 0) }).checks;
const row = 7;

const withValue = (column: keyof PoolCheck, value: unknown) =>
  pool.map((check, i) => (i === row ? { ...check, [column]: value } : check));

describe('a row that makes no sense refuses the pool, naming row and column', () => {
  const numbers: (keyof PoolCheck)[] = [
    ...(['depthFraction', 'dischargeIt', 'temperatureC', 'socMeanFraction', 'ageYears'] as const),
    ...(['efc', 'ratedAh', 'capacityAh', 'relSd'] as const),
  ];
  const cases: [keyof PoolCheck, string, unknown][] = numbers.flatMap((column) => [
    [column, 'missing', undefined],
    [column, 'null', null],
    [column, 'text', 'twelve'],
    [column, 'NaN', NaN],
    [column, 'infinite', Infinity],
    [column, 'absurdly large', 1e12],
    [column, 'absurdly small', -1e12],
  ]);
  const zeros: [keyof PoolCheck, string, unknown][] = numbers
    .filter((column) => !['temperatureC', 'socMeanFraction', 'efc'].includes(column))
    .map((column) => [column, 'zero', 0]);
  const keys: [keyof PoolCheck, string, unknown][] = [
    ['bank', 'empty', ''],
    ['owner', 'missing', undefined],
    ['cellType', 'empty', ''],
    ['isClamped', 'neither yes nor no', 'perhaps'],
  ];
  it.each([...cases, ...zeros, ...keys])('%s %s', (column, _, value) => {
    const result = fitPool(withValue(column, value));
    expect(result).toMatchObject({ ok: false, kind: 'input', converged: false });
    if (result.ok) return;
    expect(result.problems?.[0]).toMatchObject({ row, column });
    expect(result.reason).toContain(`row ${row + 1}, ${column}`);
  });

  it('a bank under two cell types, or of two owners', () => {
    const second = pool.findIndex((check, i) => i > 0 && pool[i - 1]!.bank === check.bank);
    const changed = (change: Partial<PoolCheck>) =>
      fitPool(pool.map((check, i) => (i === second ? { ...check, ...change } : check)));
    expect(changed({ cellType: 'other' })).toMatchObject({ problems: [{ row: second, column: 'cellType' }] });
    expect(changed({ owner: 'other' })).toMatchObject({ problems: [{ row: second, column: 'owner' }] });
  });

  it('more than 200 checks of one bank', () => {
    const many = Array.from({ length: 201 }, (_, i) => ({ ...pool[0]!, ageYears: 1 + i / 100 }));
    expect(fitPool(many)).toMatchObject({ kind: 'input', problems: [{ row: 200, column: 'bank' }] });
  });

  it('no checks at all, or a cell type that is not there', () => {
    expect(fitPool([])).toMatchObject({ ok: false, kind: 'input', reason: 'the pool holds no checks' });
    expect(fitPool(pool, { cellType: 'none' })).toMatchObject({ ok: false, kind: 'input' });
  });

  it('options that make no sense throw', () => {
    expect(() => fitPool(pool, { exponent: 0 })).toThrow(RangeError);
    expect(() => fitPool(pool, { exponent: NaN })).toThrow(RangeError);
    expect(() => fitPool(pool, { priors: [] })).toThrow(RangeError);
  });
});

describe('a pool that can be read but tells little is fitted, with what it can not tell', () => {
  const oneBank = pool.filter(({ bank }) => bank === pool[1]!.bank);
  const busyBank = pool.find(({ bank }) => pool.filter((check) => check.bank === bank).length >= 4)!.bank;
  const of = (change: (check: PoolCheck, i: number) => Partial<PoolCheck>) =>
    pool.map((check, i) => ({ ...check, ...change(check, i) }));
  const dead = of((check, i) => (i === row ? { capacityAh: 0.01 * check.ratedAh } : {}));
  const later = pool.findIndex((check, i) => check.bank === busyBank && pool[i - 1]?.bank === busyBank);

  const cases: [string, PoolCheck[], RegExp][] = [
    ['one row', pool.slice(0, 1), /One bank/],
    ['one bank', oneBank, /One bank/],
    ['one cell type', of(() => ({ cellType: 'only' })), /One cell type/],
    ['all clamped', of(() => ({ isClamped: true })), /Every bank is clamped/],
    ['none clamped', of(() => ({ isClamped: false })), /No bank is clamped/],
    ['the same depth throughout', of(() => ({ depthFraction: 0.6 })), /the same depth/],
    ['the same rate throughout', of(() => ({ dischargeIt: 0.2 })), /the same rate/],
    ['the same temperature throughout', of(() => ({ temperatureC: 25 })), /the same temperature/],
    ['the same state of charge throughout', of(() => ({ socMeanFraction: 0.5 })), /the same state of charge/],
    ['two checks on one day', [...pool, pool[row]!], /Two checks of the same age/],
    [
      'full cycles that fall',
      of((check, i) => (i === later ? { efc: pool[later - 1]!.efc * 0.5 } : {})),
      /Full cycles fall/,
    ],
    ['no full cycles at all', of(() => ({ efc: 0 })), /.*/],
    ['a nearly dead bank', dead, /1 check left out: capacity at or below 40 %/],
    [
      'a counter far too high',
      of((check, i) => (i === row ? { efc: 99_999 } : {})),
      /more than two full cycles a day/,
    ],
    [
      'clamping that changed to and fro',
      of((check) => (check.bank === busyBank ? { isClampingUnclear: true } : {})),
      /clamping changed more than once/,
    ],
    ['identical checks throughout', pool.map(() => pool[0]!).slice(0, 50), /One bank/],
    ['banks barely above dead', of((check) => ({ capacityAh: 0.41 * check.ratedAh })), /.*/],
    ['all capacities above the rating', of((check) => ({ capacityAh: 1.2 * check.ratedAh })), /.*/],
  ];
  it.each(cases)('%s', (_, checks, words) => {
    const fit = fitPool(checks);
    if (!fit.ok) return expect(fit).toMatchObject({ kind: 'unconverged' });
    expect(fit.statements.some((statement) => words.test(statement))).toBe(true);
    expect(numbersIn(fit).filter(({ value }) => !Number.isFinite(value))).toEqual([]);
  });

  it.each(cases.slice(0, 15))('%s does converge', (_, checks) => {
    expect(fitPool(checks, { exponent: 0.5, isWithoutInteractions: true }).ok).toBe(true);
  });

  it('measures no effect of a lever that never moves', () => {
    const verdicts = (checks: PoolCheck[], lever: string) => {
      const fit = fitPool(checks, { isWithoutInteractions: true }) as PooledFit;
      return fit.effects.filter((effect) => effect.lever === lever).map(({ verdict }) => verdict);
    };
    expect(
      verdicts(
        of(() => ({ isClamped: true })),
        'clamping',
      ),
    ).toEqual(Array(2).fill('not measured yet'));
    expect(
      verdicts(
        of(() => ({ depthFraction: 0.6 })),
        'depth',
      ),
    ).toEqual(Array(2).fill('not measured yet'));
    expect(
      verdicts(
        of(() => ({ dischargeIt: 0.2 })),
        'rate',
      ),
    ).toEqual(Array(2).fill('not measured yet'));
    expect(
      verdicts(
        of(() => ({ temperatureC: 25 })),
        'heat',
      ),
    ).toEqual(Array(2).fill('not measured yet'));
    expect(
      verdicts(
        of(() => ({ socMeanFraction: 0.5 })),
        'chargeLevel',
      ),
    ).toEqual(Array(2).fill('not measured yet'));
  });

  it('takes nothing from a bank whose clamping is unclear', () => {
    const unclear = of((check) => (check.bank === busyBank ? { isClampingUnclear: true } : {}));
    const options = { exponent: 0.5, isWithoutInteractions: true };
    const fit = fitPool(unclear, options) as PooledFit;
    const without = fitPool(
      pool.filter(({ bank }) => bank !== busyBank),
      options,
    ) as PooledFit;
    expect(fit.parameters).toEqual(without.parameters);
    expect(fit.screen.some(({ bank }) => bank === busyBank)).toBe(false);
  });

  it('does not get out of a pool where every check is out of range', () => {
    expect(fitPool(of((check) => ({ capacityAh: 2 * check.ratedAh })))).toMatchObject({
      ok: false,
      kind: 'input',
      reason: expect.stringContaining('no check can be used') as string,
    });
  });
});
