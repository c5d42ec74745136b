import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { probit } from 'simple-statistics';
import { fitCurve, lifeAtUse, statusAt, type CurveFit, type PoolCheck } from '@/lib/fit';
import { leastSquares } from '@/lib/fit/leastSquares';
import { refitPowerLaw } from '@/lib/fit/curve/refitPowerLaw';

const truth = { k: 0.045, z: 0.6 };

/** A pool following the truth, with a factor of its own for each bank and noise of each check. */
function simulatedPool(seed: number, bankCount: number, checksPerBank = 4): PoolCheck[] {
  const random = xoroshiro128plus(seed);
  const normal = () => probit(uniformFloat64(random));
  return Array.from({ length: bankCount }, (_, b) => {
    const factor = Math.exp(0.15 * normal());
    const efcPerYear = 100 + 200 * uniformFloat64(random);
    return Array.from({ length: checksPerBank }, (__, j) => {
      const ageYears = j + 0.5 + uniformFloat64(random);
      const efc = efcPerYear * ageYears;
      const relSd = j % 2 === 0 ? 0.006 : 0.012;
      const fade = factor * truth.k * (efc / 500) ** truth.z;
      return {
        bank: `b${b}`,
        owner: `o${b}`,
        cellType: 'A',
        isClamped: b % 2 === 0,
        depthFraction: 0.5,
        dischargeIt: 0.2,
        temperatureC: 22,
        socMeanFraction: 0.5,
        ageYears,
        efc,
        ratedAh: 100,
        capacityAh: 100 * (1 - fade + relSd * normal()),
        relSd,
      };
    });
  }).flat();
}

function fitted(checks: readonly PoolCheck[], seed = 1): CurveFit {
  const result = fitCurve(checks, { seed, bootstrap: 200 });
  if (!result.ok) throw new Error(result.reason);
  return result;
}

describe('fitCurve', () => {
  it('finds k and z exactly when the checks lie on a power law', () => {
    const exact = simulatedPool(3, 8).map((check) => ({
      ...check,
      capacityAh: 100 * (1 - truth.k * (check.efc / 500) ** truth.z),
    }));
    const curve = fitted(exact);
    expect(curve.k.estimate).toBeCloseTo(truth.k, 10);
    expect(curve.z.estimate).toBeCloseTo(truth.z, 9);
    expect(curve.z.upper - curve.z.lower).toBeLessThan(1e-6);
    // (0.2 / k)^(1/z) * 500, by hand from the definition.
    expect(curve.efcTo80.estimate / (500 * (0.2 / truth.k) ** (1 / truth.z))).toBeCloseTo(1, 8);
  });

  it.each([6, 20])('covers the true k in about 90 %% of pools of %i banks', (bankCount) => {
    const pools = 150;
    let covered = 0;
    for (let seed = 1; seed <= pools; seed++) {
      const { k } = fitted(simulatedPool(seed * 7919, bankCount), seed);
      // The mean factor of the banks is exp(0.15^2 / 2), which a least-squares curve follows.
      const center = truth.k * Math.exp(0.15 ** 2 / 2);
      if (k.lower <= center && center <= k.upper) covered++;
    }
    // Four standard errors of a share of 0.9 in 150 pools are 0.098.
    expect(covered / pools).toBeGreaterThan(0.8);
    expect(covered / pools).toBeLessThan(0.99);
  });

  it('gives the same result for the same seed in any order of the checks', () => {
    const pool = simulatedPool(5, 10);
    expect(fitted([...pool].reverse(), 9)).toEqual(fitted(pool, 9));
    expect(fitted(pool, 10).k.lower).not.toBe(fitted(pool, 9).k.lower);
  });

  it('weights a check by 1 / relSd squared', () => {
    const pool = simulatedPool(11, 8);
    const doubled = [...pool, ...pool.map((check) => ({ ...check }))];
    const halved = pool.map((check) => ({ ...check, relSd: check.relSd / Math.SQRT2 }));
    expect(fitted(doubled).k.estimate).toBeCloseTo(fitted(halved).k.estimate, 10);
  });

  it('counts owners, banks and checks, and takes the reach as 95 % quantiles', () => {
    const pool = simulatedPool(2, 9);
    const curve = fitted(pool);
    expect([curve.owners, curve.banks, curve.checks]).toEqual([9, 9, 36]);
    const sorted = pool.map((check) => check.efc).sort((a, b) => a - b);
    // Quantile type 7: position 0.95 * 35 = 33.25.
    const low = sorted[33] as number;
    expect(curve.reach.efc).toBeCloseTo(low + 0.25 * ((sorted[34] as number) - low), 9);
    expect(curve.efcPerYear).toBeGreaterThan(100);
    expect(curve.efcPerYear).toBeLessThan(300);
  });

  it('draws the curve to three times the reach with the status of every point', () => {
    const { points, reach, capacityAtReach } = fitted(simulatedPool(2, 9));
    expect(points).toHaveLength(61);
    expect(points[0]).toMatchObject({ efc: 0, capacityFraction: 1, lower: 1, upper: 1, status: 'measured' });
    expect(points[20]?.efc).toBeCloseTo(reach.efc, 9);
    expect(points[20]?.capacityFraction).toBeCloseTo(capacityAtReach.estimate, 12);
    expect(points.map((point) => point.status).join(' ')).toBe(
      [...Array(21).fill('measured'), ...Array(20).fill('projected'), ...Array(20).fill('extrapolated')].join(
        ' ',
      ),
    );
    for (const point of points) {
      expect(point.lower).toBeLessThanOrEqual(point.capacityFraction);
      expect(point.upper).toBeGreaterThanOrEqual(point.capacityFraction);
    }
  });

  it('says so when the exponent ends on the edge of its range', () => {
    const flat = simulatedPool(4, 8).map((check, i) => ({ ...check, capacityAh: 95 + (i % 3) * 0.01 }));
    const curve = fitted(flat);
    expect(curve.zBound).toBe('lower');
    expect(curve.z.estimate).toBe(0.2);
  });

  it('refuses fewer owners than asked for, however many banks they have', () => {
    const pool = simulatedPool(1, 12).map((check, i) => ({ ...check, owner: `o${i % 4}` }));
    expect(fitCurve(pool, { seed: 1 })).toEqual({ ok: false, reason: 'tooFewOwners' });
    expect(fitCurve(pool, { seed: 1, minOwners: 4 }).ok).toBe(true);
    expect(fitCurve([], { seed: 1 })).toEqual({ ok: false, reason: 'tooFewOwners' });
  });

  it('refuses too few checks, too little spread and a pool without fade', () => {
    const five = simulatedPool(1, 5, 1);
    expect(fitCurve(five, { seed: 1 })).toEqual({ ok: false, reason: 'tooFewChecks' });
    const close = simulatedPool(1, 8).map((check, i) => ({ ...check, efc: 400 + i }));
    expect(fitCurve(close, { seed: 1 })).toEqual({ ok: false, reason: 'tooLittleSpread' });
    const asNew = simulatedPool(1, 8).map((check) => ({ ...check, capacityAh: 101 }));
    expect(fitCurve(asNew, { seed: 1 })).toEqual({ ok: false, reason: 'noFade' });
  });

  it('leaves out checks at no cycles and throws on values that cannot be', () => {
    const pool = simulatedPool(6, 8);
    const atStart = { ...(pool[0] as PoolCheck), efc: 0, ageYears: 0, capacityAh: 103 };
    expect(fitted([...pool, atStart])).toEqual(fitted(pool));
    for (const wrong of [{ efc: -1 }, { efc: NaN }, { ratedAh: 0 }, { relSd: 0 }, { capacityAh: Infinity }]) {
      expect(() => fitCurve([...pool, { ...atStart, ...wrong }], { seed: 1 })).toThrow(RangeError);
    }
    expect(() => fitCurve(pool, { seed: 1, bootstrap: 0 })).toThrow(RangeError);
  });
});

describe('refitPowerLaw', () => {
  it('finds the minimum that the package with polishing finds, for drawn weights', () => {
    const random = xoroshiro128plus(17);
    for (let pool = 1; pool <= 40; pool++) {
      const checks = simulatedPool(pool * 31, 7);
      const logEfc = Float64Array.from(checks, (check) => Math.log(check.efc / 500));
      const fade = Float64Array.from(checks, (check) => 1 - check.capacityAh / 100);
      const sd = Float64Array.from(
        checks,
        (check) => check.relSd / Math.sqrt(1 + 3 * uniformFloat64(random)),
      );
      const weights = Float64Array.from(sd, (value) => 1 / value ** 2);
      const refit = refitPowerLaw({ logEfc, fade, sd }, weights, { k: 0.1, z: 1 });
      const reference = leastSquares(
        {
          observed: fade,
          sd,
          model:
            ([k, z]) =>
            (i) =>
              (k as number) * Math.exp((z as number) * (logEfc[i] as number)),
        },
        { start: [0.1, 1], lower: [1e-4, 0.2], upper: [0.6, 2] },
      );
      if (!reference.ok) throw new Error(reference.reason);
      expect(refit.k / (reference.parameters[0] as number)).toBeCloseTo(1, 6);
      expect(refit.z / (reference.parameters[1] as number)).toBeCloseTo(1, 6);
    }
  });
});

describe('lifeAtUse and statusAt', () => {
  it('divides the EFC by the use and judges it by the nearer reach', () => {
    const curve = fitted(simulatedPool(2, 9));
    const life = lifeAtUse(curve, 200);
    expect(life.years.estimate).toBeCloseTo(curve.efcTo80.estimate / 200, 9);
    expect(life.reachYears).toBeCloseTo(Math.min(curve.reach.years, curve.reach.efc / 200), 12);
    expect(lifeAtUse(curve, 20).reachYears).toBe(curve.reach.years);
    expect(life.status).toBe(statusAt(life.years.estimate, life.reachYears));
    expect(() => lifeAtUse(curve, 0)).toThrow(RangeError);
  });

  it('changes status at one, two and three times the reach', () => {
    expect([10, 10.01, 20, 20.01, 30, 30.01].map((value) => statusAt(value, 10))).toEqual([
      'measured',
      'projected',
      'projected',
      'extrapolated',
      'extrapolated',
      'beyond',
    ]);
    expect(() => statusAt(1, 0)).toThrow(RangeError);
  });
});
