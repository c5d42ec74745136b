import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { crossingsOf, kaplanMeier, turnbull, weibull, weibullQuantile, type PoolCheck } from '@/lib/fit';
import type { WeibullFit } from '@/lib/fit/survival/weibull';
import { readReferenceJson } from '../support/reference';

const { time, status } = readReferenceJson<{ sixMP: { time: number[]; status: number[] } }>(
  'survival.json',
).sixMP;

const fittedWeibull = (observations: Parameters<typeof weibull>[0]): WeibullFit => {
  const fit = weibull(observations);
  if (!fit.ok) throw new Error(fit.reason);
  return fit;
};

// A subject seen from 0 to t is the same evidence as one seen from 0 to u and another that entered at u.
const splitAt = 8;

describe('delayed entry', () => {
  it('leaves the product-limit curve as it is when subjects are split into two spells', () => {
    const whole = time.map((t, i) => ({ time: t, isEvent: status[i] === 1 }));
    const spells = whole.flatMap((subject) =>
      subject.time > splitAt
        ? [
            { time: splitAt, isEvent: false },
            { ...subject, entry: splitAt },
          ]
        : [subject],
    );
    expect(spells.length).toBeGreaterThan(whole.length);
    expect(kaplanMeier(spells)).toEqual(kaplanMeier(whole));
  });

  it('counts a late subject only after its entry', () => {
    // By hand: at 2 one of two at risk, at 5 one of two (the third entered at 3): 1/2, then 1/4.
    const steps = kaplanMeier([
      { time: 2, isEvent: true },
      { time: 6, isEvent: false },
      { time: 5, isEvent: true, entry: 3 },
    ]);
    expect(steps.map(({ atRisk, survival }) => [atRisk, survival])).toEqual([
      [2, 0.5],
      [2, 0.25],
    ]);
  });

  it('leaves the Weibull curve as it is when subjects are split into two spells', () => {
    const whole = time.map((t, i) => ({ left: t, right: status[i] === 1 ? t : Infinity }));
    const spells = whole.flatMap((subject) =>
      subject.left > splitAt
        ? [
            { left: splitAt, right: Infinity },
            { ...subject, entry: splitAt },
          ]
        : [subject],
    );
    const [split, joined] = [fittedWeibull(spells), fittedWeibull(whole)];
    expect(Math.abs(split.mu - joined.mu)).toBeLessThan(1e-9);
    expect(Math.abs(split.sigma - joined.sigma)).toBeLessThan(1e-9);
    expect(Math.abs(split.logLikelihood - joined.logLikelihood)).toBeLessThan(1e-9);
  });

  it('gives the product-limit masses for events known within a narrow interval and late entries', () => {
    const late = time.map((t, i) => ({ time: t, isEvent: status[i] === 1, entry: i % 3 === 0 ? 4 : 0 }));
    const steps = kaplanMeier(late);
    const fit = turnbull(
      late.map(({ time: t, isEvent, entry }) =>
        isEvent ? { left: t - 1e-6, right: t, entry } : { left: t, right: Infinity, entry },
      ),
    );
    if (!fit.ok) throw new Error(fit.reason);
    steps.forEach(({ time: t, survival }) => {
      const found = fit.intervals.find(({ right }) => right === t);
      expect(Math.abs((found?.survivalAfter ?? NaN) - survival)).toBeLessThan(1e-7);
    });
  });

  it('settles on the maximum for hundreds of banks with ages of their own', () => {
    const random = xoroshiro128plus(77);
    const observations = Array.from({ length: 600 }, () => {
      const crossing = 8 * (-Math.log(uniformFloat64(random))) ** (1 / 2);
      const first = 0.5 + 3 * uniformFloat64(random);
      const checks = Array.from({ length: 6 }, (_, year) => first + year).filter((age) => age < 7);
      const left = checks.filter((age) => age < crossing).at(-1);
      return left === undefined
        ? []
        : [{ left, right: checks.find((age) => age >= crossing) ?? Infinity, entry: first }];
    }).flat();
    const fit = turnbull(observations);
    if (!fit.ok) throw new Error(fit.reason);
    expect(fit.kuhnTucker).toBeLessThan(1 + 1e-8);
    expect(fit.intervals.reduce((sum, { mass }) => sum + mass, 0)).toBeCloseTo(1, 5);
    // Truth given survival to the earliest entry: S(6) = exp(-(6/8)^2); three binomial errors of 600 are 0.06.
    const atSix = fit.intervals.filter(({ right }) => right <= 6).at(-1)?.survivalAfter ?? 1;
    const earliest = Math.min(...observations.map(({ entry }) => entry));
    expect(Math.abs(atSix - Math.exp((earliest / 8) ** 2 - (6 / 8) ** 2))).toBeLessThan(0.1);
  });

  it('covers the true Weibull quantile when banks join late and are seen once a year', () => {
    // Truth: shape 3, scale 14 years, so that 10 % have crossed by 14 (-ln 0.9)^(1/3) years.
    const truth = 14 * (-Math.log(0.9)) ** (1 / 3);
    const random = xoroshiro128plus(2024);
    let covered = 0;
    let ignoringEntry = 0;
    const pools = 200;
    for (let pool = 0; pool < pools; pool++) {
      const observations = Array.from({ length: 200 }, () => {
        for (;;) {
          const crossing = 14 * (-Math.log(uniformFloat64(random))) ** (1 / 3);
          const entry = 1 + 9 * uniformFloat64(random);
          if (crossing <= entry) continue;
          const yearsSeen = 1 + Math.floor(6 * uniformFloat64(random));
          const checks = Array.from({ length: yearsSeen + 1 }, (_, year) => entry + year);
          const right = checks.find((age) => age >= crossing) ?? Infinity;
          const left = checks.filter((age) => age < crossing).at(-1) as number;
          return { left, right, entry };
        }
      });
      const range = weibullQuantile(fittedWeibull(observations), 0.1);
      if (range.lower <= truth && truth <= range.upper) covered++;
      const naive = weibullQuantile(
        fittedWeibull(observations.map(({ left, right }) => ({ left, right }))),
        0.1,
      );
      if (naive.lower <= truth && truth <= naive.upper) ignoringEntry++;
    }
    // Three standard errors of 0.9 in 200 pools are 0.064.
    expect(covered / pools).toBeGreaterThan(0.836);
    expect(covered / pools).toBeLessThan(0.964);
    // Without the entry the young failures that were never seen are missing, and life looks longer.
    expect(ignoringEntry / pools).toBeLessThan(0.5);
  });
});

describe('crossingsOf', () => {
  const check = (bank: string, ageYears: number, capacityAh: number): PoolCheck => ({
    bank,
    owner: `o-${bank}`,
    cellType: 'A',
    isClamped: false,
    depthFraction: 0.5,
    dischargeIt: 0.2,
    temperatureC: 22,
    socMeanFraction: 0.5,
    ageYears,
    efc: 200 * ageYears,
    ratedAh: 100,
    capacityAh,
    relSd: 0.012,
  });

  it('places each bank between its last check above 80 % and its first below', () => {
    const { crossings: found, alreadyBelow } = crossingsOf([
      check('a', 3, 85),
      check('a', 1, 98),
      check('a', 4, 79),
      check('a', 5, 81),
      check('b', 2, 90),
      check('b', 6, 82),
      check('c', 7, 75),
      check('d', 2, 81),
      check('d', 2, 79),
    ]);
    expect(found.map(({ bank, left, right, entry }) => [bank, left, right, entry])).toEqual([
      ['a', 3, 4, 1],
      ['b', 6, Infinity, 2],
    ]);
    expect(alreadyBelow).toBe(2);
    expect(found[0]?.owner).toBe('o-a');
    expect(turnbull(found).ok).toBe(true);
  });

  it('refuses a level outside 0 to 1', () => {
    expect(() => crossingsOf([], 80)).toThrow(RangeError);
  });
});

describe('mistakes of the caller and samples without an answer', () => {
  it('throws on intervals out of order', () => {
    for (const wrong of [
      { left: 3, right: 2 },
      { left: 3, right: 3 },
      { left: 3, right: 4, entry: 3.5 },
      { left: NaN, right: 4 },
      { left: Infinity, right: Infinity },
    ]) {
      expect(() => turnbull([wrong])).toThrow(RangeError);
    }
    expect(() => weibull([{ left: 3, right: 2 }])).toThrow(RangeError);
    expect(() => kaplanMeier([{ time: 2, isEvent: true, entry: 2 }])).toThrow(RangeError);
    expect(() => kaplanMeier([{ time: 2, isEvent: true }], 90)).toThrow(RangeError);
  });

  it('says when there is nothing to fit', () => {
    expect(turnbull([])).toEqual({ ok: false, reason: 'noObservations' });
    expect(weibull([{ left: 4, right: Infinity }])).toEqual({ ok: false, reason: 'noEvents' });
    expect(kaplanMeier([{ time: 2, isEvent: false }])).toEqual([]);
  });
});
