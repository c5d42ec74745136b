import type { Transaction } from 'sequelize';

import type { LoadedBank } from '../banks/queries';
import { Bank, BankEvent, CellType } from '../db/models';
import type { Deps } from '../deps';
import { appendTrail } from '../trail/appendTrail';
import { evaluateCheck, fieldsOf, replaceFindings } from './evaluateCheck';
import { findChecksOf } from './queries';

/**
 * Computes and screens a bank's undecided checks anew, in order of their day, after something they are judged by has
 * changed: the bank, its events, another of its checks. New figures make a new version, so that nobody decides on the
 * old ones.
 */
export async function rescreenOpenChecks(
  deps: Deps,
  bankId: string,
  transaction: Transaction,
  exceptCheckId?: string,
): Promise<void> {
  const checks = await findChecksOf(bankId, transaction);
  const open = checks.filter(
    ({ id, state }) => id !== exceptCheckId && (state === 'submitted' || state === 'sentBack'),
  );
  if (open.length === 0) return;
  const bank = (await Bank.findByPk(bankId, {
    include: [
      { model: CellType, as: 'cellType' },
      { model: BankEvent, as: 'events' },
    ],
    transaction,
  })) as LoadedBank;
  for (const check of open) {
    const { upload, submittedAt } = check;
    const request = { bank, fields: fieldsOf(check), upload, checkId: check.id, submittedAt };
    const { columns, computed, findings } = await evaluateCheck(deps, request, transaction);
    const isNew = JSON.stringify(computed) !== JSON.stringify(check.computed);
    await check.update({ ...columns, ...(isNew ? { version: check.version + 1 } : {}) }, { transaction });
    await replaceFindings(check.id, findings, transaction);
    if (!isNew) continue;
    const entry = { actor: 'system', at: deps.clock(), subjectType: 'check', subjectId: check.id } as const;
    await appendTrail({ ...entry, action: 'recomputed', details: { computed } }, transaction);
  }
}
