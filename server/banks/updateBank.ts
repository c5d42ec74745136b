import { type BankFields, bankFieldsSchema } from '@/lib/contract/banks';

import { rescreenOpenChecks } from '../checks/rescreenOpenChecks';
import { Check } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { requestRefit } from '../fits/requestRefit';
import type { Actor } from '../policies';
import { appendTrail } from '../trail/appendTrail';
import { checkBankFields } from './checkBankFields';
import { findOwnBank } from './queries';

/** What approved figures were computed with. */
const computedWith = ['cellTypeId', 'parallel', 'series', 'firstUseMonth'] as const;
/** What places approved checks in the pool. */
const pooledBy = ['bought', 'clamping', 'climateBand'] as const;

type Changes = Partial<Record<keyof BankFields, { from: unknown; to: unknown }>>;

/**
 * Changes a bank of the actor's. Checks still waiting are computed and screened anew; a change that approved checks
 * were computed with is refused, because they were judged on it.
 * @throws AppError versionConflict, invalid, conflict
 */
export async function updateBank(
  deps: Deps,
  actor: Extract<Actor, { userId: string }>,
  bankId: string,
  { version, ...fields }: BankFields & { version: number },
): Promise<void> {
  await deps.db.transaction(async (transaction) => {
    const bank = await findOwnBank(actor, 'banks.update', bankId, transaction);
    if (bank.version !== version) throw new AppError('versionConflict');
    await checkBankFields(deps, actor, fields, { keptCellTypeId: bank.cellTypeId }, transaction);
    const changes = changesBetween(bankFieldsSchema.parse(bank.get()), fields);
    if (Object.keys(changes).length === 0) return;
    const hasApproved = (await Check.count({ where: { bankId, state: 'approved' }, transaction })) > 0;
    if (hasApproved) refuseUnderApproved(changes);
    const bankName = bank.name;
    await bank.update({ ...fields, version: version + 1 }, { transaction });
    const entry = { at: deps.clock(), subjectType: 'bank', subjectId: bankId, action: 'changed' } as const;
    const { name, ...rest } = changes;
    const texts: Record<string, string> = name ? { nameBefore: bankName, name: fields.name } : {};
    await appendTrail({ ...entry, actor, details: { changes: rest }, texts }, transaction);
    await rescreenOpenChecks(deps, bankId, transaction);
    if (hasApproved && pooledBy.some((field) => changes[field])) await requestRefit(deps, transaction);
  });
}

function changesBetween(before: BankFields, after: BankFields): Changes {
  const keys = Object.keys(after) as (keyof BankFields)[];
  const changed = keys.filter((key) => JSON.stringify(before[key]) !== JSON.stringify(after[key]));
  return Object.fromEntries(changed.map((key) => [key, { from: before[key], to: after[key] }]));
}

function refuseUnderApproved(changes: Changes): void {
  const refused = computedWith.filter((field) => changes[field]);
  if (refused.length === 0) return;
  const message =
    'Approved checks were computed with this. Withdraw them first, or add the change as an event.';
  throw new AppError('conflict', message, Object.fromEntries(refused.map((field) => [field, message])));
}
