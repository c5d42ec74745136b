import type { CatalogueEntry, CataloguePage, MergePreview } from '@/lib/contract/catalogue';

import type { CellType, QuotedClaim, TrailEntry } from '../db/models';
import { claimFieldsOf, notStatedIn } from './claims';
import type { MergePlan } from './mergeCellTypes';
import { type Dependents, statusOf } from './queries';

export function presentEntry(cellType: CellType, { banks, checks, claims }: Dependents): CatalogueEntry {
  const { id, maker, name, format, ratedAh, nominalV, faceAreaMm2, massKg, version, mergedIntoId } = cellType;
  return {
    ...{ id, maker, name, format, ratedAh, nominalV, version },
    ...{ faceAreaMm2: faceAreaMm2 ?? null, massKg: massKg ?? null, mergedIntoId: mergedIntoId ?? null },
    status: statusOf(cellType),
    createdAt: cellType.createdAt.toISOString(),
    ...{ banks, checks, claims },
  };
}

interface PageParts {
  counts: Dependents;
  claims: QuotedClaim[];
  trail: TrailEntry[];
}

/** Who proposed or changed it stays inside: only the side they stand on is told. */
export function presentCataloguePage(
  cellType: CellType,
  { counts, claims, trail }: PageParts,
): CataloguePage {
  return {
    ...presentEntry(cellType, counts),
    claims: claims.map((claim) => ({
      id: claim.id,
      ...claimFieldsOf(claim),
      notStated: notStatedIn(claim),
    })),
    trail: trail.map(presentTrailEntry),
  };
}

type TrailLine = CataloguePage['trail'][number];

function presentTrailEntry({ at, actorRole, action, details }: TrailEntry): TrailLine {
  const { reason, intoId, fromId } = details;
  return {
    at: at.toISOString(),
    by: actorRole === 'owner' || actorRole === 'system' ? actorRole : 'moderator',
    action,
    reason: typeof reason === 'string' ? reason : '',
    changes: changesOf(details),
    otherId: [intoId, fromId].find((id) => typeof id === 'string') ?? null,
  };
}

/** An entry's own list of changes, or a claim before and after. */
function changesOf({ changes, before, after }: Record<string, unknown>): TrailLine['changes'] {
  if (Array.isArray(changes))
    return (changes as { field: string; before: unknown; after: unknown }[]).map((one) => ({
      field: one.field,
      before: textOf(one.before),
      after: textOf(one.after),
    }));
  const [from, to] = [recordOf(before), recordOf(after)];
  return [...new Set([...Object.keys(from), ...Object.keys(to)])]
    .map((field) => ({ field, before: textOf(from[field]), after: textOf(to[field]) }))
    .filter((change) => change.before !== change.after);
}

const recordOf = (value: unknown) => (value ?? {}) as Record<string, unknown>;
const textOf = (value: unknown) => (value === null || value === undefined ? '' : String(value));

export function presentMergePreview(plan: MergePlan): MergePreview {
  const { from, into, fromCounts, intoCounts, claimsMoved, claimsDropped, isRecomputed } = plan;
  return {
    from: presentEntry(from, fromCounts),
    into: presentEntry(into, intoCounts),
    claimsMoved: claimsMoved.length,
    claimsDropped: claimsDropped.length,
    approvedChecks: fromCounts.approvedChecks,
    isRecomputed: isRecomputed && fromCounts.checks > 0,
  };
}
