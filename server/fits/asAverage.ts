import { parameterNames, type PublishedFit } from '@/lib/fit';

type Component = PublishedFit['components'][number];

/** Both mechanisms carry the cell type's effect: q = e^m (GA + GB) has ln A + m and ln B + m. */
const places = [parameterNames.indexOf('lnA'), parameterNames.indexOf('lnB')];

/**
 * The model re-centred on one of its cell types, so that what is asked of its average cell type is answered for that
 * one: ln A and ln B become ln A + m and ln B + m, with m's dependence on psi and its own variance in the covariance
 * (J V J' + variance of m given psi, J = 1 + dm/dpsi in those two rows). Exact, since m enters nowhere else.
 * @throws RangeError when the fit has no such cell type
 */
export function asAverage(fit: PublishedFit, cellType: string): PublishedFit {
  const index = fit.cellTypes.findIndex((row) => row.cellType === cellType);
  if (index === -1) throw new RangeError(`asAverage requires a cell type of the fit, got "${cellType}"`);
  return { ...fit, components: fit.components.map((component) => recentred(component, index)) };
}

function recentred(component: Component, index: number): Component {
  const { psi, covariance, cellTypes } = component;
  const { m, variance, slope } = cellTypes[index]!;
  const size = psi.length;
  const jacobian = psi.map((_, row) =>
    psi.map((__, column) => (row === column ? 1 : 0) + (places.includes(row) ? (slope[column] ?? 0) : 0)),
  );
  const times = (left: (row: number, k: number) => number, right: (k: number, column: number) => number) =>
    Array.from({ length: size * size }, (_, place) => {
      const [row, column] = [Math.floor(place / size), place % size];
      let sum = 0;
      for (let k = 0; k < size; k++) sum += left(row, k) * right(k, column);
      return sum;
    });
  const half = times(
    (row, k) => jacobian[row]![k]!,
    (k, column) => covariance[k * size + column]!,
  );
  const whole = times(
    (row, k) => half[row * size + k]!,
    (k, column) => jacobian[column]![k]!,
  );
  for (const row of places) for (const column of places) whole[row * size + column]! += variance;
  return {
    ...component,
    psi: psi.map((value, place) => (places.includes(place) ? value + m : value)),
    covariance: whole,
  };
}
