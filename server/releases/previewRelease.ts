import type { ReleasePreview } from '@/lib/contract/releases';

import { Fit, Job } from '../db/models';
import type { Deps } from '../deps';
import { findCurrentFit } from '../fits/currentFit';
import { readParameters } from '../fits/storedFit';
import { publicBanks } from '../pool/planStep';
import { publicMembers } from '../pool/publicMembers';
import type { Change, ChangeKind } from '../publicView/admitChanges';
import { byClass } from '../publicView/admitChanges';
import { groupBy } from '../publicView/bankRows';
import { levelNames } from '../publicView/identity';
import { planRelease, type ReleasePlan } from '../publicView/planRelease';
import { tellEvidence } from '../publicView/tellCounts';
import { countChanges } from './makeRelease';
import { findLastRelease, findReleasedBanks } from './queries';

/** What the next release would hold: what is new, what waits and why, and how published figures move. */
export async function previewRelease(deps: Deps): Promise<ReleasePreview> {
  const last = await findLastRelease();
  const released = last ? await findReleasedBanks(last.number) : [];
  const plan = planRelease(publicBanks(await publicMembers()), released);
  const fit = await findCurrentFit(deps, 'public');
  const stored = fit && (await Fit.findByPk(fit.id, { attributes: ['parameters', 'diagnostics'] }));
  const average = stored && readParameters(stored)?.average.years;
  const after = new Map<string | null, NonNullable<ReleasePreview['moves'][number]['after']>>(
    (fit?.output.figures ?? []).map(({ cellType, life }) => [cellType, life.years]),
  );
  if (average) after.set(null, average);
  const before = new Map((last?.figures ?? []).map(({ cellType, years }) => [cellType, years]));
  return {
    number: (last?.number ?? 0) + 1,
    isMaking: (await deps.jobs.countPending('makeRelease')) > 0,
    lastProblem: await lastProblem(),
    evidence: plan.banks.length > 0 ? tellEvidence(evidenceOf(plan)) : null,
    changes: countChanges(plan.changes),
    held: [...heldGroups(plan.held), ...waitingGroup(plan)],
    levels: levelNames.map((name, level) => ({
      name,
      banks: plan.banks.filter((bank) => bank.level === level).length,
    })),
    fittedAt: fit?.fittedAt.toISOString() ?? null,
    moves: [...new Set([...before.keys(), ...after.keys()])]
      .sort((a, b) => (a ?? '').localeCompare(b ?? ''))
      .map((cellType) => ({
        cellType,
        before: before.get(cellType) ?? null,
        after: after.get(cellType) ?? null,
      })),
  };
}

function evidenceOf({ banks }: ReleasePlan) {
  return {
    owners: new Set(banks.map(({ owner }) => owner)).size,
    banks: banks.length,
    checks: banks.reduce((sum, { checks }) => sum + checks.length, 0),
  };
}

const heldGroups = (held: readonly Change[]): ReleasePreview['held'] =>
  [...groupBy(held, byClass).values()]
    .map((group): { kind: ChangeKind; reason: 'tooFewAlike'; banks: number } => ({
      kind: group[0]!.kind,
      reason: 'tooFewAlike',
      banks: group.length,
    }))
    .sort((a, b) => b.banks - a.banks);

const waitingGroup = ({ waiting }: ReleasePlan): ReleasePreview['held'] =>
  waiting.length > 0 ? [{ kind: 'came', reason: 'classTooThin', banks: waiting.length }] : [];

async function lastProblem(): Promise<string | null> {
  const latest = await Job.findOne({ where: { kind: 'makeRelease' }, order: [['createdAt', 'DESC']] });
  return latest?.state === 'failed' ? 'The last try did not end well; nothing was published by it.' : null;
}
