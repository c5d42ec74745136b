import type { z } from 'zod';

import type { createBankEventRequestSchema } from '@/lib/contract/banks';

import { rescreenOpenChecks } from '../checks/rescreenOpenChecks';
import { BankEvent, Check } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { requestRefit } from '../fits/requestRefit';
import { latestCalendarDate } from '../latestCalendarDate';
import type { Actor } from '../policies';
import { appendTrail } from '../trail/appendTrail';
import { findOwnBank } from './queries';

/**
 * Adds an event to the bank's history. Checks still waiting are screened anew: an event may explain them.
 * @throws AppError invalid for a day before first use or in the future
 */
export async function addBankEvent(
  deps: Deps,
  actor: Extract<Actor, { userId: string }>,
  bankId: string,
  event: z.output<typeof createBankEventRequestSchema>,
): Promise<void> {
  await deps.db.transaction(async (transaction) => {
    const bank = await findOwnBank(actor, 'banks.update', bankId, transaction);
    if (event.happenedOn > latestCalendarDate(deps.clock()))
      throw new AppError('invalid', undefined, { happenedOn: 'This day lies in the future.' });
    if (event.happenedOn.slice(0, 7) < bank.firstUseMonth)
      throw new AppError('invalid', undefined, { happenedOn: "This day lies before the bank's first use." });
    const { id } = await BankEvent.create({ ...event, bankId }, { transaction });
    const entry = { at: deps.clock(), subjectType: 'bank', subjectId: bankId, action: 'eventAdded' } as const;
    const { note, ...rest } = event;
    const details = { eventId: id, ...rest };
    await appendTrail({ ...entry, actor, details, texts: { note } }, transaction);
    await rescreenOpenChecks(deps, bankId, transaction);
    const hasApproved = (await Check.count({ where: { bankId, state: 'approved' }, transaction })) > 0;
    if (hasApproved) await requestRefit(deps, transaction);
  });
}
