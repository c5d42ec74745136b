import type { PublishedFit } from './types';
import type { PoolTable } from './table';
import { at } from './parameters';
import { freshCentres, type Centres } from './workspace';

/** psi and centres of an earlier fit of nearly the same pool, at its nearest exponent. */
export function centresFrom(
  fit: PublishedFit,
  table: PoolTable,
  exponent: number,
): { psi: number[]; centres: Centres } {
  const component = fit.components.reduce((best, part) =>
    Math.abs(part.exponent - exponent) < Math.abs(best.exponent - exponent) ? part : best,
  );
  const { psi } = component;
  const centres = freshCentres(table, Math.exp(psi[at.lnSm]!), Math.exp(psi[at.lnSu]!));
  table.cellTypeKeys.forEach((key, k) => {
    const effect = component.cellTypes[fit.cellTypes.findIndex(({ cellType }) => cellType === key)];
    if (!effect) return;
    centres.cellTypeModes[k] = effect.m;
    centres.cellTypeScales[k] = Math.sqrt(effect.variance);
  });
  return { psi, centres };
}
