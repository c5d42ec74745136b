import type { z } from 'zod';

import { type BulkApproval, type bulkApprovalRequestSchema, undoSeconds } from '@/lib/contract/moderation';

import { Check } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { SignedInActor } from '../policies';
import { decide } from './decide';

/** Approves clean checks together: those on which the screening found nothing. Each stands or falls by itself. */
export async function approveClean(
  deps: Deps,
  actor: SignedInActor,
  { checks }: z.output<typeof bulkApprovalRequestSchema>,
): Promise<BulkApproval> {
  const results: BulkApproval['results'] = [];
  // By the first of them: after that not all can be undone any more.
  const undoUntil = new Date(deps.clock().getTime() + undoSeconds * 1000).toISOString();
  for (const { checkId, version } of checks) {
    try {
      await refuseUnlessClean(checkId);
      const { decisionId } = await decide(deps, actor, checkId, { action: 'approve', version });
      results.push({ checkId, decisionId, problem: null });
    } catch (error) {
      if (!(error instanceof AppError)) throw error;
      results.push({ checkId, decisionId: null, problem: error.message });
    }
  }
  return { results, undoUntil };
}

async function refuseUnlessClean(checkId: string): Promise<void> {
  const check = await Check.findByPk(checkId, { attributes: ['severity', 'state'] });
  if (check && check.severity > 0)
    throw new AppError('conflict', 'Something was found on this one. Open it to decide.');
  // One that was asked about waits for its owner's answer.
  if (check?.state === 'sentBack') throw new AppError('conflict', 'This one waits for its owner.');
}
