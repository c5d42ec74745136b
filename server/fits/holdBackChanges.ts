import { minimumOwners } from '@/lib/contract/limits';
import { bandsByLever } from '@/lib/fit';
import { holdBack } from '@/lib/fit/curve/holdBack';

import type { Bin, View } from './fitOutput';

interface Part {
  owners: Record<string, string>;
}

interface Holding<P extends Part> {
  keyOf: (part: P) => string;
  /** Key of the part it belongs to. */
  parentOf: (part: P) => string | null;
  /** Keys of parts that together make up a whole. */
  divisions: readonly (readonly string[])[];
  /** Keys of owners whose changes are not held back. */
  atOnce: ReadonlySet<string>;
  /** The part with nothing said of it. */
  emptied: (part: P) => P;
}

/**
 * Keeps from one fit to the next what the pool's steps keep for a cell type as a whole: a part's figures do not move by
 * fewer than five owners, nor can the rest of a whole less the parts that moved give such a change away. A part that
 * may not move yet is the one published before.
 */
function holdBackParts<P extends Part>(parts: readonly P[], before: readonly P[], holding: Holding<P>): P[] {
  const { keyOf, parentOf, emptied, atOnce } = holding;
  const published = new Map(before.map((part) => [keyOf(part), part]));
  const changed = parts.map((part) => changedOwners(part, published.get(keyOf(part))));
  const held = refusalsOf(parts, changed, holding);
  return parts.map((part, i) => {
    if (!held[i] || changed[i]!.length === 0 || changed[i]!.some((owner) => atOnce.has(owner))) return part;
    return published.get(keyOf(part)) ?? emptied(part);
  });

  function refusalsOf(all: readonly P[], owners: string[][], { divisions }: Holding<P>) {
    const indexOf = new Map(all.map((part, i) => [keyOf(part), i]));
    return holdBack(
      all.map((part, i) => ({
        checks: owners[i]!.map((owner) => ({ owner })),
        parent: indexOf.get(parentOf(part) ?? '') ?? null,
      })),
      divisions.map((keys) => keys.map((key) => indexOf.get(key)).filter((i) => i !== undefined)),
      minimumOwners,
    );
  }
}

/** Views of cell types: the bands of each lever make up the whole. */
export function holdBackChanges(
  views: readonly View[],
  before: readonly View[],
  atOnce: ReadonlySet<string> = new Set(),
): View[] {
  const keyOf = ({ cellType, bandKey }: Pick<View, 'cellType' | 'bandKey'>) => `${cellType}|${bandKey ?? ''}`;
  const divisions = [...new Set(views.map(({ cellType }) => cellType))].flatMap((cellType) =>
    Object.values(bandsByLever).map((bands) => bands.map(({ key }) => keyOf({ cellType, bandKey: key }))),
  );
  return holdBackParts(views, before, {
    keyOf,
    parentOf: ({ cellType, bandKey }) => (bandKey === null ? null : keyOf({ cellType, bandKey: null })),
    divisions,
    atOnce,
    emptied: emptyView,
  });
}

/**
 * Parts that stayed as they were, beside a whole that moved, may leave a rest of few owners when subtracted from it:
 * then nothing is told of the parts of that division.
 */
export function holdBackRests(views: readonly View[]): View[] {
  const hidden = new Set<View>();
  for (const whole of views.filter(({ bandKey, evidence }) => bandKey === null && evidence)) {
    for (const bands of Object.values(bandsByLever)) {
      const parts = views.filter(
        ({ cellType, bandKey, evidence }) =>
          evidence && cellType === whole.cellType && bands.some(({ key }) => key === bandKey),
      );
      const left = Object.entries(whole.counts).filter(
        ([owner, count]) => count !== parts.reduce((sum, { counts }) => sum + (counts[owner] ?? 0), 0),
      );
      if (left.length > 0 && left.length < minimumOwners) parts.forEach((part) => hidden.add(part));
    }
  }
  return views.map((view) => (hidden.has(view) ? emptyView(view) : view));
}

const emptyView = (view: View): View => ({
  ...{ cellType: view.cellType, bandKey: view.bandKey, evidence: null, dots: [], owners: {}, counts: {} },
  failures: null,
  result: view.result && { ok: false, reason: 'tooFewOwners' },
});

/** Bins of the diagnostic pictures: those of one series make up the pool. */
export function holdBackBins(
  bins: readonly Bin[],
  before: readonly Bin[],
  atOnce: ReadonlySet<string> = new Set(),
): Bin[] {
  const bySeries = new Map<string, string[]>();
  for (const { series, key } of bins) bySeries.set(series, [...(bySeries.get(series) ?? []), key]);
  const holding: Holding<Bin> = {
    keyOf: ({ key }) => key,
    parentOf: () => null,
    divisions: [...bySeries.values()],
    atOnce: new Set(),
    emptied: emptyBin,
  };
  // First what is too thin by itself, or would give a thin one away; then what changed by too few.
  const told = holdBackParts(bins, [], holding);
  return holdBackParts(told, before, { ...holding, atOnce });
}

/** Parts that stand each for itself: told anew when at least five owners' rows in it have changed. */
export function holdBackTold<P extends Part & { told: unknown }>(
  parts: readonly P[],
  before: readonly P[],
  keyOf: (part: P) => string,
  atOnce: ReadonlySet<string> = new Set(),
): P[] {
  const emptied = (part: P): P => ({ ...part, told: null, owners: {} });
  return holdBackParts(parts, before, { keyOf, parentOf: () => null, divisions: [], atOnce, emptied });
}

const emptyBin = (bin: Bin): Bin => ({ ...bin, summary: null, owners: {} });

/** Keys of the owners whose rows in the part are not what they were when it was last published. */
function changedOwners(now: Part, before: Part | undefined): string[] {
  const then = before?.owners ?? {};
  return Object.keys({ ...then, ...now.owners }).filter((owner) => then[owner] !== now.owners[owner]);
}
