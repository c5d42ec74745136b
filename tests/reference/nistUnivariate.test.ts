import { mean, sampleStandardDeviation } from 'simple-statistics';
import { readReferenceJson } from '../support/reference';

interface NistSet {
  name: string;
  data?: number[];
  certified: { mean: number; standard_deviation: number };
}

// Source: NIST/ITL Statistical Reference Datasets, univariate summary statistics.
const { sets } = readReferenceJson<{ sets: Record<string, NistSet> }>('nist_univariate.json');

// PiDigits is left out: its file is not stored, and the first 5000 digits of pi sum to 22679, not to the
// certified 5000 x 4.5348 = 22674. NumAcc2 and NumAcc4 are given by a rule: 1001 values, the first 1.2 (10000000.2), then alternating
// 1.1 and 1.3 (10000000.1 and 10000000.3).
const alternating = (base: number) => [
  base + 0.2,
  ...Array.from({ length: 1000 }, (_, i) => base + (i % 2 === 0 ? 0.1 : 0.3)),
];
const generated: Record<string, number[]> = {
  NumAcc2: alternating(1),
  NumAcc4: alternating(10_000_000),
};

// Relative; the values of NumAcc4 themselves are rounded to 2e-9, a hundred-millionth of their deviation.
const sdTolerance: Record<string, number> = { NumAcc2: 1e-12, NumAcc4: 1e-7 };

describe('simple-statistics against NIST StRD', () => {
  const usable = Object.values(sets).filter(({ name, data }) => data || generated[name]);

  it('covers five sets', () => {
    expect(usable.map(({ name }) => name).sort()).toEqual(['Lew', 'Mavro', 'NumAcc1', 'NumAcc2', 'NumAcc4']);
  });

  it.each(usable.map((set) => [set.name, set] as const))('%s', (name, set) => {
    const values = set.data ?? (generated[name] as number[]);
    expect(Math.abs(mean(values) / set.certified.mean - 1)).toBeLessThan(1e-13);
    const sd = sampleStandardDeviation(values);
    expect(Math.abs(sd / set.certified.standard_deviation - 1)).toBeLessThan(sdTolerance[name] ?? 1e-12);
  });
});
