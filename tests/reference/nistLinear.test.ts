import { linearLeastSquares } from '@/lib/fit/linearLeastSquares';
import { readReferenceJson } from '../support/reference';

interface NistSet {
  name: string;
  data: number[][];
  parameters: number;
  intercept: boolean;
  degrees_of_freedom: number;
  certified: { parameters: number[]; standard_deviations: number[]; residual_standard_deviation: number };
}

// Source: NIST/ITL Statistical Reference Datasets, linear regression; certified to 15 digits.
const { sets } = readReferenceJson<{ sets: Record<string, NistSet> }>('nist_linear.json');

// Relative tolerances: 1e-9 as for Longley; the degree-10 polynomial of Filip 1e-6; Wampler 3 and 4 add
// noise of growing size to an exact polynomial.
const tolerances: Record<string, number> = {
  Norris: 1e-10,
  NoInt1: 1e-12,
  Longley: 1e-9,
  Filip: 1e-6,
  Wampler1: 1e-8,
  Wampler3: 1e-8,
  Wampler4: 1e-7,
};

function designOf(set: NistSet): number[][] {
  const isPolynomial = set.data[0]?.length === 2 && set.parameters > 2;
  return set.data.map(([, ...x]) => {
    if (isPolynomial) return Array.from({ length: set.parameters }, (_, j) => (x[0] as number) ** j);
    return set.intercept ? [1, ...x] : x;
  });
}

describe('linearLeastSquares against NIST StRD', () => {
  it.each(Object.values(sets).map((set) => [set.name, set] as const))('%s', (name, set) => {
    const fit = linearLeastSquares(
      designOf(set),
      set.data.map(([y = NaN]) => y),
    );
    if (!fit.ok) throw new Error(fit.reason);
    const tolerance = tolerances[name] as number;
    set.certified.parameters.forEach((value, j) => {
      expect(Math.abs((fit.coefficients[j] as number) - value)).toBeLessThan(tolerance * Math.abs(value));
    });
    expect(fit.degreesOfFreedom).toBe(set.degrees_of_freedom);
    const { residual_standard_deviation: sd } = set.certified;
    if (!(sd > 0)) {
      // Wampler1 is exact: what is left is rounding of observations up to 3e6.
      expect(fit.residualSd).toBeLessThan(1e-8);
      return;
    }
    expect(Math.abs(fit.residualSd / sd - 1)).toBeLessThan(tolerance);
    set.certified.standard_deviations.forEach((value, j) => {
      expect(Math.abs((fit.standardErrors[j] as number) / value - 1)).toBeLessThan(Math.max(tolerance, 1e-9));
    });
  });

  it('says that columns are dependent', () => {
    const design = [1, 2, 3, 4].map((x) => [1, x, 2 * x]);
    expect(linearLeastSquares(design, [1, 2, 3, 4])).toEqual({ ok: false, reason: 'dependentColumns' });
  });
});
