import type { LogResult } from '@/lib/measure';
import { integrateText } from '../support/logDialects';
import { readReferenceJson } from '../support/reference';

interface Sampled {
  dt_s: number;
  samples: number;
  trapezoid_Ah: number;
  trapezoid_Wh_product_of_samples: number;
}
interface IntegrationReference {
  cases: { name: string; duration_s: number; exact_Ah: number; exact_Wh: number; sampled: Sampled[] }[];
  uneven: { points_s_A: [number, number][]; net_Ah: number; discharge_Ah: number };
  gap: { samples: number; trapezoid_with_gap_Ah: number; exact_Ah: number };
}

// Source of every expected value: integration.json, closed forms and sums in 40-digit arithmetic, derived there.
const reference = readReferenceJson<IntegrationReference>('integration.json');

/** The cases' current and voltage, written out from the texts `current_A` and `voltage_V` of the reference. */
const signals: Record<string, (t: number) => [currentA: number, voltageV: number]> = {
  constant: () => [56, 3.2],
  linear_ramp: (t) => [100 - (80 * t) / 7200, 3.3 - (0.5 * t) / 7200],
  sine: (t) => [50 + 30 * Math.sin((2 * Math.PI * t) / 600), 3.25],
  exponential: (t) => [100 * Math.exp(-t / 5400), 3.2 + 0.15 * Math.exp(-t / 5400)],
  half_sine_squared: (t) => [40 * Math.sin((Math.PI * t) / 3600) ** 2, 3.3 - (0.2 * t) / 3600],
  sine_with_voltage_phase: (t) => [
    50 + 20 * Math.sin((2 * Math.PI * t) / 600),
    3.2 - 0.05 * Math.sin((2 * Math.PI * t) / 600),
  ],
};

const header = 'time (s),current (A),voltage (V)';
const logOf = (signal: (t: number) => [number, number], times: number[]) =>
  [header, ...times.map((t) => [t, ...signal(t)].join(','))].join('\n');
const whole = (endS: number) => ({ window: { startS: 0, endS }, dischargeSign: 'positive' as const });

describe('trapezoid sums of the reference', () => {
  const cases = reference.cases.flatMap(({ name, duration_s, exact_Ah, sampled }) =>
    sampled.map((row) => ({ name, duration_s, exact_Ah, ...row })),
  );
  it('covers every case of the file', () => {
    expect(reference.cases.map(({ name }) => name).sort()).toEqual(Object.keys(signals).sort());
    expect(cases.length).toBeGreaterThanOrEqual(30);
  });

  // Samples written in full digits: only the order of summation differs from the reference, so 1e-11 relative.
  it.each(cases)('$name every $dt_s s agrees to 1e-11', ({ name, duration_s, dt_s, ...row }) => {
    const signal = signals[name]!;
    const times = Array.from({ length: row.samples }, (_, index) => index * dt_s);
    const result = integrateText(logOf(signal, times), {}, whole(duration_s)) as LogResult;
    expect(result.ok).toBe(true);
    expect(Math.abs(result.capacityAh / row.trapezoid_Ah - 1)).toBeLessThan(1e-11);
    expect(Math.abs(result.energyWh! / row.trapezoid_Wh_product_of_samples - 1)).toBeLessThan(1e-11);
    expect(result.durationS).toBe(duration_s);
  });

  it('of discharges that are looked for come within 0.15 % of the closed form at one row a second', () => {
    // The tails below 2 % of the largest current are not under load: at most 0.13 % of the half sine squared.
    for (const { name, exact_Ah, exact_Wh, sampled } of reference.cases) {
      const { samples } = sampled[0]!;
      const text = logOf(
        signals[name]!,
        Array.from({ length: samples }, (_, index) => index),
      );
      const result = integrateText(text, { dischargeSign: 'positive' }) as LogResult;
      expect(Math.abs(result.capacityAh / exact_Ah - 1)).toBeLessThan(0.0015);
      expect(Math.abs(result.energyWh! / exact_Wh - 1)).toBeLessThan(0.0015);
    }
  });
});

describe('uneven samples with a change of sign', () => {
  const { points_s_A, net_Ah, discharge_Ah } = reference.uneven;
  const text = ['time (s),current (A)', ...points_s_A.map((point) => point.join(','))].join('\n');

  it('give the discharge alone when it is looked for', () => {
    const result = integrateText(text, { dischargeSign: 'positive' }) as LogResult;
    expect(result.capacityAh).toBeCloseTo(discharge_Ah, 12);
    expect([result.windowStartS, result.windowEndS]).toEqual([0, 2401]);
  });
  it('give the net charge over the whole', () => {
    const result = integrateText(text, {}, whole(3600)) as LogResult;
    expect(result.capacityAh).toBeCloseTo(net_Ah, 12);
  });
});

describe('a gap of the reference', () => {
  it('is bridged by the trapezoid, and its uncertainty covers the error', () => {
    const times = Array.from({ length: 181 }, (_, index) => index * 60).filter((t) => t <= 3600 || t > 4800);
    expect(times.length).toBe(reference.gap.samples);
    const result = integrateText(logOf(signals['exponential']!, times), {}, whole(10800)) as LogResult;
    expect(result.capacityAh).toBeCloseTo(reference.gap.trapezoid_with_gap_Ah, 10);
    const error = Math.abs(result.capacityAh - reference.gap.exact_Ah);
    expect(error).toBeLessThan(2 * result.gapRelSd * result.capacityAh);
    expect(result.warnings.map(({ code }) => code)).toContain('gapHoldsCharge');
  });
});
