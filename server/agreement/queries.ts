import type { Transaction } from 'sequelize';

import { Bank, BankEvent, BlindReview, CellType, Check, type Decision, Upload } from '../db/models';
import { AppError } from '../errors';
import type { SignedInActor } from '../policies';

type ReviewBank = Bank & { cellType: CellType; events: BankEvent[] };
export type LoadedReview = BlindReview & {
  decision: Decision;
  check: Check & { bank: ReviewBank; upload: Upload | null };
};

const parts = [
  { association: 'decision' },
  {
    model: Check,
    as: 'check',
    include: [
      {
        model: Bank,
        as: 'bank',
        include: [
          { model: CellType, as: 'cellType' },
          { model: BankEvent, as: 'events' },
        ],
      },
      { model: Upload, as: 'upload' },
    ],
  },
];

/** What waits for the reader's second look, the longest first. */
export async function findWaitingFor({ userId }: SignedInActor): Promise<LoadedReview[]> {
  const reviews = await BlindReview.findAll({
    where: { reviewerId: userId, doneAt: null },
    include: parts,
    order: [
      ['drawnAt', 'ASC'],
      ['id', 'ASC'],
    ],
  });
  return reviews as LoadedReview[];
}

/** @throws AppError notFound, for a review that is another's too */
export async function findReview(
  { userId }: SignedInActor,
  reviewId: string,
  transaction?: Transaction,
): Promise<LoadedReview> {
  const where = { id: reviewId, reviewerId: userId };
  const review = await BlindReview.findOne({ where, include: parts, transaction });
  if (!review || review.check!.bank!.ownerId === userId) throw new AppError('notFound');
  return review as LoadedReview;
}

/** Reviews that are done, the newest first; of those that wait nobody is told anything. */
export async function findDone(): Promise<LoadedReview[]> {
  const reviews = await BlindReview.findAll({ include: parts, order: [['doneAt', 'DESC']] });
  return reviews.filter(({ doneAt }) => doneAt) as LoadedReview[];
}
