import type { Transaction } from 'sequelize';
import { z } from 'zod';

import { recomputeChecksOf } from '../checks/recomputeChecksOf';
import { Bank } from '../db/models';
import type { Deps } from '../deps';
import { requestRefit } from '../fits/requestRefit';
import type { JobHandler } from '../jobs/JobRunner';

/** Banks worked out anew in one transaction, so that others get their turn in between. */
const banksAtOnce = 20;

const payloadSchema = z.object({ cellTypeId: z.string() });

/** Asks, in the caller's transaction, for a cell type's checks to be worked out anew; the refit follows by itself. */
export async function requestRecompute(
  { jobs }: Deps,
  cellTypeId: string,
  transaction: Transaction,
): Promise<void> {
  const dedupeKey = `recompute:${cellTypeId}`;
  await jobs.enqueue({ kind: 'recomputeChecks', payload: { cellTypeId }, dedupeKey }, transaction);
}

/** Job: works out anew every check of a cell type's banks, then asks for one refit. Safe to run again. */
export function recomputeChecks(deps: Deps): JobHandler {
  return async (payload) => {
    const { cellTypeId } = payloadSchema.parse(payload);
    const banks = await Bank.findAll({ attributes: ['id'], where: { cellTypeId }, order: [['id', 'ASC']] });
    for (let from = 0; from < banks.length; from += banksAtOnce) {
      await deps.db.transaction(async (transaction) => {
        for (const { id } of banks.slice(from, from + banksAtOnce))
          await recomputeChecksOf(deps, id, transaction);
      });
    }
    await deps.db.transaction((transaction) => requestRefit(deps, transaction));
  };
}
