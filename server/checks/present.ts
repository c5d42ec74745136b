import type { Check as CheckContract } from '@/lib/contract/checks';

import { severityOrder } from '../db/models';
import { presentHistory } from './presentHistory';
import { findTrailOf, type LoadedCheck } from './queries';

/** Checks for their owner: findings in the owner's words only. */
export async function presentChecks(checks: LoadedCheck[]): Promise<CheckContract[]> {
  const trail = await findTrailOf(checks.map(({ id }) => id));
  return checks.map((check) => ({
    id: check.id,
    bankId: check.bankId,
    state: check.state,
    version: check.version,
    submittedAt: check.submittedAt.toISOString(),
    reading: check.reading,
    conditions: check.conditions,
    uploadId: check.uploadId,
    photoId: check.photoId,
    sources: check.sources,
    note: check.note,
    computed: check.computed,
    findings: [...check.findings]
      .sort((one, other) => other.severity - one.severity || one.rule.localeCompare(other.rule))
      .map(({ rule, title, severity, ownerText }) => ({
        rule,
        title,
        severity: severityOrder[severity]!,
        text: ownerText,
      })),
    correction: check.correction,
    history: presentHistory(trail.get(check.id) ?? []),
  }));
}

export async function presentCheck(check: LoadedCheck): Promise<CheckContract> {
  const [presented] = await presentChecks([check]);
  return presented!;
}
