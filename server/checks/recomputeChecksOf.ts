import type { Transaction } from 'sequelize';

import type { LoadedBank } from '../banks/queries';
import { Bank, BankEvent, CellType } from '../db/models';
import type { Deps } from '../deps';
import { appendTrail } from '../trail/appendTrail';
import { evaluateCheck, fieldsOf } from './evaluateCheck';
import { findChecksOf } from './queries';
import { rescreenOpenChecks } from './rescreenOpenChecks';

/**
 * Works out all of a bank's checks anew after its cell type's rating has changed. What was decided stays decided and
 * keeps its findings: only its figures move, and the trail holds the new ones. Open checks are screened anew too.
 */
export async function recomputeChecksOf(deps: Deps, bankId: string, transaction: Transaction): Promise<void> {
  const bank = (await Bank.findByPk(bankId, {
    include: [
      { model: CellType, as: 'cellType' },
      { model: BankEvent, as: 'events' },
    ],
    transaction,
  })) as LoadedBank | null;
  if (!bank) return;
  const checks = await findChecksOf(bankId, transaction);
  for (const check of checks) {
    if (check.state === 'submitted' || check.state === 'sentBack') continue;
    const { upload, submittedAt } = check;
    const request = { bank, fields: fieldsOf(check), upload, checkId: check.id, submittedAt };
    const { computed, columns } = await evaluateCheck(deps, request, transaction);
    if (JSON.stringify(computed) === JSON.stringify(check.computed)) continue;
    const { ageYears, efc, sohFraction } = columns;
    await check.update({ computed, ageYears, efc, sohFraction }, { transaction });
    const entry = { actor: 'system', at: deps.clock(), subjectType: 'check', subjectId: check.id } as const;
    await appendTrail({ ...entry, action: 'recomputed', details: { computed } }, transaction);
  }
  await rescreenOpenChecks(deps, bankId, transaction);
}
