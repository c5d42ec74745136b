import type { z } from 'zod';

import type { resubmitCheckRequestSchema } from '@/lib/contract/checks';

import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { Actor } from '../policies';
import { appendTrail } from '../trail/appendTrail';
import { admitFields } from './admitFields';
import { evaluateCheck, replaceFindings } from './evaluateCheck';
import { findOwnCheck } from './queries';
import { refuseUnlessOpen } from './refuseUnlessOpen';
import { rescreenOpenChecks } from './rescreenOpenChecks';

/**
 * Changes the values of a check that is not decided yet; one that was sent back is submitted again. The values as they
 * were stay in the trail.
 * @throws AppError notFound, alreadyDecided, conflict, versionConflict, invalid
 */
export async function resubmitCheck(
  deps: Deps,
  actor: Extract<Actor, { userId: string }>,
  checkId: string,
  { version, answer, ...entered }: z.output<typeof resubmitCheckRequestSchema>,
): Promise<void> {
  await deps.db.transaction(async (transaction) => {
    const { check, bank } = await findOwnCheck(actor, 'checks.update', checkId, transaction);
    refuseUnlessOpen(check);
    if (check.version !== version) throw new AppError('versionConflict');
    const admitted = await admitFields(deps, { bank, fields: entered, checkId }, transaction);
    const { fields, upload, edited } = admitted;
    const { columns, computed, findings } = await evaluateCheck(
      deps,
      { bank, fields, upload, checkId, submittedAt: check.submittedAt },
      transaction,
    );
    const action = check.state === 'sentBack' ? 'resubmitted' : 'edited';
    const { testedOn } = fields.reading;
    await check.update(
      { ...fields, ...columns, testedOn, state: 'submitted', version: version + 1 },
      { transaction },
    );
    await replaceFindings(checkId, findings, transaction);
    const entry = { actor, at: deps.clock(), subjectType: 'check', subjectId: checkId, action } as const;
    const { note, ...values } = entered;
    const details = { entered: values, sources: fields.sources, edited, computed };
    await appendTrail({ ...entry, details, texts: { answer, note } }, transaction);
    await rescreenOpenChecks(deps, bank.id, transaction, checkId);
  });
}
