import { computeCase } from '@/components/checks/computedCase';
import { cycleLines, normalisationLines, sohLines, uncertaintyLines } from '@/components/checks/formulas';
import { previousCheck } from '@/components/checks/previousCheck';

import { sampleBank, sampleCheck, sampleFields } from '../support/checkSample';

const spaced = (lines: string[]) => lines.map((line) => line.replace(/\u202f/g, ' '));

describe('how a check was computed', () => {
  it('shows the numbers that give the capacity shown', () => {
    const lines = spaced(normalisationLines(computeCase(sampleBank(), sampleFields(), null, null)));
    // By hand: 226.4 / (1 + 0.004 x (22 - 25)) x (0.2 / 0.2)^0.01 = 226.4 / 0.988 = 229.1498 Ah.
    expect(lines).toEqual([
      'Q_ref = Q / [1 + k_T × (T − 25 °C)] × (I / 0.2 It)^(p − 1)',
      '= 226.40 / [1 + 0.004 × (−3.00)] × (0.2000 / 0.2)^0.01',
      '= 229.15 Ah',
    ]);
  });

  it('takes the coefficient of above 25 °C there', () => {
    const fields = sampleFields();
    Object.assign(fields.reading, { temperatureStartC: 29, temperatureEndC: 31 });
    const lines = spaced(normalisationLines(computeCase(sampleBank(), fields, null, null)));
    // 226.4 / (1 + 0.001 x 5) = 225.2736 Ah.
    expect(lines.slice(1)).toEqual(['= 226.40 / [1 + 0.001 × 5.00] × (0.2000 / 0.2)^0.01', '= 225.27 Ah']);
  });

  it('says that nothing was corrected outside the range', () => {
    const fields = sampleFields();
    Object.assign(fields.reading, { temperatureStartC: 8, temperatureEndC: 10 });
    expect(spaced(normalisationLines(computeCase(sampleBank(), fields, null, null)))[1]).toBe(
      'Q_ref = Q = 226.40 Ah',
    );
  });

  it('multiplies its relative uncertainty out to the ± shown', () => {
    const computedCase = computeCase(sampleBank(), sampleFields(), null, null);
    const { relSdNew, capacityRefAh } = computedCase.computed;
    const line = spaced(uncertaintyLines(computedCase))[1] ?? '';
    expect(line.endsWith(`= ${(2 * relSdNew * capacityRefAh).toFixed(2)} Ah`)).toBe(true);
  });

  it('divides by the rated capacity, and by the own start where it is known', () => {
    const bank = sampleBank({ startCapacityAh: 245 });
    // 229.1498 / 240 = 95.48 %, 229.1498 / 245 = 93.53 %.
    expect(spaced(sohLines(computeCase(bank, sampleFields(), null, null)))).toEqual([
      'Of rated: Q_ref / Q_rated = 229.1 / 240.0 = 95.5 %',
      'Of its own start: 229.1 / 245.0 = 93.5 %',
    ]);
  });

  it('counts full cycles both ways from the numbers entered', () => {
    const previous = sampleCheck();
    previous.reading = { ...previous.reading, testedOn: '2025-11-02' };
    previous.computed = { ...previous.computed, efc: 540 };
    const computedCase = computeCase(sampleBank(), sampleFields(), null, previous);
    // 172800 / 240 = 720; 540 + 0.6 x 0.9 x (365 - 14) = 729.54.
    expect(spaced(cycleLines(computedCase))).toEqual([
      'By the counter: 172,800 Ah / 240 Ah = 720.0',
      'By depth: 540.0 + 0.60 × 0.9 a day × (365 − 14) days since 2 Nov 2025 = 729.5',
    ]);
    expect(computedCase.computed.efc).toBe(720);
  });

  it('turns a counter of energy into cycles by the nominal voltage', () => {
    const fields = sampleFields();
    Object.assign(fields.conditions, { counterKind: 'kwh', counterValue: 8847.36, cyclesPerDay: null });
    // 8847.36 kWh / (240 Ah x 51.2 V) = 720.
    expect(spaced(cycleLines(computeCase(sampleBank(), fields, null, null)))).toEqual([
      'By the counter: 8,847.36 kWh × 1000 / (240 Ah × 51.2 V) = 720.0',
    ]);
  });
});

describe('the check before', () => {
  const on = (testedOn: string, changes: Partial<ReturnType<typeof sampleCheck>> = {}) => {
    const check = sampleCheck({ id: `id-${testedOn}`, ...changes });
    return { ...check, reading: { ...check.reading, testedOn } };
  };

  it('is the last one that stands and lies before the day', () => {
    const checks = [
      on('2024-11-01'),
      on('2025-11-01'),
      on('2026-03-01', { state: 'withdrawn' }),
      on('2027-01-01'),
    ];
    expect(previousCheck(checks, '2026-11-02')?.reading.testedOn).toBe('2025-11-01');
    expect(previousCheck(checks, '2026-11-02', 'id-2025-11-01')?.reading.testedOn).toBe('2024-11-01');
    expect(previousCheck(checks, '2024-11-01')).toBeNull();
  });
});
