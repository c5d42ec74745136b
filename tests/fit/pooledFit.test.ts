import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';

import type { PoolCheck } from '@/lib/fit/poolCheck';
import { contrastUses, verdictInWords, verdictOf } from '@/lib/fit/pooled/effects';
import { fitPool } from '@/lib/fit/pooled/fitPool';
import type { PooledFit } from '@/lib/fit/pooled/fitTypes';
import { labelAtYourUse, type LabelClaim } from '@/lib/fit/pooled/label';
import { lifeAt } from '@/lib/fit/pooled/life';
import { at } from '@/lib/fit/pooled/parameters';
import { defaultPriors, priorsWith } from '@/lib/fit/pooled/priors';
import { inputReliability } from '@/lib/fit/pooled/reliability';
import { modelCurve, stratify } from '@/lib/fit/pooled/stratified';
import { scenarioNamed, type Use } from '@/lib/fit/pooled/use';
import { drawTruth, simulatePool } from '@/scripts/bench/simulatePool';
import { numbersIn, readPoolFixture } from '../support/pools';

const checks = readPoolFixture('pool-small');
const fit = fitted(checks);
const typical = scenarioNamed('typical');

function fitted(pool: readonly PoolCheck[], options?: Parameters<typeof fitPool>[1]): PooledFit {
  const result = fitPool(pool, options);
  if (!result.ok) throw new Error(result.reason);
  return result;
}

describe('a default fit', () => {
  it('mixes exponents with weights that add to 1, and is wider for it than a fixed one', () => {
    const { mode, weights } = fit.exponent;
    expect(mode).toBe('mixed');
    expect(weights!.map(({ exponent }) => exponent)).toEqual([0.38, 0.44, 0.5, 0.56, 0.62]);
    expect(weights!.reduce((sum, { weight }) => sum + weight, 0)).toBeCloseTo(1, 12);
    const fixed = fitted(checks, { exponent: 0.5 });
    expect(fixed.exponent).toEqual({ mode: 'fixed', value: 0.5 });
    const seOf = (one: PooledFit) => one.lifetimes.find(({ scenario }) => scenario === 'mild')!.lnT80.se;
    expect(seOf(fit)).toBeGreaterThan(seOf(fixed));
  });

  it('holds finite numbers only', () => {
    const odd = numbersIn(fit).filter(({ value }) => !Number.isFinite(value));
    expect(odd).toEqual([]);
  });

  it('gives the same answer twice, and with its rows in another order', () => {
    expect(fitted(checks)).toEqual(fit);
    const turned = fitted([...checks].reverse());
    turned.parameters.forEach((row, i) => {
      expect(Math.abs(row.estimate - fit.parameters[i]!.estimate) / row.se).toBeLessThan(1e-6);
    });
  });

  it('has the prior share of a parameter at its closed form, in one component', () => {
    const one = fitted(checks, { exponent: 0.5 });
    // g = e_i: (V P V)_ii / V_ii, at most 1.
    one.parameters.forEach((row, i) => {
      const sum = one.covariance[i]!.reduce((total, v, j) => total + (v * v) / one.priors[j]!.sd ** 2, 0);
      expect(row.priorShare).toBeCloseTo(Math.min(1, sum / one.covariance[i]![i]!), 10);
    });
  });

  it('says that the lever of a depth effect leans or is not measured in a small pool', () => {
    const depth = fit.effects.find(({ lever, scenario }) => lever === 'depth' && scenario === 'typical')!;
    expect(depth.priorShare).toBeGreaterThan(0.5);
    expect(depth.verdict).toBe('not measured yet');
    expect(verdictInWords(depth)).toBe('not measured yet');
  });

  it('publishes clamping by rate class with the banks and owners of each', () => {
    expect(fit.effects.map(({ lever }) => lever)).toEqual(
      expect.arrayContaining(['clampingLowRate', 'clampingHighRate']),
    );
    const total = fit.clampingClasses.reduce((sum, one) => sum + one.clamped.banks + one.unclamped.banks, 0);
    expect(total).toBe(fit.data.banks);
    expect(fit.interactions.map(({ lever }) => lever)).toEqual(['rate', 'depth', 'heat']);
  });

  it('starts from an earlier fit in at most half the iterations and ends at the same place', () => {
    const before = fitted(checks.slice(0, -1), { exponent: 0.5, isScreening: false });
    const cold = fitted(checks, { exponent: 0.5, isScreening: false });
    const warm = fitted(checks, { exponent: 0.5, isScreening: false, warmStart: before });
    expect(warm.iterations).toBeLessThanOrEqual(cold.iterations / 2);
    warm.parameters.forEach((row, i) => {
      expect(Math.abs(row.estimate - cold.parameters[i]!.estimate) / row.se).toBeLessThan(2e-3);
    });
  });

  it('stops when told to, and says so', () => {
    let asked = 0;
    const stopped = fitPool(checks, { shouldStop: () => ++asked > 3 });
    expect(stopped).toMatchObject({ ok: false, kind: 'stopped', converged: false });
    expect(asked).toBe(4);
  });

  it('gives an unconverged fit its reason and nothing else', () => {
    // Priors so tight and far off that 60 capped steps do not get there.
    const far = priorsWith({ c0: { mean: 40, sd: 0.0001 } });
    const result = fitPool(checks, { exponent: 0.5, isScreening: false, priors: far });
    if (result.ok) return expect(numbersIn(result).every(({ value }) => Number.isFinite(value))).toBe(true);
    expect(result.kind).toBe('unconverged');
    expect(result.reason).not.toBe('');
  });
});

describe('priors', () => {
  it('replaces one by name and moves the estimate towards it', () => {
    const priors = priorsWith({ bK: { mean: -1, sd: 0.01 } });
    const moved = fitted(checks, { exponent: 0.5, priors });
    expect(moved.parameters[at.bK]!.estimate).toBeCloseTo(-1, 1);
    expect(moved.parameters[at.bK]!.priorShare).toBeGreaterThan(0.95);
  });

  it('documents a source beside every default', () => {
    for (const prior of defaultPriors) expect(prior.source.length).toBeGreaterThan(10);
  });

  it.each([
    ['an unknown name', { bX: { mean: 0 } }],
    ['a sd of 0', { bK: { sd: 0 } }],
    ['a mean that is no number', { bK: { mean: NaN } }],
  ])('refuses %s', (_, changes) => {
    expect(() => priorsWith(changes)).toThrow(RangeError);
  });
});

describe('verdicts', () => {
  it.each([
    [1.1, 1.4, 0.1, 'shown'],
    [0.7, 0.9, 0.1, 'shown'],
    [0.96, 1.04, 0.1, 'too small to matter'],
    [1.01, 1.04, 0.1, 'too small to matter'],
    [0.94, 1.04, 0.1, 'could be none'],
    [0.8, 1.3, 0.5, 'could be none'],
    [1.1, 1.4, 0.51, 'not measured yet'],
  ])('a range of %d to %d at a prior share of %d is %s', (lower, upper, share, verdict) => {
    expect(verdictOf(lower, upper, share)).toBe(verdict);
  });

  it('widens the effects of guessed conditions outwards only, by what the errors may hide', () => {
    const noisy = simulatePool({ banks: 150, seed: 8, truth: drawTruth(4, 0), hasNoisyInputs: true }).checks;
    const { temperature, soc } = inputReliability(noisy);
    // True variances 5.5² and 0.4²/12, errors 2² and 0.08²: reliabilities of about 0.88 and 0.68.
    expect(temperature).toBeCloseTo(0.88, 1);
    expect(soc).toBeCloseTo(0.68, 1);
    const guessed = fitted(noisy, { isWithoutInteractions: true });
    const metered = fitted(
      noisy.map(({ temperatureSource: _t, socSource: _s, ...check }) => check),
      { isWithoutInteractions: true },
    );
    guessed.effects.forEach((effect, i) => {
      const plain = metered.effects[i]!;
      const isGuessed = effect.lever === 'heat' || effect.lever === 'chargeLevel';
      expect(effect.isAtLeast).toBe(isGuessed);
      expect(effect.lifeRatio).toBe(plain.lifeRatio);
      expect(effect.lower).toBe(plain.lower);
      if (isGuessed) expect(effect.upper).toBeGreaterThan(plain.upper);
      else expect(effect.upper).toBe(plain.upper);
    });
  });

  it('has a contrast of a use with itself at exactly 1', () => {
    const same = contrastUses(fit, { from: typical, to: typical });
    expect(same.lifeRatio).toBe(1);
    expect(same.seLn).toBe(0);
  });
});

describe('beside the model', () => {
  it('puts every check into one cell and group, with medians inside their bands', () => {
    const cells = stratify(checks);
    const groups = cells.flatMap((cell) => cell.groups);
    expect(groups.reduce((sum, group) => sum + group.checks, 0)).toBe(checks.length);
    for (const { years } of groups) {
      for (const { lower, median, upper } of years) {
        expect(lower).toBeLessThanOrEqual(median);
        expect(median).toBeLessThanOrEqual(upper);
      }
    }
    const curve = modelCurve(fit, groups[0]!, [1, 5]);
    expect(curve[1]!.estimate).toBeLessThan(curve[0]!.estimate);
  });

  it('finds a planted effect of clamping by matching, without the model', () => {
    const planted = checks.map((check) =>
      check.isClamped ? { ...check, capacityAh: check.capacityAh * 1.1 } : check,
    );
    const contrast = fitted(planted, { isWithoutInteractions: true, isScreening: false }).matched;
    const before = fitted(checks, { isWithoutInteractions: true, isScreening: false }).matched;
    expect(contrast.lnDifference! - before.lnDifference!).toBeCloseTo(Math.log(1.1), 10);
    expect(contrast.lower!).toBeGreaterThan(0);
    expect(before.lower!).toBeLessThan(0);
    expect(before.upper!).toBeGreaterThan(0);
  });

  it('measures how alike clamped and unclamped banks are', () => {
    const hotter = checks.map((check) =>
      check.isClamped ? { ...check, temperatureC: check.temperatureC + 5 } : check,
    );
    const difference = (pool: PoolCheck[]) =>
      fitted(pool, { isWithoutInteractions: true, exponent: 0.5 }).balance.find(
        ({ condition }) => condition === 'temperatureC',
      )!.standardisedDifference!;
    expect(difference(hotter) - difference(checks)).toBeGreaterThan(0.7);
  });
});

describe('the label at your use', () => {
  const use: Use = { ...typical, efcPerYear: 150 };
  const claim: LabelClaim = {
    ...{ cycles: 4000, depthFraction: 0.8, endShare: 0.8 },
    ...{ dischargeIt: 0.5, chargeIt: 0.5, temperatureC: 25, isClamped: true },
  };
  const one = fitted(checks, { exponent: 0.5, isWithoutInteractions: true });

  function labelled(change: Partial<LabelClaim>, at_: Use = use, cellType?: string) {
    const result = labelAtYourUse(one, { ...claim, ...change }, at_, { cellType });
    if (!result.ok) throw new Error(result.reason);
    return result;
  }

  /** ln(measured / implied) of a cell type at draws of psi, and of its m given psi, from the fit's own normal. */
  function drawnRatios(
    of: PooledFit,
    cellType: string,
    { count, narrowed }: { count: number; narrowed: number },
  ): number[] {
    const index = of.cellTypes.findIndex((row) => row.cellType === cellType);
    const [component] = of.components;
    const { psi, covariance, cellTypes } = component!;
    const { m, variance, slope } = cellTypes[index]!;
    const size = psi.length;
    const root = choleskyOf(covariance, size);
    const random = xoroshiro128plus(7);
    // Box and Muller: two uniform numbers make one normal one.
    const normal = () =>
      narrowed *
      Math.sqrt(-2 * Math.log(1 - uniformFloat64(random))) *
      Math.cos(2 * Math.PI * uniformFloat64(random));
    return Array.from({ length: count }, () => {
      const z = psi.map(normal);
      const moved = psi.map((_, i) =>
        z.reduce((sum, value, j) => sum + (j <= i ? root[i * size + j]! * value : 0), 0),
      );
      const drawnM =
        m + slope.reduce((sum, value, i) => sum + value * moved[i]!, 0) + Math.sqrt(variance) * normal();
      const drawn = {
        ...of,
        components: [{ ...component!, psi: psi.map((value, i) => value + moved[i]!) }],
      };
      drawn.components[0]!.cellTypes = cellTypes.map((row, k) => (k === index ? { ...row, m: drawnM } : row));
      const result = labelAtYourUse(drawn, claim, use, { cellType });
      if (!result.ok) throw new Error(result.reason);
      return Math.log(result.measuredYears.estimate / result.impliedYears.estimate);
    });
  }

  function choleskyOf(matrix: ArrayLike<number>, size: number): number[] {
    const root = new Array<number>(size * size).fill(0);
    for (let i = 0; i < size; i++)
      for (let j = 0; j <= i; j++) {
        let sum = matrix[i * size + j]!;
        for (let k = 0; k < j; k++) sum -= root[i * size + k]! * root[j * size + k]!;
        root[i * size + j] = i === j ? Math.sqrt(sum) : sum / root[j * size + j]!;
      }
    return root;
  }

  it('meets the claim with its multiplier to 1e-9', () => {
    const { kappa, claimYears } = labelled({});
    const psi = one.components[0]!.psi;
    // Written out afresh: fade of the claimed test, times kappa, is what the claim leaves.
    const calendar = Math.exp(psi[1]! + 0.5 * Math.log(claimYears));
    const cycling = Math.exp(
      psi[4]! +
        psi[5]! * Math.log((4000 * 0.8) / 500) +
        psi[6]! * Math.log(0.8 / 0.5) +
        psi[7]! * Math.log(0.5 / 0.2) +
        psi[9]!,
    );
    expect(psi[0]! + Math.log(1 - kappa * (calendar + cycling))).toBeCloseTo(Math.log(0.8), 9);
    expect(claimYears).toBeCloseTo((4000 * 0.8 * 4) / 8766, 12);
  });

  it('turns the life the model has itself into a ratio of 1', () => {
    // A use cycled as the claimed test is, without pause; its own life in cycles is the claim.
    const test: Use = {
      ...{ depthFraction: 0.8, dischargeIt: 0.5, temperatureC: 25, socMeanFraction: 0.5, isClamped: true },
      efcPerYear: 8766 / 4,
    };
    const first = labelled({}, test);
    const cycles = (first.measuredYears.estimate * test.efcPerYear) / 0.8;
    const round = labelled({ cycles }, test);
    expect(round.kappa).toBeCloseTo(1, 9);
    expect(round.impliedYears.estimate).toBeCloseTo(round.measuredYears.estimate, 8);
  });

  it('implies a longer life the more cycles are claimed', () => {
    const implied = [1000, 2000, 4000, 8000].map((cycles) => labelled({ cycles }).impliedYears.estimate);
    expect(implied).toEqual([...implied].sort((a, b) => a - b));
    expect(new Set(implied).size).toBe(4);
  });

  it('gives a range about the ratio, and none where the use lies outside the pool', () => {
    const { ratio, impliedYears, measuredYears } = labelled({});
    expect(ratio!.estimate).toBeCloseTo(measuredYears.estimate / impliedYears.estimate, 9);
    expect(ratio!.lower).toBeLessThan(ratio!.estimate);
    const outside = labelled({}, { ...use, temperatureC: 55 });
    expect(outside.ratio).toBeNull();
    expect(outside.outside[0]).toMatchObject({ condition: 'temperatureC' });
  });

  it('has no ratio for a claim without its conditions', () => {
    const result = labelAtYourUse(one, { ...claim, temperatureC: null }, use);
    expect(result).toEqual({ ok: false, reason: 'conditions not stated' });
  });

  it('measures the cell type asked for, and implies the same of each', () => {
    const named = one.cellTypes.filter(({ banks, owners }) => banks >= 10 && owners >= 5).slice(0, 3);
    expect(named).toHaveLength(3);
    const average = labelled({});
    for (const { cellType, m } of named) {
      const own = labelled({}, use, cellType);
      const life = lifeAt(one, use, { cellType });
      expect(own.measuredYears.estimate).toBeCloseTo(life.years.estimate, 9);
      expect(own.measuredYears.upper).toBeCloseTo(life.years.upper, 9);
      // The cell type's own e^m is met by kappa: at one exponent their logarithms differ by m.
      expect(Math.log(own.kappa)).toBeCloseTo(Math.log(average.kappa) - m, 9);
      expect(own.impliedYears.estimate).toBeCloseTo(average.impliedYears.estimate, 9);
      expect(own.ratio!.estimate).toBeCloseTo(life.years.estimate / average.impliedYears.estimate, 9);
    }
  });

  it('gives a cell type the range that drawing its parameters gives', () => {
    const { cellType } = one.cellTypes.find(({ banks, owners }) => banks >= 10 && owners >= 5)!;
    const { ratio } = labelled({}, use, cellType);
    // Draws a fifth as wide, where the ratio is all but linear; of 1,500 the sd is known to 1.8 % (one standard error).
    const narrowed = 0.2;
    const draws = drawnRatios(one, cellType, { count: 1500, narrowed });
    const mean = draws.reduce((sum, value) => sum + value, 0) / draws.length;
    const sd = Math.sqrt(draws.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (draws.length - 1));
    const half = Math.log(ratio!.upper / ratio!.lower) / 2 / 1.6448536;
    expect((half * narrowed) / sd).toBeGreaterThan(0.93);
    expect((half * narrowed) / sd).toBeLessThan(1.07);
  });

  it('asks for a cell type of the fit', () => {
    expect(() => labelled({}, use, 'nobody')).toThrow(RangeError);
  });

  it('refuses a claim without sense', () => {
    expect(() => labelAtYourUse(one, { ...claim, cycles: 0 }, use)).toThrow(RangeError);
    expect(() => labelAtYourUse(one, { ...claim, endShare: 1 }, use)).toThrow(RangeError);
  });
});
