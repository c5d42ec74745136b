import type { Transaction } from 'sequelize';

import { Bank, CellType, type QuotedClaim } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { requestRefit } from '../fits/requestRefit';
import type { SignedInActor } from '../policies';
import { appendTrail } from '../trail/appendTrail';
import { claimFieldsOf } from './claims';
import { mergedNotice } from './notices';
import { countDependents, type Dependents, findClaimsOf, findEntry, statusOf } from './queries';
import { requestRecompute } from './recomputeChecks';
import { tellProposer } from './settleProposal';

export interface MergePlan {
  from: CellType;
  into: CellType;
  fromCounts: Dependents;
  intoCounts: Dependents;
  claimsMoved: QuotedClaim[];
  /** Those that stand on the kept one already, word for word. */
  claimsDropped: QuotedClaim[];
  /** Checks are worked out with the rating: another one moves their figures. */
  isRecomputed: boolean;
}

/**
 * What merging one cell type into another would move.
 * @throws AppError notFound, invalid (the same one twice), conflict (merged before; the kept one is not listed)
 */
export async function planMerge(
  { db }: Deps,
  fromId: string,
  intoId: string,
  transaction?: Transaction,
): Promise<MergePlan> {
  if (fromId === intoId)
    throw new AppError('invalid', undefined, { intoId: 'Choose another cell type than this one.' });
  const [from, into] = [await findEntry(fromId, transaction), await findEntry(intoId, transaction)];
  if (statusOf(from) === 'merged')
    throw new AppError('conflict', 'This cell type was merged into another one already.');
  if (statusOf(into) !== 'listed') throw new AppError('conflict', 'Only a listed cell type can be kept.');
  const countOf = await countDependents(db, { transaction });
  const known = new Set((await findClaimsOf(intoId, transaction)).map(contentOf));
  const claims = await findClaimsOf(fromId, transaction);
  return {
    ...{ from, into, fromCounts: countOf(fromId), intoCounts: countOf(intoId) },
    claimsMoved: claims.filter((claim) => !known.has(contentOf(claim))),
    claimsDropped: claims.filter((claim) => known.has(contentOf(claim))),
    isRecomputed: from.ratedAh !== into.ratedAh || from.nominalV !== into.nominalV,
  };
}

/** Where a claim stands may be worded in two ways; what it claims may not. */
function contentOf(claim: QuotedClaim): string {
  const { whereItStands: _note, ...content } = claimFieldsOf(claim);
  return JSON.stringify(content);
}

interface MergeRequest {
  intoId: string;
  version: number;
  intoVersion: number;
}

/**
 * Makes two cell types one: banks and claims move to the kept one, the other stays as a pointer to it. One refit follows,
 * after the checks have been worked out anew where the ratings differ.
 * @throws AppError as of planMerge; versionConflict
 */
export async function mergeCellTypes(
  deps: Deps,
  actor: SignedInActor,
  fromId: string,
  { intoId, version, intoVersion }: MergeRequest,
): Promise<void> {
  await deps.db.transaction(async (transaction) => {
    const plan = await planMerge(deps, fromId, intoId, transaction);
    const { from, into, claimsMoved, claimsDropped } = plan;
    if (from.version !== version || into.version !== intoVersion) throw new AppError('versionConflict');
    const at = deps.clock();
    const bankIds = await moveBanks({ fromId, intoId, at, actor }, transaction);
    for (const claim of claimsMoved) await claim.update({ cellTypeId: intoId }, { transaction });
    for (const claim of claimsDropped) await claim.destroy({ transaction });
    // What points to the one that goes points to the kept one from now on.
    await CellType.update({ mergedIntoId: intoId }, { where: { mergedIntoId: fromId }, transaction });
    const closed = { status: 'proposed', closedAs: 'merged', closedAt: at, mergedIntoId: intoId } as const;
    await from.update({ ...closed, version: version + 1 }, { transaction });
    await into.update({ version: intoVersion + 1 }, { transaction });
    const details = {
      bankIds,
      claimIds: claimsMoved.map(({ id }) => id),
      claimsDropped: claimsDropped.map(claimFieldsOf),
    };
    const entry = { actor, at, subjectType: 'cellType' } as const;
    await appendTrail(
      { ...entry, subjectId: fromId, action: 'merged', details: { intoId, ...details } },
      transaction,
    );
    await appendTrail(
      { ...entry, subjectId: intoId, action: 'tookIn', details: { fromId, ...details } },
      transaction,
    );
    await tellProposer(deps, from, mergedNotice(deps, from, into), transaction);
    if (plan.fromCounts.checks === 0) return;
    if (plan.isRecomputed) await requestRecompute(deps, intoId, transaction);
    else await requestRefit(deps, transaction);
  });
}

interface Move {
  fromId: string;
  intoId: string;
  at: Date;
  actor: SignedInActor;
}

/** Every bank, with an entry in its own trail; its new version keeps an owner's open form from undoing it. */
async function moveBanks({ fromId, intoId, at, actor }: Move, transaction: Transaction): Promise<string[]> {
  const banks = await Bank.findAll({ where: { cellTypeId: fromId }, order: [['id', 'ASC']], transaction });
  for (const bank of banks) {
    await bank.update({ cellTypeId: intoId, version: bank.version + 1 }, { transaction });
    const entry = { actor, at, subjectType: 'bank', subjectId: bank.id } as const;
    const changes = { cellTypeId: { from: fromId, to: intoId } };
    await appendTrail({ ...entry, action: 'cellTypeMerged', details: { changes } }, transaction);
  }
  return banks.map(({ id }) => id);
}
