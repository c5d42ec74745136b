import type { Queue, QueueEntry, Submission } from '@/lib/contract/moderation';

import { presentCellTypeBrief } from '../cellTypes/present';
import { fieldsOf } from '../checks/evaluateCheck';
import { presentHistory } from '../checks/presentHistory';
import { type Check, type Finding, severityOrder, type TrailEntry } from '../db/models';
import type { FitInForce } from '../fits/currentFit';
import { presentView } from '../fits/presentView';
import type { SignedInActor } from '../policies';
import { writeCursor } from './cursor';
import type { LoadedSubmission, QueuedCheck } from './queries';

/** A page of the queue; of the owner there is nothing but the bank's five characters. */
export function presentQueue(checks: QueuedCheck[], limit: number, counts: Queue['counts']): Queue {
  const page = checks.slice(0, limit);
  const last = page.at(-1);
  const hasNext = checks.length > limit && last;
  return {
    entries: page.map(presentEntry),
    next: hasNext
      ? writeCursor({ severity: last.severity, submittedAt: last.submittedAt, checkId: last.id })
      : null,
    counts,
  };
}

function presentEntry({ id, bank, findings, state, severity, submittedAt }: QueuedCheck): QueueEntry {
  return {
    checkId: id,
    pseudonym: bank.pseudonym,
    cellType: presentCellTypeBrief(bank.cellType),
    layout: `${bank.parallel}p${bank.series}s`,
    state,
    severity: severityOrder[severity]!,
    headline: (severity > 0 && findings.sort(worstFirst)[0]?.title) || 'Nothing found',
    submittedAt: submittedAt.toISOString(),
  };
}

interface Surroundings {
  history: Check[];
  trail: TrailEntry[];
  working: FitInForce | null;
}

/** A submission with its evidence. Of the owner it tells only whether it is the reader. */
export function presentSubmission(
  actor: SignedInActor,
  check: LoadedSubmission,
  { history, trail, working }: Surroundings,
): Submission {
  const { bank } = check;
  const { pseudonym, parallel, series, firstUseMonth, bought, clamping, clampForceN } = bank;
  return {
    checkId: check.id,
    version: check.version,
    state: check.state,
    isOwn: bank.ownerId === actor.userId,
    submittedAt: check.submittedAt.toISOString(),
    bank: {
      ...{ pseudonym, parallel, series, firstUseMonth, bought, clamping, clampForceN },
      cellType: presentCellTypeBrief(bank.cellType),
      ratedAh: bank.cellType.ratedAh * parallel,
      events: bank.events
        .map(({ id, happenedOn, kind, note }) => ({ id, happenedOn, kind, note }))
        .sort((a, b) => (a.happenedOn < b.happenedOn ? -1 : 1)),
    },
    fields: fieldsOf(check),
    computed: check.computed,
    findings: check.findings.sort(worstFirst).map(({ rule, title, severity, moderatorText, evidence }) => ({
      rule,
      title,
      severity: severityOrder[severity]!,
      text: moderatorText,
      evidence,
    })),
    log: check.upload?.result ?? null,
    history: history.map(({ id, testedOn, state, computed }) => ({
      checkId: id,
      testedOn,
      state,
      ageYears: computed.ageYears,
      efc: computed.efc,
      sohFraction: computed.sohFraction,
      expandedFraction: computed.expandedAh / computed.capacityRefAh,
    })),
    conversation: presentHistory(trail),
    working: presentView(working, bank.cellTypeId, null),
    workingFittedAt: working?.fittedAt.toISOString() ?? null,
  };
}

const worstFirst = (a: Finding, b: Finding) => b.severity - a.severity || (a.rule < b.rule ? -1 : 1);
