import { col, fn, Op, type Transaction, type WhereOptions } from 'sequelize';

import type { CheckState } from '@/lib/contract/checks';

import { Bank, BankEvent, CellType, Check, Finding, TrailEntry, TrailText, Upload } from '../db/models';
import type { Cursor } from './cursor';

type QueueBank = Bank & { cellType: CellType };
export type QueuedCheck = Check & { bank: QueueBank; findings: Finding[] };
export type LoadedSubmission = Check & {
  bank: QueueBank & { events: BankEvent[] };
  findings: Finding[];
  upload: Upload | null;
};

/** Drafts are their owners' alone. */
const notDraft = { state: { [Op.ne]: 'draft' } } as const;

interface QueuePage {
  state: CheckState;
  after: Cursor | null;
  limit: number;
}

/** A page of the queue, worst first, then oldest first; one more than asked where there is a next page. */
export async function findQueue({ state, after, limit }: QueuePage): Promise<QueuedCheck[]> {
  const checks = await Check.findAll({
    where: { [Op.and]: [{ state }, notDraft, ...(after ? [laterThan(after)] : [])] },
    include: [
      { model: Bank, as: 'bank', include: [{ model: CellType, as: 'cellType' }] },
      {
        model: Finding,
        as: 'findings',
        separate: true,
        attributes: ['checkId', 'rule', 'title', 'severity'],
      },
    ],
    order: [
      ['severity', 'DESC'],
      ['submittedAt', 'ASC'],
      ['id', 'ASC'],
    ],
    limit: limit + 1,
  });
  return checks as QueuedCheck[];
}

function laterThan({ severity, submittedAt, checkId }: Cursor): WhereOptions<Check> {
  return {
    [Op.or]: [
      { severity: { [Op.lt]: severity } },
      { severity, submittedAt: { [Op.gt]: submittedAt } },
      { severity, submittedAt, id: { [Op.gt]: checkId } },
    ],
  };
}

/** How many checks are in each state. */
export async function countByState(): Promise<Partial<Record<CheckState, number>>> {
  const rows = (await Check.findAll({
    attributes: ['state', [fn('COUNT', col('id')), 'count']],
    where: notDraft,
    group: ['state'],
    raw: true,
  })) as unknown as { state: CheckState; count: number }[];
  return Object.fromEntries(rows.map(({ state, count }) => [state, count]));
}

/** A submission with everything its page shows, or null; a draft is none. */
export async function findSubmission(checkId: string): Promise<LoadedSubmission | null> {
  const check = await Check.findOne({
    where: { id: checkId, ...notDraft },
    include: [
      {
        model: Bank,
        as: 'bank',
        include: [
          { model: CellType, as: 'cellType' },
          { model: BankEvent, as: 'events' },
        ],
      },
      { model: Finding, as: 'findings' },
      { model: Upload, as: 'upload' },
    ],
  });
  return check as LoadedSubmission | null;
}

/** The checks of a bank that were ever submitted, in order of their day. */
export async function findHistory(bankId: string): Promise<Check[]> {
  return Check.findAll({
    where: { bankId, ...notDraft },
    order: [
      ['testedOn', 'ASC'],
      ['submittedAt', 'ASC'],
    ],
  });
}

/** The trail of a check, oldest first. */
export async function findTrail(checkId: string): Promise<TrailEntry[]> {
  return TrailEntry.findAll({
    where: { subjectType: 'check', subjectId: checkId },
    include: [{ model: TrailText, as: 'texts', separate: true }],
    order: [['id', 'ASC']],
  });
}

/** The check to decide on, with its bank; null where there is none. */
export async function findDecidable(
  checkId: string,
  transaction: Transaction,
): Promise<(Check & { bank: QueueBank }) | null> {
  const check = await Check.findOne({
    where: { id: checkId, ...notDraft },
    include: [{ model: Bank, as: 'bank', include: [{ model: CellType, as: 'cellType' }] }],
    transaction,
  });
  return check as (Check & { bank: QueueBank }) | null;
}
