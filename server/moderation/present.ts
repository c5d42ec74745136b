import type { CheckFields } from '@/lib/contract/checks';
import type { Claim, Queue, QueueEntry, Submission } from '@/lib/contract/moderation';

import { presentCellTypeBrief } from '../cellTypes/present';
import { fieldsOf } from '../checks/evaluateCheck';
import { presentHistory } from '../checks/presentHistory';
import {
  type Check,
  type Decision,
  type Finding,
  type Proposal,
  severityOrder,
  type TrailEntry,
} from '../db/models';
import type { FitInForce } from '../fits/currentFit';
import { presentView } from '../fits/presentView';
import type { SignedInActor } from '../policies';
import { writeCursor } from './cursor';
import { expectedBands } from './expectedBands';
import { hidePersonal } from './personalText';
import type { findFacets, LoadedSubmission, QueuedCheck } from './queries';
import { ruleOrder } from './rules/ruleOrder';
import type { Influence } from './workingPool';

interface QueueParts {
  limit: number;
  counts: Queue['counts'];
  claims: Map<string, Claim>;
  /** Checks that another moderator wants turned away. */
  proposed: Set<string>;
  facets: Awaited<ReturnType<typeof findFacets>> | null;
}

/** A page of the queue; of the owner there is nothing but the bank's five characters. */
export function presentQueue(actor: SignedInActor, checks: QueuedCheck[], parts: QueueParts): Queue {
  const { limit, counts, facets } = parts;
  const page = checks.slice(0, limit);
  const last = page.at(-1);
  const hasNext = checks.length > limit && last;
  return {
    entries: page.map((check) => presentEntry(actor, check, parts)),
    next: hasNext
      ? writeCursor({ severity: last.severity, submittedAt: last.submittedAt, checkId: last.id })
      : null,
    counts,
    facets: facets && {
      ...facets,
      severities: Object.fromEntries(
        facets.severities.map(({ severity, count }) => [severityOrder[severity]!, count]),
      ),
    },
  };
}

function presentEntry(
  actor: SignedInActor,
  check: QueuedCheck,
  { claims, proposed }: QueueParts,
): QueueEntry {
  const { id, bank, findings, state, severity, submittedAt, version } = check;
  return {
    checkId: id,
    pseudonym: bank.pseudonym,
    cellType: presentCellTypeBrief(bank.cellType),
    layout: `${bank.parallel}p${bank.series}s`,
    state,
    severity: severityOrder[severity]!,
    headline: (severity > 0 && findings.sort(worstFirst)[0]?.title) || 'Nothing found',
    submittedAt: submittedAt.toISOString(),
    version,
    isOwn: bank.ownerId === actor.userId,
    claimedBy: claims.get(id)?.by ?? null,
    isProposed: proposed.has(id),
  };
}

interface Surroundings {
  history: Check[];
  trail: TrailEntry[];
  working: FitInForce | null;
  claim: Claim | null;
  influence: Influence | null;
  proposal: Proposal | null;
  undoable: Decision | null;
}

/** A submission with its evidence. Of the owner it tells only whether it is the reader. */
export function presentSubmission(
  actor: SignedInActor,
  check: LoadedSubmission,
  surroundings: Surroundings,
): Submission {
  const { history, trail, working, claim, influence, proposal, undoable } = surroundings;
  const { bank } = check;
  const { pseudonym, parallel, series, firstUseMonth, bought, clamping, clampForceN } = bank;
  return {
    checkId: check.id,
    version: check.version,
    state: check.state,
    isOwn: bank.ownerId === actor.userId,
    isFromFile: check.fileDigest !== null,
    submittedAt: check.submittedAt.toISOString(),
    bank: {
      ...{ pseudonym, parallel, series, firstUseMonth, bought, clamping, clampForceN },
      cellType: presentCellTypeBrief(bank.cellType),
      ratedAh: bank.cellType.ratedAh * parallel,
      events: bank.events
        .map(({ id, happenedOn, kind, note }) => ({ id, happenedOn, kind, note: hidePersonal(note) }))
        .sort((a, b) => (a.happenedOn < b.happenedOn ? -1 : 1)),
    },
    fields: withoutPersonal(fieldsOf(check)),
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
    conversation: presentHistory(trail, 'moderator').map((message) => ({
      ...message,
      text: hidePersonal(message.text),
    })),
    working: presentView(working, bank.cellTypeId, null),
    workingFittedAt: working?.fittedAt.toISOString() ?? null,
    expected: expectedBands(working, check, history),
    claim,
    correction: check.correction,
    isRealFailure: check.isRealFailure,
    mergedIntoId: check.mergedIntoId,
    secondOpinion: {
      isNeeded: influence !== null,
      largest: influence,
      proposal:
        proposal && proposal.version === check.version
          ? {
              reason: proposal.reason,
              at: proposal.proposedAt.toISOString(),
              isMine: proposal.moderatorId === actor.userId,
            }
          : null,
    },
    undo: undoable && { decisionId: undoable.id, until: undoable.takesEffectAt.toISOString() },
  };
}

/** Moderators judge the figures: what the free text gives away of its writer is left out. */
function withoutPersonal(fields: CheckFields): CheckFields {
  const { reading, note } = fields;
  return {
    ...fields,
    note: hidePersonal(note),
    reading: {
      ...reading,
      instrument: hidePersonal(reading.instrument),
      endedByCell: reading.endedByCell && hidePersonal(reading.endedByCell),
    },
  };
}

const placeOf = (rule: string) => ruleOrder.indexOf(rule);
const worstFirst = (a: Finding, b: Finding) => b.severity - a.severity || placeOf(a.rule) - placeOf(b.rule);
