import { cohenKappa, type Kappa } from '@/lib/fit';

function kappaOf(counts: number[][], confidence?: number): Kappa {
  const kappa = cohenKappa(counts, confidence);
  if (!kappa.ok) throw new Error(kappa.reason);
  return kappa;
}

describe("Cohen's kappa", () => {
  it('is that of the worked example of the R package statpsych, range and all', () => {
    // Reference page of ci.kappa (dgbonett.github.io/statpsych): alpha .05, counts 31, 12, 4, 58, read on this project's
    // search: 0.6756757, SE 0.07344761, 0.5317210 to 0.8196303. Tolerance: the digits printed.
    const { estimate, se, lower, upper } = kappaOf(
      [
        [31, 12],
        [4, 58],
      ],
      0.95,
    );
    expect(estimate).toBeCloseTo(0.6756757, 7);
    expect(se).toBeCloseTo(0.07344761, 7);
    expect(lower).toBeCloseTo(0.531721, 6);
    expect(upper).toBeCloseTo(0.8196303, 6);
  });

  it('is that of the diagnoses of Fleiss, with three categories', () => {
    // Fleiss, Statistical Methods for Rates and Proportions: two raters on 100 patients, kappa .676 at an agreement of
    // .89 with .66 by chance; standard error .088. From memory; tolerance half of the last digit.
    const { estimate, se, agreedFraction, cases } = kappaOf([
      [75, 1, 4],
      [5, 4, 1],
      [0, 0, 10],
    ]);
    expect(cases).toBe(100);
    expect(agreedFraction).toBeCloseTo(0.89, 12);
    expect(estimate).toBeCloseTo(0.23 / 0.34, 12);
    expect(Math.abs(se - 0.088)).toBeLessThan(0.0005);
  });

  it("is that of Cohen's own example of 200 cases: .492 (1960, from memory)", () => {
    const { estimate } = kappaOf([
      [88, 14, 18],
      [10, 40, 10],
      [2, 6, 12],
    ]);
    expect(estimate).toBeCloseTo(0.492, 3);
  });

  it('is 1 without a range where both always found the same, and 0 where they agree as often as by chance', () => {
    expect(
      kappaOf([
        [4, 0],
        [0, 6],
      ]),
    ).toMatchObject({ estimate: 1, se: 0, lower: 1, upper: 1 });
    expect(
      kappaOf([
        [25, 25],
        [25, 25],
      ]).estimate,
    ).toBeCloseTo(0, 12);
  });

  it('is not defined without a case, nor where both used one category', () => {
    expect(cohenKappa([[0]])).toEqual({ ok: false, reason: 'noCases' });
    expect(
      cohenKappa([
        [7, 0],
        [0, 0],
      ]),
    ).toEqual({ ok: false, reason: 'oneCategory' });
  });

  it.each([[[[1, 2]]], [[[1.5]]], [[[-1]]]])('refuses %j', (counts) => {
    expect(() => cohenKappa(counts)).toThrow(RangeError);
  });
});
