import type { PoolCheck } from '../poolCheck';
import type { CurveRefusal } from './types';

/** One view that might be shown: its checks, and the view it is a part of, if that can be held back too. */
export interface View {
  checks: readonly Pick<PoolCheck, 'owner'>[];
  parent: number | null;
}

interface HoldBackOptions {
  /** Largest share of a view's checks that may be one owner's, 0..1; default 1: any. */
  maxOwnerShare?: number;
  /** Whether views are held back to keep what is held back beside them; default true. */
  isComplementKept?: boolean;
}

/**
 * Which views may be shown. A view of fewer than `minOwners` owners is not, nor one that is mostly one owner's. `divisions` list, by number,
 * views that together make up a shown whole: while those held back of a division concern some owners
 * but fewer than `minOwners`, the smallest one still shown is held back as well (secondary suppression),
 * since the whole less the shown parts would give the rest away. A part goes with its parent.
 *
 * Returns a refusal, or null, for each view.
 */
export function holdBack(
  views: readonly View[],
  divisions: readonly (readonly number[])[],
  minOwners: number,
  { maxOwnerShare = 1, isComplementKept = true }: HoldBackOptions = {},
): (CurveRefusal | null)[] {
  const owners = views.map(({ checks }) => new Set(checks.map((check) => check.owner)));
  const ownersOf = (v: number) => owners[v] as Set<string>;
  const refusals = views.map<CurveRefusal | null>(({ checks }, v) =>
    ownersOf(v).size < minOwners || largestShare(checks) > maxOwnerShare
      ? { ok: false, reason: 'tooFewOwners' }
      : null,
  );
  const refuse = (v: number) => {
    refusals[v] = { ok: false, reason: 'protectsOthers' };
  };
  const protect = (division: readonly number[]): boolean => {
    const heldBack = new Set(division.flatMap((v) => (refusals[v] ? [...ownersOf(v)] : [])));
    const shown = division.filter((v) => !refusals[v]);
    if (!isComplementKept || heldBack.size === 0 || heldBack.size >= minOwners || shown.length === 0)
      return false;
    refuse(shown.reduce((a, b) => (ownersOf(b).size < ownersOf(a).size ? b : a)));
    return true;
  };
  for (let hasChanged = true; hasChanged;) {
    hasChanged = false;
    views.forEach(({ parent }, v) => {
      if (parent === null || !refusals[parent] || refusals[v]) return;
      refuse(v);
      hasChanged = true;
    });
    for (const division of divisions) while (protect(division)) hasChanged = true;
  }
  return refusals;
}

function largestShare(checks: readonly Pick<PoolCheck, 'owner'>[]): number {
  const counts = new Map<string, number>();
  for (const { owner } of checks) counts.set(owner, (counts.get(owner) ?? 0) + 1);
  return Math.max(0, ...counts.values()) / checks.length;
}
