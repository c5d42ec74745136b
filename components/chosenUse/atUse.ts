import type { CellEntry, CellList, CellPage, Claim, Life, Use } from '@/lib/contract/cells';
import { isStandardUse } from '@/lib/contract/chosenUse';
import type { PublicModel } from '@/lib/contract/model';
import {
  claimFigureAt,
  figureAt,
  type LifeFigure,
  lifeFigureAt,
  type PublishedFit,
} from '@/lib/fit/pooled/published';

import { publishedFitOf } from './publishedModel';

const fits = new WeakMap<PublicModel, PublishedFit>();

function fitOf(model: PublicModel): PublishedFit {
  const known = fits.get(model) ?? publishedFitOf(model);
  fits.set(model, known);
  return known;
}

const ownIn = (model: PublicModel, id: string) => (model.cellTypes.some((one) => one.id === id) ? id : null);

/** A cell type's life at a use, by the published model: its own where it has one, else the pool's. */
export const lifeAtUse = (model: PublicModel, cellTypeId: string, use: Use): Life =>
  lifeFigureAt(fitOf(model), use, ownIn(model, cellTypeId));

/** The list as it is at another use. Lives of cell types without one of their own are one and the same. */
export function listAtUse(list: CellList, use: Use): CellList {
  const { model } = list;
  if (!model || isStandardUse(use)) return list;
  const fit = fitOf(model);
  const ofPool = list.cells.some(({ cellType }) => ownIn(model, cellType.id) === null)
    ? lifeFigureAt(fit, use, null)
    : null;
  return {
    ...list,
    use,
    cells: list.cells.map((entry): CellEntry => {
      const own = ownIn(model, entry.cellType.id);
      const life = entry.life && (own === null ? ofPool : lifeFigureAt(fit, use, own));
      return { ...entry, life, claims: claimsAt(fit, entry.claims, use, entry.cellType.id, life) };
    }),
  };
}

/** The page as it is at another use; a band's single curve knows no use and stays. */
export function pageAtUse(page: CellPage, use: Use): CellPage {
  const { model, view, cellType, claims } = page;
  if (!model || page.band !== null || !view.life || isStandardUse(use)) return page;
  const fit = fitOf(model);
  const { life, curve } = figureAt(fit, use, ownIn(model, cellType.id));
  return {
    ...page,
    use,
    view: { ...view, life, curve },
    claims: claimsAt(fit, claims, use, cellType.id, life),
  };
}

function claimsAt(
  fit: PublishedFit,
  claims: readonly Claim[],
  use: Use,
  cellType: string,
  life: LifeFigure | null,
): Claim[] {
  return claims.map((claim) =>
    life ? { ...claim, ...claimFigureAt(fit, claim, use, { cellType, life }) } : claim,
  );
}
