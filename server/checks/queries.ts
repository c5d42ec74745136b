import { Op, type Transaction } from 'sequelize';

import { type LoadedBank, findOwnBank } from '../banks/queries';
import { Check, Finding, TrailEntry, TrailText, Upload } from '../db/models';
import { AppError } from '../errors';
import type { Action, Actor } from '../policies';

/** A check with what the screening left on it and the log behind it. */
export type LoadedCheck = Check & { findings: Finding[]; upload: Upload | null };

const parts = [
  { model: Finding, as: 'findings' },
  { model: Upload, as: 'upload' },
];

const byDay: [string, string][] = [
  ['testedOn', 'ASC'],
  ['submittedAt', 'ASC'],
];

/** Checks that still stand for their day; the others leave it free. */
export const standingStates = ['submitted', 'sentBack', 'approved'] as const;

/**
 * The check and its bank, if the actor may do this with it.
 * @throws AppError notFound, for others' checks too
 */
export async function findOwnCheck(
  actor: Actor,
  action: Action,
  checkId: string,
  transaction?: Transaction,
): Promise<{ check: LoadedCheck; bank: LoadedBank }> {
  const check = await Check.findByPk(checkId, { include: parts, transaction });
  if (!check) throw new AppError('notFound');
  const bank = await findOwnBank(actor, action, check.bankId, transaction);
  return { check: check as LoadedCheck, bank };
}

/** A bank's checks in order of their day. */
export async function findChecksOf(bankId: string, transaction?: Transaction): Promise<LoadedCheck[]> {
  const checks = await Check.findAll({
    where: { bankId, state: { [Op.ne]: 'draft' } },
    include: parts,
    order: byDay,
    transaction,
  });
  return checks as LoadedCheck[];
}

/** The check that stands for a day of a bank. */
export async function findStandingOfDay(
  bankId: string,
  testedOn: string,
  transaction: Transaction,
): Promise<Check | null> {
  return Check.findOne({ where: { bankId, testedOn, state: standingStates }, transaction });
}

/** A bank's checks in order of their day, with their own columns only. */
export async function findBareChecksOf(bankId: string, transaction: Transaction): Promise<Check[]> {
  return Check.findAll({ where: { bankId, state: { [Op.ne]: 'draft' } }, order: byDay, transaction });
}

/** The trail of each of some checks, oldest first. */
export async function findTrailOf(checkIds: string[]): Promise<Map<string, TrailEntry[]>> {
  const entries = await TrailEntry.findAll({
    where: { subjectType: 'check', subjectId: checkIds },
    include: [{ model: TrailText, as: 'texts', separate: true }],
    order: [['id', 'ASC']],
  });
  const byCheck = new Map<string, TrailEntry[]>(checkIds.map((id) => [id, []]));
  for (const entry of entries) byCheck.get(entry.subjectId)?.push(entry);
  return byCheck;
}

/** Checks, other than this one, that stand on a log of the same content. */
export async function findSameLogCheckIds(
  sha256: string,
  exceptCheckId: string | null,
  transaction: Transaction,
): Promise<string[]> {
  const checks = await Check.findAll({
    attributes: ['id'],
    where: { state: { [Op.ne]: 'withdrawn' }, ...(exceptCheckId ? { id: { [Op.ne]: exceptCheckId } } : {}) },
    include: [{ model: Upload, as: 'upload', attributes: [], where: { sha256 }, required: true }],
    transaction,
  });
  return checks.map(({ id }) => id);
}
