import type { Transaction } from 'sequelize';

import { findOwnBank } from '../banks/queries';
import { HealthRecord } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { SignedInActor } from '../policies';
import { appendTrail } from '../trail/appendTrail';

/**
 * Withdraws a record of the actor's: its link says so from now on, and nothing else. Done twice it is done once.
 * @returns the record
 * @throws AppError notFound, for others' records too
 */
export async function revokeRecord(
  deps: Deps,
  actor: SignedInActor,
  recordId: string,
): Promise<HealthRecord> {
  return deps.db.transaction(async (transaction) => {
    const record = await HealthRecord.findByPk(recordId, { transaction });
    if (!record) throw new AppError('notFound');
    await findOwnBank(actor, 'records.revoke', record.bankId, transaction);
    if (record.revokedAt === null) await withdraw(deps, actor, { record, isErased: false }, transaction);
    return record;
  });
}

/** Withdraws and empties every record of some banks, as their owner's account is deleted. */
export async function eraseRecords(
  deps: Deps,
  actor: SignedInActor,
  bankIds: readonly string[],
  transaction: Transaction,
): Promise<void> {
  const records = await HealthRecord.findAll({
    where: { bankId: [...bankIds] },
    order: [['id', 'ASC']],
    transaction,
  });
  for (const record of records) await withdraw(deps, actor, { record, isErased: true }, transaction);
}

async function withdraw(
  { clock }: Deps,
  actor: SignedInActor,
  { record, isErased }: { record: HealthRecord; isErased: boolean },
  transaction: Transaction,
): Promise<void> {
  const { id: recordId, bankId, revokedAt } = record;
  await record.update(
    { revokedAt: revokedAt ?? clock(), ...(isErased && { content: null }) },
    { transaction },
  );
  if (revokedAt !== null) return;
  const entry = {
    actor,
    at: clock(),
    subjectType: 'bank',
    subjectId: bankId,
    action: 'recordWithdrawn',
  } as const;
  await appendTrail({ ...entry, details: { recordId } }, transaction);
}
