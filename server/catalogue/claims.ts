import type { Transaction } from 'sequelize';

import type { ClaimCondition, ClaimFields } from '@/lib/contract/catalogue';

import { type CellType, QuotedClaim } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { SignedInActor } from '../policies';
import { appendTrail } from '../trail/appendTrail';
import { findOpenEntry } from './queries';

interface ClaimTarget {
  cellTypeId: string;
  /** Of the cell type. */
  version: number;
}

/** The fields of a claim, without its keys. */
export function claimFieldsOf(claim: ClaimFields): ClaimFields {
  const { cycles, endOfLifeFraction, depthFraction, chargeIt, dischargeIt, temperatureC } = claim;
  const { clamping, clampForceN, whereItStands } = claim;
  return {
    ...{ cycles, endOfLifeFraction, depthFraction, chargeIt, dischargeIt, temperatureC },
    ...{ clamping, clampForceN, whereItStands },
  };
}

/** Conditions that the sheet does not state, without which the claim is compared with nothing. */
export function notStatedIn(claim: ClaimFields): ClaimCondition[] {
  const numbers = (['depthFraction', 'chargeIt', 'dischargeIt', 'temperatureC'] as const).filter(
    (condition) => claim[condition] === null,
  );
  return claim.clamping === 'notStated' ? [...numbers, 'clamping'] : numbers;
}

/** Adds a claim with the note of where it stands. @throws AppError as of findOpenEntry */
export async function addClaim(
  deps: Deps,
  actor: SignedInActor,
  target: ClaimTarget,
  claim: ClaimFields,
): Promise<void> {
  await change(deps, actor, target, async (transaction) => {
    const { cellTypeId } = target;
    const added = await QuotedClaim.create({ ...claim, cellTypeId }, { transaction });
    return { action: 'claimAdded', details: { claimId: added.id, after: claim } };
  });
}

/** Puts a claim right. @throws AppError notFound, and as of findOpenEntry */
export async function editClaim(
  deps: Deps,
  actor: SignedInActor,
  target: ClaimTarget & { claimId: string },
  claim: ClaimFields,
): Promise<void> {
  await change(deps, actor, target, async (transaction) => {
    const known = await findClaim(target, transaction);
    const before = claimFieldsOf(known);
    await known.update(claim, { transaction });
    return { action: 'claimEdited', details: { claimId: known.id, before, after: claim } };
  });
}

/** Takes a claim out; what it said stays in the trail. @throws AppError as of editClaim */
export async function removeClaim(
  deps: Deps,
  actor: SignedInActor,
  target: ClaimTarget & { claimId: string },
): Promise<void> {
  await change(deps, actor, target, async (transaction) => {
    const known = await findClaim(target, transaction);
    await known.destroy({ transaction });
    return { action: 'claimRemoved', details: { claimId: known.id, before: claimFieldsOf(known) } };
  });
}

interface Done {
  action: string;
  details: Record<string, unknown>;
}

async function change(
  deps: Deps,
  actor: SignedInActor,
  { cellTypeId, version }: ClaimTarget,
  act: (transaction: Transaction) => Promise<Done>,
): Promise<void> {
  await deps.db.transaction(async (transaction) => {
    const cellType: CellType = await findOpenEntry(cellTypeId, version, transaction);
    const done = await act(transaction);
    await cellType.update({ version: version + 1 }, { transaction });
    const entry = { actor, at: deps.clock(), subjectType: 'cellType', subjectId: cellTypeId } as const;
    await appendTrail({ ...entry, ...done }, transaction);
  });
}

async function findClaim(
  { cellTypeId, claimId }: { cellTypeId: string; claimId: string },
  transaction: Transaction,
): Promise<QuotedClaim> {
  const claim = await QuotedClaim.findOne({ where: { id: claimId, cellTypeId }, transaction });
  if (!claim) throw new AppError('notFound', 'This claim is not there any more.');
  return claim;
}
