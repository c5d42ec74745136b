import { CholeskyDecomposition, Matrix } from 'ml-matrix';

import {
  bankPosterior,
  banksAt,
  calendarShareAt,
  fitPool,
  forecastOf,
  standingOf,
  checkUse,
} from '@/lib/fit';
import { fadePoint, lnKept } from '@/lib/fit/pooled/fade';
import type { PooledFit } from '@/lib/fit/pooled/fitTypes';
import { predictNewCheck } from '@/lib/fit/pooled/newCheck';
import { standardNormalCdf } from '@/lib/fit/pooled/normal';
import { at, referenceRelSd } from '@/lib/fit/pooled/parameters';
import { scenarioNamed } from '@/lib/fit/pooled/use';
import type { PoolCheck } from '@/lib/fit/poolCheck';
import { createDice } from '@/scripts/bench/dice';
import { readPoolFixture } from '../support/pools';

const checks = readPoolFixture('pool-small');
const fit = fitted(fitPool(checks, { isWithoutInteractions: true }));
const banks = [...new Set(checks.map(({ bank }) => bank))].map((bank) =>
  checks.filter((row) => row.bank === bank),
);

function fitted(result: ReturnType<typeof fitPool>): PooledFit {
  if (!result.ok) throw new Error(result.reason);
  return result;
}

const withCount = (count: number) => banks.find((rows) => rows.length === count)!;
const lastOf = (rows: readonly PoolCheck[]) => rows.reduce((a, b) => (a.ageYears > b.ageYears ? a : b));

interface Truth {
  faster: (probability: number) => number;
  years: (probability: number) => number;
}

const years = Array.from({ length: 160 }, (_, i) => 0.3 * 1.045 ** i);

/**
 * By force, with none of the shortcuts of the code: draw the exponent, psi and the cell type's effect from the fit's
 * posterior; for each draw, weigh a grid of starts and paces by the checks; and let each of them run to 80 %.
 */
function byForce(rows: readonly PoolCheck[], isThin: boolean, draws: number): Truth {
  const dice = createDice(20261201);
  const place = fit.cellTypes.findIndex(({ cellType }) => cellType === rows[0]!.cellType);
  const roots = fit.components.map(({ covariance, psi }) => {
    const size = psi.length;
    const matrix = Matrix.from1DArray(size, size, [...covariance]);
    return new CholeskyDecomposition(matrix).lowerTriangularMatrix;
  });
  const use = checkUse(lastOf(rows));
  const paces = new Float64Array(33);
  const passed = new Float64Array(years.length);
  for (let draw = 0; draw < draws; draw++) {
    let left = dice.uniform();
    const index = Math.max(
      0,
      fit.components.findIndex(({ weight }) => (left -= weight) < 0),
    );
    const component = fit.components[index]!;
    const noise = Matrix.columnVector(component.psi.map(() => dice.normal()));
    const away = roots[index]!.mmul(noise).to1DArray();
    const psi = component.psi.map((value, i) => value + away[i]!);
    const effect = component.cellTypes[place]!;
    const shift = isThin
      ? 0
      : effect.m +
        away.reduce((sum, value, i) => sum + value * effect.slope[i]!, 0) +
        Math.sqrt(effect.variance) * dice.normal();
    const sd = (name: 'lnS' | 'lnSc' | 'lnSu' | 'lnSm') => Math.exp(psi[at[name]]!);
    const paceSd = isThin ? Math.hypot(sd('lnSu'), sd('lnSm')) : sd('lnSu');
    const lnFades = rows.map(
      (row) => fadePoint({ psi, exponent: component.exponent, shift }, checkUse(row), row.ageYears).lnFade,
    );
    const later = years.map(
      (age) => fadePoint({ psi, exponent: component.exponent, shift }, use, age).lnFade,
    );
    const grid: { c: number; u: number; log: number }[] = [];
    for (let i = -16; i <= 16; i++)
      for (let j = -16; j <= 16; j++) {
        const [u, c] = [(i / 4) * paceSd, (j / 4) * sd('lnSc')];
        let log = -0.5 * ((i / 4) ** 2 + (j / 4) ** 2);
        rows.forEach((row, r) => {
          const mean = psi[at.c0]! + c + lnKept(Math.exp(lnFades[r]! + u));
          const spread = sd('lnS') * (row.relSd / referenceRelSd);
          log -= 0.5 * ((Math.log(row.capacityAh / row.ratedAh) - mean) / spread) ** 2;
        });
        grid.push({ c, u, log });
      }
    const top = Math.max(...grid.map(({ log }) => log));
    const kept = grid.filter(({ log }) => log > top - 12);
    const total = kept.reduce((sum, { log }) => sum + Math.exp(log - top), 0);
    for (const { c, u, log } of kept) {
      const weight = Math.exp(log - top) / total / draws;
      paces[Math.round((u / paceSd) * 4) + 16]! += weight;
      const lnLevel = Math.log(Math.max(1 - 0.8 * Math.exp(-psi[at.c0]! - c), 1e-9));
      const first = later.findIndex((lnFade) => lnFade + u >= lnLevel);
      if (first >= 0) passed[first]! += weight;
    }
  }
  // Each place of the grid stands for a quarter of an sd about it.
  const quantile = (probability: number) => {
    let below = 0;
    const place = paces.findIndex((weight) => (below += weight) >= probability);
    const inside = (probability - (below - paces[place]!)) / paces[place]!;
    return (place - 16 - 0.5 + inside) / 4;
  };
  return {
    faster: (probability) => 1 - standardNormalCdf(quantile(1 - probability)),
    years(probability) {
      let sum = 0;
      return years[passed.findIndex((weight) => (sum += weight) >= probability)]! / 1.0225;
    },
  };
}

describe.each([
  ['one check', () => withCount(1), false],
  ['three checks', () => withCount(3), false],
  ['many checks', () => [...banks].sort((a, b) => b.length - a.length)[0]!, false],
  ['a cell type of too few banks', () => withCount(3), true],
])('standing and forecast of a bank with %s', (_name, rowsOf, isThin) => {
  const rows = rowsOf();
  // Fewer than 10 banks, so that the pool stands in for the cell type.
  const known = isThin
    ? {
        ...fit,
        cellTypes: fit.cellTypes.map((row) =>
          row.cellType === rows[0]!.cellType ? { ...row, banks: 9 } : row,
        ),
      }
    : fit;
  const posterior = bankPosterior(known, rows, rows[0]!.cellType);
  const truth = byForce(rows, isThin, 400);

  it('says on what banks it rests', () => {
    expect(posterior.basis).toBe(isThin ? 'pool' : 'cellType');
    expect(posterior.checks).toBe(rows.length);
  });

  // 400 draws leave about 0.02 of noise in a quantile of the share.
  it('agrees with draws and a grid within 0.04 in the share of banks', () => {
    const { fasterFraction } = standingOf(posterior);
    expect(Math.abs(fasterFraction.estimate - truth.faster(0.5))).toBeLessThan(0.04);
    expect(Math.abs(fasterFraction.lower - truth.faster(0.05))).toBeLessThan(0.04);
    expect(Math.abs(fasterFraction.upper - truth.faster(0.95))).toBeLessThan(0.04);
  });

  // Steps of the grid of ages are 4.5 %; the ends are of few draws.
  it('agrees with them within 5 % in the years to 80 %, 8 % at the ends of the range', () => {
    const { years: forecast } = forecastOf(posterior, checkUse(lastOf(rows)));
    expect(Math.abs(forecast.estimate / truth.years(0.5) - 1)).toBeLessThan(0.05);
    expect(Math.abs(forecast.lower / truth.years(0.05) - 1)).toBeLessThan(0.08);
    expect(Math.abs(forecast.upper / truth.years(0.95) - 1)).toBeLessThan(0.08);
  });
});

describe('standingOf', () => {
  const rows = [...banks].sort((a, b) => b.length - a.length)[0]!;

  it('places a bank lower when its later checks read less, and never at an end', () => {
    const sunk = rows.map((row) =>
      row === lastOf(rows) ? { ...row, capacityAh: row.capacityAh * 0.97 } : row,
    );
    const before = standingOf(bankPosterior(fit, rows, rows[0]!.cellType));
    const after = standingOf(bankPosterior(fit, sunk, rows[0]!.cellType));
    expect(after.fasterFraction.estimate).toBeLessThan(before.fasterFraction.estimate);
    expect(after.paceRatio.estimate).toBeGreaterThan(before.paceRatio.estimate);
    expect(after.fasterFraction.lower).toBeGreaterThan(0);
  });

  it('knows little of a bank whose one check is very uncertain: 9 of 10 banks, half of them faster', () => {
    const vague = [{ ...rows[0]!, relSd: 0.5 }];
    const { fasterFraction } = standingOf(bankPosterior(fit, vague, rows[0]!.cellType));
    expect(fasterFraction.estimate).toBeCloseTo(0.5, 1);
    expect(fasterFraction.upper - fasterFraction.lower).toBeCloseTo(0.9, 1);
  });

  it('refuses a bank without a check, and takes a cell type the fit does not know', () => {
    expect(() => bankPosterior(fit, [], 'any')).toThrow(RangeError);
    expect(bankPosterior(fit, rows, 'never seen').basis).toBe('pool');
  });
});

describe('forecastOf', () => {
  it('rises from never to always', () => {
    const rows = withCount(3);
    const { probabilityBy } = forecastOf(bankPosterior(fit, rows, rows[0]!.cellType), checkUse(lastOf(rows)));
    const chances = [0.1, 5, 15, 40, 200, 2000].map(probabilityBy);
    expect(chances[0]).toBeLessThan(0.001);
    expect(chances.at(-1)).toBeGreaterThan(0.999);
    expect([...chances].sort((a, b) => a - b)).toEqual(chances);
  });
});

describe('banksAt', () => {
  const typical = scenarioNamed('typical');

  it('is where new checks fall when the meter adds nothing', () => {
    const [lower, middle, upper] = banksAt(fit, typical, 6, [0.1, 0.5, 0.9]);
    const check = predictNewCheck(fit, typical, 6, 1e-9, { level: 0.8 });
    expect([lower, middle, upper]).toEqual(
      [check.lower, check.estimate, check.upper].map((x) => expect.closeTo(x, 9)),
    );
    expect(upper).toBeLessThan(predictNewCheck(fit, typical, 6, 0.03, { level: 0.8 }).upper);
  });
});

describe('calendarShareAt', () => {
  const typical = scenarioNamed('typical');

  it('is 1 - q without cycling / q: the fade of a bank that is hardly cycled over that of the same one cycled', () => {
    const single = { ...fit, components: [{ ...fit.components[2]!, weight: 1 }] };
    const { psi, exponent } = single.components[0]!;
    const point = fadePoint({ psi, exponent }, typical, 8);
    const stored = Math.exp(psi[at.lnA]! + psi[at.aS]! * 0.1) * 8 ** exponent;
    expect(calendarShareAt(single, typical, 8).estimate).toBeCloseTo(stored / point.fade, 10);
  });

  it('falls with more cycles, and has a range within 0 and 1', () => {
    const some = calendarShareAt(fit, typical, 8);
    const more = calendarShareAt(fit, { ...typical, efcPerYear: 400 }, 8);
    expect(more.estimate).toBeLessThan(some.estimate);
    expect([some.lower, some.estimate, some.upper].every((x) => x > 0 && x < 1)).toBe(true);
    expect(some.lower).toBeLessThan(some.estimate);
  });
});
