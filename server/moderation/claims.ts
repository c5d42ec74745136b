import { Op, type Transaction } from 'sequelize';

import type { Claim as ClaimContract } from '@/lib/contract/moderation';
import { formatInstant } from '@/lib/units';

import { Check, Claim } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { authorizeRecord, type SignedInActor } from '../policies';

/** A claim lasts as long after the last sign of its moderator. */
const claimMs = 15 * 60_000;

/**
 * Takes a check to work on, or keeps it: nobody else can decide on it until the claim is released or expires.
 * @throws AppError notFound (drafts and own checks too), conflict (another moderator has it, or it is decided)
 */
export async function claimCheck(
  { db, clock }: Deps,
  actor: SignedInActor,
  checkId: string,
): Promise<ClaimContract> {
  return db.transaction(async (transaction) => {
    const check = await Check.findByPk(checkId, { include: 'bank', transaction });
    if (!check || check.state === 'draft') throw new AppError('notFound');
    authorizeRecord(actor, 'screening.decide', { ownerId: check.bank!.ownerId });
    if (check.state !== 'submitted')
      throw new AppError('alreadyDecided', 'This check does not wait any more.');
    await refuseIfClaimed({ checkId, actor, at: clock() }, transaction);
    const expiresAt = new Date(clock().getTime() + claimMs);
    await Claim.upsert({ checkId, moderatorId: actor.userId, expiresAt }, { transaction });
    return { by: 'me', until: expiresAt.toISOString() };
  });
}

/** Gives up an own claim; one that is not there is no error. */
export async function releaseCheck({ db }: Deps, actor: SignedInActor, checkId: string): Promise<void> {
  await db.transaction((transaction) =>
    Claim.destroy({ where: { checkId, moderatorId: actor.userId }, transaction }),
  );
}

/** @throws AppError conflict while another moderator is at work on the check */
export async function refuseIfClaimed(
  { checkId, actor, at }: { checkId: string; actor: SignedInActor; at: Date },
  transaction: Transaction,
): Promise<void> {
  const claim = await Claim.findByPk(checkId, { transaction });
  if (!claim || claim.moderatorId === actor.userId || claim.expiresAt <= at) return;
  throw new AppError(
    'conflict',
    `Another moderator is at work on this one, until ${formatInstant(claim.expiresAt)} at most.`,
  );
}

/** Claims in force of some checks, as the reader sees them. */
export async function findClaims(
  { clock }: Deps,
  actor: SignedInActor,
  checkIds: string[],
): Promise<Map<string, ClaimContract>> {
  const claims = await Claim.findAll({ where: { checkId: checkIds, expiresAt: { [Op.gt]: clock() } } });
  return new Map(
    claims.map(({ checkId, moderatorId, expiresAt }) => [
      checkId,
      { by: moderatorId === actor.userId ? 'me' : 'other', until: expiresAt.toISOString() },
    ]),
  );
}
