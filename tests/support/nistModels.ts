/** Models of the NIST StRD nonlinear sets, written out from the `model` line of each set; x is a row of predictors. */
export type Model = (b: readonly number[], x: readonly number[]) => number;

const exponentials3: Model = (b, [x = NaN]) =>
  at(b, 0) * Math.exp(-at(b, 1) * x) +
  at(b, 2) * Math.exp(-at(b, 3) * x) +
  at(b, 4) * Math.exp(-at(b, 5) * x);

const cubicRatio: Model = (b, [x = NaN]) =>
  (at(b, 0) + at(b, 1) * x + at(b, 2) * x ** 2 + at(b, 3) * x ** 3) /
  (1 + at(b, 4) * x + at(b, 5) * x ** 2 + at(b, 6) * x ** 3);

const twoPeaks: Model = (b, [x = NaN]) =>
  at(b, 0) * Math.exp(-at(b, 1) * x) +
  at(b, 2) * Math.exp(-(((x - at(b, 3)) / at(b, 4)) ** 2)) +
  at(b, 5) * Math.exp(-(((x - at(b, 6)) / at(b, 7)) ** 2));

const chwirut: Model = (b, [x = NaN]) => Math.exp(-at(b, 0) * x) / (at(b, 1) + at(b, 2) * x);

export const nistModels: Readonly<Record<string, Model>> = {
  BoxBOD: (b, [x = NaN]) => at(b, 0) * (1 - Math.exp(-at(b, 1) * x)),
  Chwirut1: chwirut,
  Chwirut2: chwirut,
  DanWood: (b, [x = NaN]) => at(b, 0) * x ** at(b, 1),
  ENSO: (b, [x = NaN]) => {
    const wave = (period: number) => (2 * Math.PI * x) / period;
    return (
      at(b, 0) +
      at(b, 1) * Math.cos(wave(12)) +
      at(b, 2) * Math.sin(wave(12)) +
      at(b, 4) * Math.cos(wave(at(b, 3))) +
      at(b, 5) * Math.sin(wave(at(b, 3))) +
      at(b, 7) * Math.cos(wave(at(b, 6))) +
      at(b, 8) * Math.sin(wave(at(b, 6)))
    );
  },
  Gauss1: twoPeaks,
  Gauss2: twoPeaks,
  Hahn1: cubicRatio,
  Lanczos1: exponentials3,
  Lanczos2: exponentials3,
  Lanczos3: exponentials3,
  MGH09: (b, [x = NaN]) => (at(b, 0) * (x ** 2 + x * at(b, 1))) / (x ** 2 + x * at(b, 2) + at(b, 3)),
  MGH10: (b, [x = NaN]) => at(b, 0) * Math.exp(at(b, 1) / (x + at(b, 2))),
  Misra1a: (b, [x = NaN]) => at(b, 0) * (1 - Math.exp(-at(b, 1) * x)),
  Misra1c: (b, [x = NaN]) => at(b, 0) * (1 - (1 + 2 * at(b, 1) * x) ** -0.5),
  // The response is ln y.
  Nelson: (b, [x1 = NaN, x2 = NaN]) => at(b, 0) - at(b, 1) * x1 * Math.exp(-at(b, 2) * x2),
  Rat43: (b, [x = NaN]) => at(b, 0) / (1 + Math.exp(at(b, 1) - at(b, 2) * x)) ** (1 / at(b, 3)),
  Thurber: cubicRatio,
};

function at(b: readonly number[], j: number): number {
  return b[j] ?? NaN;
}
