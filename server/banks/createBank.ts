import type { BankFields } from '@/lib/contract/banks';

import { Bank } from '../db/models';
import type { Deps } from '../deps';
import type { Actor } from '../policies';
import { appendTrail } from '../trail/appendTrail';
import { checkBankFields } from './checkBankFields';
import { drawPseudonym } from './drawPseudonym';

/** Stores a new bank of the actor's; returns its id. */
export async function createBank(
  deps: Deps,
  actor: Extract<Actor, { userId: string }>,
  fields: BankFields,
): Promise<string> {
  return deps.db.transaction(async (transaction) => {
    await checkBankFields(deps, actor, fields, {}, transaction);
    const pseudonym = await drawPseudonym(transaction);
    const bank = await Bank.create({ ...fields, ownerId: actor.userId, pseudonym }, { transaction });
    const entry = { at: deps.clock(), subjectType: 'bank', subjectId: bank.id, action: 'created' } as const;
    const { name, ...rest } = fields;
    await appendTrail({ ...entry, actor, details: { fields: rest }, texts: { name } }, transaction);
    return bank.id;
  });
}
