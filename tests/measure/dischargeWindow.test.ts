import fc from 'fast-check';
import type { LogResult } from '@/lib/measure';
import { positivePart } from '@/lib/measure/log/integrateSpan';
import { integrateText, plainChargeAh, plainDischarge, stamps, writeLog } from '../support/logDialects';
import type { Reading } from '../support/logDialects';

const columns = [(row: Reading) => row.timeS, (row: Reading) => row.voltageV, (row: Reading) => row.currentA];
const write = (readings: Reading[]) =>
  writeLog(readings, { delimiter: ',', header: ['time (s)', 'voltage (V)', 'current (A)'], columns });
const codes = (result: LogResult) => result.warnings.map(({ code }) => code);

/** Readings that follow on the last one, `stepS` apart. */
const follow = (
  readings: Reading[],
  count: number,
  at: (share: number) => { currentA: number; voltageV: number },
  stepS = 10,
) => {
  const last = readings.at(-1)!;
  for (let index = 1; index <= count; index += 1) {
    readings.push({ ...last, timeS: last.timeS + index * stepS, ...at(index / count) });
  }
  return readings;
};
const charge = { currentA: -30, voltageV: 54 };

describe('the discharge of a log', () => {
  it('with charging before and after is found without it', () => {
    const start: Reading = { ...plainDischarge()[0]!, currentA: -30, voltageV: 52, highestCellV: 3.6 };
    const readings = follow([start], 200, (share) => ({ currentA: -30, voltageV: 52 + 4 * share }));
    const shift = readings.at(-1)!.timeS + 10;
    readings.push(...plainDischarge().map((row) => ({ ...row, timeS: row.timeS + shift })));
    follow(readings, 300, (share) => ({ currentA: -30, voltageV: 50 + 4 * share }));
    const result = integrateText(write(readings)) as LogResult;
    expect(result.capacityAh).toBeCloseTo(plainChargeAh(), 9);
    expect(codes(result)).toEqual(['chargeLeftOut']);
    expect(result.windowStartS).toBe(shift + 290);
    expect(result.windowEndS).toBe(shift + 3910);
  });

  it('follows the voltage, not the sign, when charging is the larger part', () => {
    const readings = follow(plainDischarge(), 900, (share) => ({ currentA: -30, voltageV: 48 + 7 * share }));
    const upsideDown = readings.map((row) => ({ ...row, currentA: -row.currentA }));
    for (const log of [readings, upsideDown]) {
      const result = integrateText(write(log)) as LogResult;
      expect(result.capacityAh).toBeCloseTo(plainChargeAh(), 9);
    }
  });

  it('in two legs is joined, and the pause said', () => {
    const readings = plainDischarge().map((row) =>
      row.timeS > 2000 && row.timeS < 2900 ? { ...row, currentA: 0 } : row,
    );
    const result = integrateText(write(readings)) as LogResult;
    expect(result.legs).toBe(2);
    expect(result.warnings).toContainEqual(expect.objectContaining({ code: 'legsJoined', count: 2 }));
    // 900 s at 56 A are missing, less the half steps on either side of the pause.
    expect(result.capacityAh).toBeCloseTo(plainChargeAh() - (56 * 890) / 3600, 9);
    expect(result.meanCurrentA).toBeCloseTo(56, 0);
    expect(result.durationS).toBe(3620);
    expect(result.dischargingS).toBeLessThan(2800);
  });

  it('that a real charge parts is not joined; the larger part is taken', () => {
    const readings = follow(plainDischarge(), 100, () => charge);
    const shift = readings.at(-1)!.timeS + 10;
    const small = plainDischarge().filter((row) => row.timeS <= 2500);
    readings.push(...small.map((row) => ({ ...row, timeS: row.timeS + shift })));
    const result = integrateText(write(readings)) as LogResult;
    expect(result.capacityAh).toBeCloseTo(plainChargeAh(), 9);
    expect(codes(result)).toEqual(['chargeLeftOut', 'severalDischarges']);
  });

  it('that starts straight from charging begins where the current crosses zero', () => {
    const readings = plainDischarge().map((row) => (row.timeS < 300 ? { ...row, ...charge } : row));
    const result = integrateText(write(readings)) as LogResult;
    // Within the step from -30 to 56 A the line crosses zero after 30/86 of it.
    expect(result.windowStartS).toBeCloseTo(290 + (10 * 30) / 86, 9);
    const rampAh = ((56 / 2) * 10 * (56 / 86)) / 3600;
    expect(result.capacityAh).toBeCloseTo(56 + (56 * 5) / 3600 + rampAh, 9);
    expect(result.lowestCellAtFullV).toBeNull();
  });

  it('of pulses is one leg', () => {
    const readings = plainDischarge().map((row) => (row.timeS % 60 < 30 ? row : { ...row, currentA: 0 }));
    const result = integrateText(write(readings)) as LogResult;
    expect(result.legs).toBe(1);
    // A pulse holds 2 steps at 56 A and a ramp to either side.
    expect(result.capacityAh).toBeCloseTo((60 * 56 * 30) / 3600 + (56 * 10) / 3600, 6);
  });

  it('can be set by hand, and adds up over adjoining windows', () => {
    const text = write(plainDischarge());
    const part = (startS: number, endS: number) =>
      integrateText(text, {}, { window: { startS, endS } }) as LogResult;
    expect(part(1000, 2800).capacityAh).toBeCloseTo(28, 9);
    const whole = part(400, 3800);
    fc.assert(
      fc.property(fc.double({ min: 410, max: 3790, noNaN: true }), (middle) => {
        const [before, after] = [part(400, middle), part(middle, 3800)];
        expect(before.capacityAh + after.capacityAh).toBeCloseTo(whole.capacityAh, 9);
        expect(before.energyWh! + after.energyWh!).toBeCloseTo(whole.energyWh!, 6);
        expect(before.dischargingS + after.dischargingS).toBeCloseTo(whole.dischargingS, 6);
      }),
      { numRuns: 25 },
    );
    expect(integrateText(text, {}, { window: { startS: 9000, endS: 9100 } })).toMatchObject({
      ok: false,
      reason: 'badWindow',
    });
    expect(integrateText(text, {}, { window: { startS: 0, endS: 200 } })).toMatchObject({
      ok: false,
      reason: 'noDischarge',
    });
  });

  it('is not found in a log of charging or of rest', () => {
    const charging = plainDischarge().map((row) => ({ ...row, voltageV: 100 - row.voltageV }));
    expect(integrateText(write(charging))).toMatchObject({ ok: false, reason: 'noDischarge' });
    const resting = plainDischarge().map((row) => ({ ...row, currentA: 0 }));
    expect(integrateText(write(resting))).toMatchObject({ ok: false, reason: 'noDischarge' });
  });

  it('is asked for when both signs occur and there is no voltage to tell', () => {
    const text = writeLog(plainDischarge(), {
      delimiter: ',',
      header: ['time (s)', 'current (A)'],
      columns: [(row) => row.timeS, (row) => (row.timeS < 150 ? -30 : row.currentA)],
    });
    expect(integrateText(text)).toMatchObject({ ok: false, reason: 'signUnclear' });
    const told = integrateText(text, { dischargeSign: 'positive' }) as LogResult;
    expect(told.capacityAh).toBeCloseTo(plainChargeAh(), 9);
    expect(told.energyWh).toBeNull();
    expect(integrateText(text, { dischargeSign: 'negative' })).toMatchObject({ ok: true });
  });

  it('that begins or ends under load says so', () => {
    const readings = plainDischarge().filter((row) => row.timeS >= 600 && row.timeS <= 3600);
    expect(codes(integrateText(write(readings)) as LogResult)).toEqual(['startsUnderLoad', 'endsUnderLoad']);
  });

  it('knows the cells at full when the log shows the end of charging', () => {
    const readings = plainDischarge().map((row) =>
      row.timeS < 150
        ? { ...row, currentA: -10, voltageV: 55 + row.timeS / 100, highestCellV: 3.6, lowestCellV: 3.5 }
        : row,
    );
    const text = writeLog(readings, {
      delimiter: ',',
      header: ['time (s)', 'voltage (V)', 'current (A)', 'lowest cell (V)', 'highest cell (V)'],
      columns: [...columns, (row) => row.lowestCellV, (row) => row.highestCellV],
    });
    expect(integrateText(text)).toMatchObject({
      lowestCellAtFullV: 3.5,
      highestCellAtFullV: 3.6,
      lowestCellAtEndV: 2.79,
    });
  });

  it('carries the first stamp where there are dates', () => {
    const dated = writeLog(plainDischarge(), {
      delimiter: ',',
      header: ['time', 'current (A)'],
      columns: [(row) => stamps.iso(row.timeS), (row) => row.currentA],
    });
    expect(integrateText(dated)).toMatchObject({ firstStamp: '2026-11-02T14:00:00.000Z' });
    expect(integrateText(write(plainDischarge()))).toMatchObject({ firstStamp: null });
  });
});

describe('a gap', () => {
  const holed = plainDischarge().filter((row) => row.timeS <= 1000 || row.timeS >= 1600);

  it('in the middle is counted from its ends, flagged and asked about', () => {
    const result = integrateText(write(holed)) as LogResult;
    expect(result.capacityAh).toBeCloseTo(plainChargeAh(), 9);
    expect(result.gapChargeFraction).toBeCloseTo((56 * 600) / 3600 / plainChargeAh(), 9);
    expect(result.largestGapFraction).toBe(result.gapChargeFraction);
    // A tenth of the gap's charge as a limit of error, rectangular: JCGM 100:2008, 4.3.7.
    expect(result.gapRelSd).toBeCloseTo((0.1 * result.gapChargeFraction) / Math.sqrt(3), 9);
    expect(result.warnings).toContainEqual(
      expect.objectContaining({ code: 'gapHoldsCharge', count: 1, atRow: 103 }),
    );
  });

  it('can be left out', () => {
    const result = integrateText(write(holed), { gaps: 'leaveOut' }) as LogResult;
    expect(result.capacityAh).toBeCloseTo(plainChargeAh() - (56 * 600) / 3600, 9);
    expect(result.gapChargeFraction).toBe(0);
    expect(result.meanCurrentA).toBeCloseTo(56, 0);
  });

  it('of less than a minute that holds little is none', () => {
    const result = integrateText(write(plainDischarge().filter((row) => row.timeS !== 1000))) as LogResult;
    expect(codes(result)).toEqual([]);
    expect(result.gapRelSd).toBe(0);
  });

  it('is no name for the habit of a slow log', () => {
    const result = integrateText(write(plainDischarge(300))) as LogResult;
    expect(codes(result)).toEqual(['coarse']);
    expect(result.gapChargeFraction).toBe(0);
  });
});

describe('the series for drawing', () => {
  it('keeps extremes and ends in at most 600 points', () => {
    const spikes: Record<number, Partial<Reading>> = {
      1234: { currentA: 180 },
      1300: { voltageV: 40 },
      2200: { currentA: 3 },
      2345: { voltageV: 57 },
    };
    const readings = plainDischarge(1).map((row) => ({ ...row, ...spikes[row.timeS] }));
    const { series } = integrateText(write(readings)) as LogResult;
    expect(series.timeS.length).toBeLessThanOrEqual(600);
    expect(series.timeS.length).toBeGreaterThan(250);
    expect(Math.max(...series.currentA)).toBe(180);
    expect(Math.min(...series.voltageV.map(Number))).toBe(40);
    expect(Math.max(...series.voltageV.map(Number))).toBe(57);
    expect(series.currentA[series.timeS.indexOf(2200)]).toBe(3);
    expect([series.timeS[0], series.timeS.at(-1)]).toEqual([0, 4200]);
    expect([...series.timeS].sort((one, other) => one - other)).toEqual(series.timeS);
    expect(series.temperatureC.every((value) => value === null)).toBe(true);
  });
});

describe('the part above zero of a step', () => {
  it('ends where the straight line crosses zero', () => {
    expect(positivePart(-30, 56, 10)).toBeCloseTo(((56 / 2) * 10 * 56) / 86, 12);
    expect(positivePart(56, -30, 10)).toBeCloseTo(((56 / 2) * 10 * 56) / 86, 12);
  });
  it('and the part below add up to the trapezoid', () => {
    const amps = fc.double({ min: -500, max: 500, noNaN: true });
    fc.assert(
      fc.property(amps, amps, (from, to) => {
        const net = positivePart(from, to, 10) - positivePart(-from, -to, 10);
        expect(net).toBeCloseTo(((from + to) / 2) * 10, 6);
      }),
    );
  });
});
