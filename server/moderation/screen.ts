import type { Severity } from '@/lib/contract/checks';

import { severityOrder } from '../db/models/checks';
import { rules } from './rules';
import type { ScreenContext, ScreenFinding } from './screenTypes';

/** Runs every rule over a submission; the worst finding first. Pure. */
export function screen(context: ScreenContext): ScreenFinding[] {
  const findings = rules.map((rule) => rule(context)).filter((finding) => finding !== null);
  return findings.sort((a, b) => severityOrder.indexOf(b.severity) - severityOrder.indexOf(a.severity));
}

/** The severity a submission is queued under. */
export function worstSeverity(findings: readonly Pick<ScreenFinding, 'severity'>[]): Severity {
  return findings.reduce<Severity>(
    (worst, { severity }) =>
      severityOrder.indexOf(severity) > severityOrder.indexOf(worst) ? severity : worst,
    'fits',
  );
}
