import { createHmac } from 'node:crypto';

import { Op, type Transaction } from 'sequelize';

import { verdictSchema } from '@/lib/contract/agreement';

import { Bank, BlindReview, Check, type Decision, User } from '../db/models';
import type { Deps } from '../deps';
import { isDrawn } from './isDrawn';

/** Puts a settled decision into the blind sample where it is drawn; a check is drawn once at most. */
export async function drawForReview(
  { config, clock }: Deps,
  decision: Decision,
  transaction: Transaction,
): Promise<void> {
  const { id: decisionId, checkId, action, before } = decision;
  // A question is no end, and what was in the pool already was judged before.
  const isFirstJudgement = action !== 'sendBack' && before.state !== 'approved';
  if (!isFirstJudgement || !verdictSchema.safeParse(action).success) return;
  if (!isDrawn(checkId, config.sampleSeed)) return;
  const known = await BlindReview.count({ where: { checkId }, transaction });
  if (known > 0) return;
  await BlindReview.create({ checkId, decisionId, reviewerId: null, drawnAt: clock() }, { transaction });
  await assignReviewers(config.sampleSeed, transaction);
}

/**
 * Gives each review that nobody can do yet to a moderator who neither decided on the check nor owns its bank; to a
 * steward, who may read the whole trail, only where there is no such moderator. The choice is drawn, like the sample.
 */
export async function assignReviewers(seed: string, transaction: Transaction): Promise<void> {
  const screeners = await User.findAll({
    where: { role: ['moderator', 'steward'], erasedAt: null },
    order: [['id', 'ASC']],
    transaction,
  });
  const ids = screeners.map(({ id }) => id);
  const waiting = await BlindReview.findAll({
    where: { doneAt: null, [Op.or]: [{ reviewerId: null }, { reviewerId: { [Op.notIn]: ids } }] },
    include: [
      { association: 'decision', attributes: ['moderatorId'] },
      {
        model: Check,
        as: 'check',
        attributes: ['id'],
        include: [{ model: Bank, as: 'bank', attributes: ['ownerId'] }],
      },
    ],
    transaction,
  });
  for (const review of waiting) {
    const taken = [review.decision!.moderatorId, review.check!.bank!.ownerId];
    const free = screeners.filter(({ id }) => !taken.includes(id));
    const moderators = free.filter(({ role }) => role === 'moderator');
    const among = moderators.length > 0 ? moderators : free;
    const draw = createHmac('sha256', seed).update(`reviewer ${review.checkId}`).digest().readUInt32BE(0);
    const reviewer = among[draw % Math.max(among.length, 1)];
    if (reviewer) await review.update({ reviewerId: reviewer.id }, { transaction });
  }
}
