import type { BlindSubmission } from '@/lib/contract/agreement';

import { evaluateCheck, fieldsOf } from '../checks/evaluateCheck';
import {
  type BankEvent,
  type CellType,
  type Bank,
  Finding,
  severityOrder,
  type TrailEntry,
} from '../db/models';
import type { Deps } from '../deps';
import { findCurrentFit } from '../fits/currentFit';
import { presentSubmission } from '../moderation/present';
import { findHistory, findTrail, type LoadedSubmission } from '../moderation/queries';
import type { SignedInActor } from '../policies';
import { findHidden } from './hidden';
import type { LoadedReview } from './queries';

/** What was said between owner and moderators before the decision; what moderators said among themselves is not. */
const openActions = new Set(['submitted', 'edited', 'resubmitted', 'answered', 'sentBack']);

/**
 * A submission as it stood before its decision: the owner's own reading, computed and screened anew, with the
 * conversation up to then. Nothing of it tells what was decided.
 */
export async function blindSubmission(
  deps: Deps,
  actor: SignedInActor,
  review: LoadedReview,
): Promise<BlindSubmission> {
  const { decision, checkId } = review;
  const check = await asBefore(deps, review);
  const [history, trail, working, hidden] = await Promise.all([
    findHistory(check.bankId),
    findTrail(checkId),
    findCurrentFit(deps, 'working'),
    findHidden(actor),
  ]);
  for (const one of history) if (hidden.has(one.id)) one.state = 'submitted';
  const said = ({ at, action }: TrailEntry) => at < decision.decidedAt && openActions.has(action);
  const submission = presentSubmission(actor, check, {
    history: history.map((one) => (one.id === checkId ? check : one)),
    trail: trail.filter(said),
    working,
    ...{ claim: null, influence: null, proposal: null, undoable: null },
  });
  return { ...submission, reviewId: review.id };
}

type LoadedBank = Bank & { cellType: CellType; events: BankEvent[] };

/** The check in memory, put back to before the decision; nothing is stored. */
async function asBefore(deps: Deps, { check, decision }: LoadedReview): Promise<LoadedSubmission> {
  const { before } = decision;
  const { id: checkId, upload, submittedAt } = check;
  const bank = check.bank as LoadedBank;
  const fields = { ...fieldsOf(check), reading: before.reading };
  const { columns, findings } = await deps.db.transaction((transaction) =>
    evaluateCheck(deps, { bank, fields, upload, checkId, submittedAt }, transaction),
  );
  const { severity: _worst, ...figures } = columns;
  Object.assign(check, figures, {
    ...{ state: 'submitted', reading: before.reading, correction: null },
    ...{ isRealFailure: false, mergedIntoId: null },
  });
  const found = findings.map((finding) =>
    Finding.build({ ...finding, checkId, severity: severityOrder.indexOf(finding.severity) }),
  );
  return Object.assign(check, { findings: found }) as unknown as LoadedSubmission;
}
