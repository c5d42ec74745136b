import { createDraws } from '@/data/demo/random';
import { drawUse } from '@/data/demo/bankUse';
import {
  chargeWindowOfLimits,
  clampForceOfSprings,
  clampForceOfTorque,
  climateBandsC,
  depthFromEnergy,
  rateFromPower,
  usualCellTemperatureC,
} from '@/lib/measure';
import type { ClimateBand, Standing } from '@/lib/measure';

/** 240 Ah at 51.2 V: 12,288 Wh. */
const bank = { ratedAh: 240, nominalV: 51.2 };
const bands: ClimateBand[] = ['cold', 'cool', 'mild', 'warm', 'hot'];
const standings: Standing[] = ['indoors', 'shed', 'garage', 'vehicle', 'boat'];

describe('depthFromEnergy', () => {
  it('is the energy over what the bank is rated to hold: 6 kWh of 12.288 kWh', () => {
    expect(depthFromEnergy(6000, bank)).toBeCloseTo(0.48828, 5);
  });

  it('adds what an inverter takes: 6 kWh behind one that passes 92 % on', () => {
    expect(depthFromEnergy(6000, bank, 0.92)).toBeCloseTo(0.53074, 5);
  });

  it('tells more than the bank holds as more than 1', () => {
    expect(depthFromEnergy(20_000, bank)).toBeCloseTo(1.6276, 4);
  });

  it.each([
    [0, bank, 1],
    [Number.NaN, bank, 1],
    [6000, { ...bank, ratedAh: 0 }, 1],
    [6000, bank, 0],
    [6000, bank, 1.1],
  ])('refuses %p of %p through %p', (energyWh, size, share) => {
    expect(() => depthFromEnergy(energyWh, size, share)).toThrow(RangeError);
  });
});

describe('rateFromPower', () => {
  it('is the power over the voltage, over the rated capacity: 1200 W are 23.4375 A of 240', () => {
    expect(rateFromPower(1200, bank)).toBeCloseTo(23.4375 / 240, 12);
  });

  it('adds what an inverter takes: 1200 W behind one that passes 92 % on', () => {
    expect(rateFromPower(1200, bank, 0.92)).toBeCloseTo(0.10615, 5);
  });

  it('refuses no power', () => {
    expect(() => rateFromPower(0, bank)).toThrow(RangeError);
  });
});

describe('usualCellTemperatureC', () => {
  it('rises from band to band wherever the bank stands', () => {
    for (const standing of standings) {
      const temperatures = bands.map((band) => usualCellTemperatureC(band, standing));
      expect([...temperatures].sort((one, other) => one - other)).toEqual(temperatures);
      expect(new Set(temperatures).size).toBe(bands.length);
    }
  });

  it.each(bands)('lies above what the band %s has outdoors, by no more than 10 K', (band) => {
    const { from, below } = climateBandsC[band];
    // Open ends are taken to reach 4 K further.
    const [lowest, highest] = [from ?? below! - 4, below ?? from! + 4];
    for (const standing of standings) {
      const temperature = usualCellTemperatureC(band, standing);
      expect(temperature).toBeGreaterThan((lowest + highest) / 2);
      expect(temperature).toBeLessThan((lowest + highest) / 2 + 10);
    }
  });

  // Means of 400 draws with a scatter of 1.5 K: within 0.3 K of their own mean, far inside the tolerance.
  it.each(bands)("agrees with the demo's banks of the band %s within 2 K", (climateBand) => {
    for (const place of standings) {
      const temperatures = Array.from(
        { length: 400 },
        (_, index) => drawUse(createDraws(7, 9, index, 0), { climateBand, place }, 'home').temperatureC,
      );
      const mean = temperatures.reduce((sum, one) => sum + one, 0) / temperatures.length;
      expect(Math.abs(usualCellTemperatureC(climateBand, place) - mean)).toBeLessThan(2);
    }
  });
});

describe('chargeWindowOfLimits', () => {
  it('goes from limit to limit without a depth: 3.0 V and 3.45 V are 8 and 95 %', () => {
    expect(chargeWindowOfLimits({ chargeLimitV: 3.45, dischargeLimitV: 3 }, null)).toEqual({
      ok: true,
      highFraction: 0.95,
      lowFraction: 0.08,
      lowBy: 'limit',
    });
  });

  it('takes the low end from the depth where the bank is not emptied: 95 % less 60 %', () => {
    const window = chargeWindowOfLimits({ chargeLimitV: 3.45, dischargeLimitV: 3 }, 0.6);
    expect(window).toMatchObject({ ok: true, lowBy: 'depth' });
    expect(window.ok && window.lowFraction).toBeCloseTo(0.35, 12);
  });

  it('does not go below the discharge limit', () => {
    const window = chargeWindowOfLimits({ chargeLimitV: 3.45, dischargeLimitV: 3 }, 1);
    expect(window).toMatchObject({ ok: true, lowBy: 'limit', lowFraction: 0.08 });
  });

  it('reads between the points of its table in proportion: 3.475 V is 96.5 %', () => {
    const window = chargeWindowOfLimits({ chargeLimitV: 3.475, dischargeLimitV: 2.65 }, null);
    expect(window.ok && window.highFraction).toBeCloseTo(0.965, 9);
    expect(window.ok && window.lowFraction).toBeCloseTo(0.015, 9);
  });

  it('holds to the ends of its table outside of it', () => {
    const window = chargeWindowOfLimits({ chargeLimitV: 3.65, dischargeLimitV: 2.4 }, null);
    expect(window).toMatchObject({ highFraction: 1, lowFraction: 0 });
  });

  it.each([
    [{ chargeLimitV: null, dischargeLimitV: 3 }, null, 'noChargeLimit'],
    [{ chargeLimitV: 3.35, dischargeLimitV: 3 }, 0.5, 'chargeLimitFlat'],
    [{ chargeLimitV: 3.5, dischargeLimitV: null }, null, 'noDischargeLimit'],
    [{ chargeLimitV: 3.5, dischargeLimitV: 3.2 }, null, 'dischargeLimitFlat'],
  ])('says of %p with depth %p why there is none: %s', (limits, depth, reason) => {
    expect(chargeWindowOfLimits(limits, depth)).toEqual({ ok: false, reason });
  });

  it('refuses a depth above 1', () => {
    expect(() => chargeWindowOfLimits({ chargeLimitV: 3.5, dischargeLimitV: 3 }, 60)).toThrow(RangeError);
  });
});

describe('clampForceOfTorque', () => {
  it('is n T / (K d): 2 N·m on four M6 rods are 4 x 1667 N', () => {
    expect(clampForceOfTorque({ torqueNm: 2, threadMm: 6, count: 4 })).toBeCloseTo(6666.67, 2);
  });

  it('falls with more friction: K of 0.25 gives 5333 N', () => {
    expect(clampForceOfTorque({ torqueNm: 2, threadMm: 6, count: 4, nutFactor: 0.25 })).toBeCloseTo(
      5333.33,
      2,
    );
  });

  it('refuses a thread of 0 mm', () => {
    expect(() => clampForceOfTorque({ torqueNm: 2, threadMm: 0, count: 4 })).toThrow(RangeError);
  });
});

describe('clampForceOfSprings', () => {
  it('is n k x: four of 25 N/mm, 8 mm shorter, are 800 N', () => {
    expect(clampForceOfSprings({ rateNPerMm: 25, compressionMm: 8, count: 4 })).toBe(800);
  });

  it('refuses springs that are not compressed', () => {
    expect(() => clampForceOfSprings({ rateNPerMm: 25, compressionMm: 0, count: 4 })).toThrow(RangeError);
  });
});
