import type { Transaction } from 'sequelize';

import { Proposal } from '../db/models';
import { AppError } from '../errors';
import type { SignedInActor } from '../policies';

interface ProposalRequest {
  actor: SignedInActor;
  checkId: string;
  version: number;
  reason: string;
  at: Date;
}

/**
 * Whether two moderators agree: with another's proposal there, they do; else this one is kept as the proposal.
 * @throws AppError conflict when the moderator has proposed it before
 */
export async function agreeOrPropose(
  { actor, checkId, version, reason, at }: ProposalRequest,
  transaction: Transaction,
): Promise<'agreed' | 'proposed'> {
  const proposal = await Proposal.findByPk(checkId, { transaction });
  if (proposal?.version === version) {
    if (proposal.moderatorId !== actor.userId) return 'agreed';
    throw new AppError('conflict', 'You have proposed this already. Another moderator has to agree.');
  }
  await Proposal.upsert(
    { checkId, version, reason, moderatorId: actor.userId, proposedAt: at },
    { transaction },
  );
  return 'proposed';
}
