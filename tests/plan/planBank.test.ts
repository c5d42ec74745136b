import { fitPool } from '@/lib/fit/pooled/fitPool';
import { lifeAt, typicalFade, type PublishedFit, type Use } from '@/lib/fit/pooled/published';
import {
  capacityPath,
  energyOfLoads,
  fixtureBreakEven,
  planBank,
  sizeCurve,
  type NightUse,
  type PlanInput,
} from '@/lib/plan';

import { readPoolFixture } from '../support/pools';

const fit = fitted();
function fitted(): PublishedFit {
  const result = fitPool(readPoolFixture('pool-small'), { isWithoutInteractions: true });
  if (!result.ok) throw new Error(result.reason);
  return result;
}

const input: PlanInput = {
  nightWh: 6000,
  nightHours: 12,
  peakW: 2500,
  ratedWh: 15_000,
  usableFraction: 0.9,
  nightsPerYear: 365,
  temperatureC: 25,
  socMeanFraction: 0.5,
  isClamped: false,
  roundTripFraction: 0.9,
  cellsMinor: 180_000,
  otherMinor: 60_000,
  upkeepMinorPerYear: 0,
  chargingMinorPerKwh: 8,
  tariffMinorPerKwh: 34,
  discountRate: 0.03,
};

const night: NightUse = {
  cellWh: 6000,
  nightsPerYear: 365,
  ratedWh: 12_000,
  usableFraction: 1,
  dischargeIt: 0.05,
  temperatureC: 25,
  socMeanFraction: 0.5,
  isClamped: false,
};
const steady = { start: 1, at: (_: Use, years: number) => ({ fade: 0.02 * years, calendarShare: 0.5 }) };

describe('capacityPath', () => {
  it('follows a straight fade exactly: 2 % a year end in year 10, the depth rises as energy / capacity', () => {
    const path = capacityPath(steady, night, { horizonYears: 40 });
    expect(path.lifeYears).toBeCloseTo(10, 10);
    const fifth = path.points.find(({ years }) => years === 5)!;
    expect(fifth.wantedDepthFraction).toBeCloseTo(0.5 / 0.9, 12);
    // The energy is held: 365 nights of 6 kWh a year, whatever the capacity.
    expect(path.points.at(-1)!.takenWh).toBeCloseTo(10 * 365 * 6000, 4);
    expect(path.use.efcPerYear).toBeCloseTo((365 * 6000) / 12_000, 9);
  });

  it('takes the mean depth to date: between the first and the last depth, as the integral says', () => {
    const path = capacityPath(steady, night, { horizonYears: 10 });
    // Mean of 0.5 / (1 - 0.02 t) over ten years: 0.5 ln(1 / 0.8) / 0.2. Steps of a quarter year lag by half a step.
    expect(path.use.depthFraction).toBeCloseTo((0.5 * Math.log(1 / 0.8)) / 0.2, 2);
  });

  it('says when the night no longer fits, and gives no more than the limits from then on', () => {
    const path = capacityPath(steady, { ...night, usableFraction: 0.55 }, { horizonYears: 10 });
    // 0.5 / (1 - 0.02 t) = 0.55 at t = 4.5454...
    expect(path.shortYears).toBeCloseTo((1 - 0.5 / 0.55) / 0.02, 2);
    expect(path.points.at(-1)!.takenWh).toBeLessThan(10 * 365 * 6000);
    expect(capacityPath(steady, { ...night, usableFraction: 0.4 }, { horizonYears: 2 }).shortYears).toBe(0);
  });

  it('ends without a life where the horizon comes first', () => {
    const path = capacityPath(steady, night, { horizonYears: 5 });
    expect(path.lifeYears).toBeNull();
    expect(path.points.at(-1)!.years).toBe(5);
  });
});

describe('typicalFade', () => {
  it('comes to 80 % when lifeAt says so, within 1 % (exponents mixed on another scale)', () => {
    const use: Use = {
      ...{ depthFraction: 0.6, dischargeIt: 0.1, temperatureC: 25, socMeanFraction: 0.5 },
      ...{ efcPerYear: 219, isClamped: false },
    };
    const years = lifeAt(fit, use).years.estimate;
    const fade = typicalFade(fit);
    expect(fade.start * (1 - fade.at(use, years).fade)).toBeCloseTo(0.8, 2);
  });
});

describe('planBank', () => {
  const plan = planBank(fit, input);

  it('gives the first night in depth and It by hand', () => {
    const cellWh = 6000 / Math.sqrt(0.9);
    expect(plan.first.depthFraction).toBeCloseTo(cellWh / (15_000 * typicalFade(fit).start), 10);
    expect(plan.first.dischargeIt).toBeCloseTo(cellWh / 12 / 15_000, 12);
    expect(plan.first.peakIt).toBeCloseTo(2500 / Math.sqrt(0.9) / 15_000, 12);
  });

  it('lives as long as the model says at its own mean depth, within 1 %', () => {
    const end = planBank(fit, { ...input, temperatureC: 35, nightWh: 10_000 });
    expect(end.isCapped).toBe(false);
    expect(Math.abs(end.years.estimate / end.life.years.estimate - 1)).toBeLessThan(0.01);
    expect(end.years.lower).toBeLessThan(end.years.estimate);
    expect(end.calendarYears).toBeGreaterThan(end.life.years.estimate);
    expect(end.cyclingYears).toBeGreaterThan(end.life.years.estimate);
  });

  it('counts energy as what the loads get: nights x energy x years while it fits', () => {
    expect(plan.shortYears).toBeNull();
    expect(plan.deliveredKwh.estimate).toBeCloseTo(6 * 365 * plan.years.estimate, 3);
  });

  it('costs less per kWh with cheaper cells, and gains what the tariff pays over the cost', () => {
    const cheaper = planBank(fit, { ...input, cellsMinor: 90_000 });
    expect(cheaper.costMinorPerKwh.estimate).toBeLessThan(plan.costMinorPerKwh.estimate);
    expect(cheaper.gainMinor.estimate - plan.gainMinor.estimate).toBeCloseTo(90_000, 6);
    // At a tariff equal to the levelised cost nothing is gained.
    const even = planBank(fit, { ...input, tariffMinorPerKwh: plan.costMinorPerKwh.estimate });
    expect(even.gainMinor.estimate).toBeCloseTo(0, 4);
  });

  it('counts no further than three times the reach', () => {
    const gentle = planBank(fit, { ...input, ratedWh: 60_000, temperatureC: 15 });
    expect(gentle.isCapped).toBe(true);
    expect(gentle.years.estimate).toBeCloseTo(3 * gentle.life.reach, 9);
  });

  it('is refused on nonsense', () => {
    expect(() => planBank(fit, { ...input, nightWh: 0 })).toThrow(RangeError);
    expect(() => planBank(fit, { ...input, roundTripFraction: 1.2 })).toThrow(RangeError);
    expect(() => planBank(fit, input, { cellType: 'nobody' })).toThrow(RangeError);
  });
});

describe('sizeCurve', () => {
  it('starts at the smallest bank that gives the night, and small banks are cycled deeper', () => {
    const curve = sizeCurve(fit, input);
    expect(curve[0]!.ratedWh).toBeCloseTo(6000 / Math.sqrt(0.9) / 0.9, 9);
    curve.slice(1).forEach((point, i) => {
      expect(point.firstDepthFraction).toBeLessThan(curve[i]!.firstDepthFraction);
      expect(point.years.estimate).toBeGreaterThanOrEqual(curve[i]!.years.estimate - 1e-9);
    });
  });
});

describe('fixtureBreakEven', () => {
  it('without discount asks for as much more life as it adds to the price', () => {
    const worth = fixtureBreakEven({ bankMinor: 1000, fixtureMinor: 100, lifeYears: 10, discountRate: 0 })!;
    expect(worth.breakEvenRatio).toBeCloseTo(1.1, 12);
    expect(worth.breakEvenAddedYears).toBeCloseTo(1, 12);
  });

  it('with discount makes the yearly repayments equal', () => {
    const worth = fixtureBreakEven({
      bankMinor: 1000,
      fixtureMinor: 100,
      lifeYears: 10,
      discountRate: 0.05,
    })!;
    const years = 10 * worth.breakEvenRatio;
    // Annuity factors by their formula, (1 - 1.05^-n) / 0.05.
    const annuity = (n: number) => (1 - 1.05 ** -n) / 0.05;
    expect(1100 / annuity(years)).toBeCloseTo(1000 / annuity(10), 9);
  });

  it('says so when no life is long enough', () => {
    expect(
      fixtureBreakEven({ bankMinor: 1000, fixtureMinor: 900, lifeYears: 30, discountRate: 0.05 }),
    ).toBeNull();
  });
});

it('energyOfLoads adds watts x hours', () => {
  expect(
    energyOfLoads([
      { name: 'fridge', watts: 60, hours: 10 },
      { name: 'lights', watts: 40, hours: 5 },
    ]),
  ).toBe(800);
});
