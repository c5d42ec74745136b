import { minimumOwners } from '@/lib/contract/limits';
import { bandsByLever } from '@/lib/fit';
import { holdBack } from '@/lib/fit/curve/holdBack';

import type { View } from './fitOutput';

/**
 * Keeps from one fit to the next what the pool's steps keep for a cell type as a whole: a band's figures do not move by
 * fewer than five owners, nor can the rest of a cell type less the bands that moved give such a change away. A view that
 * may not move yet is the one published before.
 */
export function holdBackChanges(views: readonly View[], before: readonly View[]): View[] {
  const published = new Map(before.map((view) => [keyOf(view), view]));
  const changed = views.map((view) => changedOwners(view, published.get(keyOf(view))));
  const indexOf = new Map(views.map((view, i) => [keyOf(view), i]));
  const place = (cellType: string, bandKey: string | null) => indexOf.get(keyOf({ cellType, bandKey }));
  const divisions = [...new Set(views.map(({ cellType }) => cellType))].flatMap((cellType) =>
    Object.values(bandsByLever).map((bands) =>
      bands.map(({ key }) => place(cellType, key)).filter((i) => i !== undefined),
    ),
  );
  const parts = views.map(({ cellType, bandKey }, i) => ({
    checks: changed[i]!.map((owner) => ({ owner })),
    parent: bandKey === null ? null : (place(cellType, null) ?? null),
  }));
  const held = holdBack(parts, divisions, minimumOwners);
  return views.map((view, i) => {
    if (!held[i] || changed[i]!.length === 0) return view;
    return published.get(keyOf(view)) ?? unpublished(view);
  });
}

/** Keys of the owners whose rows in the view are not what they were when it was last published. */
function changedOwners(now: View, before: View | undefined): string[] {
  const then = before?.owners ?? {};
  return Object.keys({ ...then, ...now.owners }).filter((owner) => then[owner] !== now.owners[owner]);
}

/** Nothing was said of it and nothing is: no owner's rows count as published. */
const unpublished = ({ cellType, bandKey }: View): View => ({
  cellType,
  bandKey,
  evidence: null,
  result: { ok: false, reason: 'tooFewOwners' },
  dots: [],
  owners: {},
});

const keyOf = ({ cellType, bandKey }: Pick<View, 'cellType' | 'bandKey'>) => `${cellType}|${bandKey ?? ''}`;
