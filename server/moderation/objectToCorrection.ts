import type { z } from 'zod';

import type { objectionRequestSchema } from '@/lib/contract/checks';

import { evaluateCheck, fieldsOf, replaceFindings } from '../checks/evaluateCheck';
import { findOwnCheck } from '../checks/queries';
import { rescreenOpenChecks } from '../checks/rescreenOpenChecks';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { requestRefit } from '../fits/requestRefit';
import type { SignedInActor } from '../policies';
import { appendTrail } from '../trail/appendTrail';

/**
 * The owner does not agree with a correction: the check leaves the pool and stands in the queue again, with the figures
 * as the owner gave them and the objection in the conversation.
 * @throws AppError notFound, conflict (nothing was corrected), versionConflict
 */
export async function objectToCorrection(
  deps: Deps,
  actor: SignedInActor,
  checkId: string,
  { version, reason }: z.output<typeof objectionRequestSchema>,
): Promise<void> {
  await deps.db.transaction(async (transaction) => {
    const { check, bank } = await findOwnCheck(actor, 'checks.update', checkId, transaction);
    const { correction, upload, submittedAt } = check;
    if (check.state !== 'approved' || !correction)
      throw new AppError('conflict', 'No figure of this check was corrected.');
    if (check.version !== version) throw new AppError('versionConflict');
    const reading = { ...check.reading, ...correction.before };
    const fields = { ...fieldsOf(check), reading };
    const request = { bank, fields, upload, checkId, submittedAt };
    const { columns, findings } = await evaluateCheck(deps, request, transaction);
    const state = { state: 'submitted', version: version + 1, decidedAt: null, correction: null } as const;
    await check.update({ ...columns, ...state, reading }, { transaction });
    await replaceFindings(checkId, findings, transaction);
    const entry = { actor, at: deps.clock(), subjectType: 'check', subjectId: checkId } as const;
    const details = { taken: correction, version: version + 1 };
    await appendTrail({ ...entry, action: 'objected', details, texts: { answer: reason } }, transaction);
    await rescreenOpenChecks(deps, bank.id, transaction, checkId);
    await requestRefit(deps, transaction);
  });
}
