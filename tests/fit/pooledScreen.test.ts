import type { PoolCheck } from '@/lib/fit/poolCheck';
import { fitComponents } from '@/lib/fit/pooled/components';
import { fitPool } from '@/lib/fit/pooled/fitPool';
import { bankInfluences } from '@/lib/fit/pooled/influence';
import { looResiduals } from '@/lib/fit/pooled/residuals';
import { maximise } from '@/lib/fit/pooled/maximise';
import { defaultPriors } from '@/lib/fit/pooled/priors';
import { arrangePool } from '@/lib/fit/pooled/table';
import { drawTruth, simulatePool } from '@/scripts/bench/simulatePool';

const pool = simulatePool({ banks: 80, seed: 21, truth: drawTruth(2, 0.3) }).checks;
const plain = { exponent: 0.5, isWithoutInteractions: true };

function spoil(checks: PoolCheck[], row: number, factor: number): PoolCheck[] {
  return checks.map((check, i) => (i === row ? { ...check, capacityAh: check.capacityAh * factor } : check));
}

/** A row in the middle of a bank with at least four checks. */
const busy = pool.findIndex(
  ({ bank }, row) => pool.filter((other) => other.bank === bank).length >= 4 && pool[row - 2]?.bank === bank,
);

describe('the outlier screen', () => {
  it('quarantines the one spoiled check of a bank and leaves its neighbours alone', () => {
    const fit = fitPool(spoil(pool, busy, 0.8), plain);
    if (!fit.ok) throw new Error(fit.reason);
    const own = fit.screen.filter(({ bank }) => bank === pool[busy]!.bank);
    expect(own).toHaveLength(1);
    expect(own[0]).toMatchObject({ row: busy, action: 'quarantine' });
    expect(own[0]!.t).toBeLessThan(-4);
    expect(fit.data.used).toBe(
      pool.length - fit.screen.filter(({ action }) => action === 'quarantine').length,
    );
  });

  it('gives the fit that the pool without that check gives', () => {
    const screened = fitPool(spoil(pool, busy, 0.8), plain);
    const without = fitPool(
      pool.filter((_, row) => row !== busy),
      plain,
    );
    if (!screened.ok || !without.ok) throw new Error('not fitted');
    screened.parameters.forEach((row, i) => {
      expect(Math.abs(row.estimate - without.parameters[i]!.estimate) / row.se).toBeLessThan(0.01);
    });
  });

  it('never takes out a check that is kept, nor the sound checks before it', () => {
    const bankRows = pool.flatMap(({ bank }, row) => (bank === pool[busy]!.bank ? [row] : []));
    const last = bankRows.at(-1)!;
    const failed = (isKept: boolean) =>
      spoil(pool, last, 0.7).map((check, row) => (row === last && isKept ? { ...check, isKept } : check));
    const dropped = fitPool(failed(false), plain);
    const kept = fitPool(failed(true), plain);
    if (!dropped.ok || !kept.ok) throw new Error('not fitted');
    const gone = (fit: typeof kept) =>
      fit.screen.filter(({ action }) => action === 'quarantine').map(({ row }) => row);
    expect(gone(dropped)).toContain(last);
    expect(gone(kept).filter((row) => bankRows.includes(row))).toEqual([]);
    // It weighs: the spread between banks or of the readings has to make room for it.
    const spread = (fit: typeof kept) =>
      Math.exp(fit.parameters.find(({ name }) => name === 'ln_s')!.estimate);
    expect(spread(kept)).toBeGreaterThan(1.02 * spread(dropped));
  });

  it('finds nothing when told not to look', () => {
    const fit = fitPool(spoil(pool, busy, 0.8), { ...plain, isScreening: false });
    if (!fit.ok) throw new Error(fit.reason);
    expect(fit.screen).toEqual([]);
    expect(fit.data.used).toBe(pool.length);
  });

  it('shows a spoiled check in the residuals, and the others about standard normal', () => {
    const fit = fitPool(pool, plain);
    if (!fit.ok) throw new Error(fit.reason);
    const residuals = looResiduals(spoil(pool, busy, 0.8), fit);
    expect(residuals.map(({ row }) => row)).toEqual([...pool.keys()]);
    expect(residuals[busy]!.t).toBeLessThan(-5);
    const clean = looResiduals(pool, fit).map(({ t }) => t);
    const rms = Math.sqrt(clean.reduce((sum, t) => sum + t * t, 0) / clean.length);
    expect(rms).toBeGreaterThan(0.8);
    expect(rms).toBeLessThan(1.2);
  });
});

describe('influence of banks', () => {
  it('is what deleting the bank does, over every fifth bank', () => {
    const table = arrangePool(pool);
    const fitted = fitComponents(table, { priors: defaultPriors, exponent: 0.5 });
    if (!fitted.ok) throw new Error(fitted.reason);
    const whole = fitted.fits[0]!;
    const claimed = bankInfluences(table, whole, defaultPriors, 0);
    const size = defaultPriors.length;
    const pairs: [number, number][] = [];
    for (let b = 0; b < table.banks; b += 5) {
      const bank = table.bankKeys[b]!;
      const deleted = maximise(arrangePool(pool.filter((check) => check.bank !== bank)), {
        exponent: 0.5,
        priors: defaultPriors,
        start: whole.evaluation.psi,
      });
      if (!deleted.ok) throw new Error(deleted.reason);
      for (let i = 0; i < size; i++) {
        const se = Math.sqrt(whole.component.covariance[i * size + i]!);
        const exact = (deleted.evaluation.psi[i]! - whole.evaluation.psi[i]!) / se;
        const one = claimed.find((row) => row.bank === bank && row.parameter === defaultPriors[i]!.name);
        pairs.push([one?.shiftInSe ?? 0, exact]);
      }
    }
    // Expected of this approximation against exact deletion (method note, section 7): correlation .975-.999, slope of exact on claimed 1.0-1.3.
    const sum = (f: (pair: [number, number]) => number) => pairs.reduce((total, pair) => total + f(pair), 0);
    const cross = sum(([a, b]) => a * b);
    expect(cross / Math.sqrt(sum(([a]) => a * a) * sum(([, b]) => b * b))).toBeGreaterThan(0.96);
    const slope = cross / sum(([a]) => a * a);
    expect(slope).toBeGreaterThan(0.9);
    expect(slope).toBeLessThan(1.4);
  });
});
