import type { FitDetail, FitRun } from '@/lib/contract/fits';

import type { Fit } from '../db/models';
import type { FitDiagnostics } from './storedFit';

/** A run as moderators see it. */
export function presentRun(run: Fit, currentIds: ReadonlySet<string>): FitRun {
  const { owners, banks, checks, createdAt, ...rest } = run.get();
  return {
    ...rest,
    isCurrent: currentIds.has(run.id),
    fittedAt: createdAt.toISOString(),
    evidence: { owners, banks, checks },
  };
}

interface Known {
  names: ReadonlyMap<string, { pseudonym: string; cellType: string }>;
  currentIds: ReadonlySet<string>;
}

/** A run with the checks its screen found and the banks that weigh most; banks by pseudonym, also within sentences. */
export function presentDetail(
  run: Fit,
  diagnostics: FitDiagnostics | null,
  { names, currentIds }: Known,
): FitDetail {
  const base = { run: presentRun(run, currentIds) };
  if (!diagnostics) return { ...base, findings: null };
  const of = (bankId: string) => {
    const known = names.get(bankId);
    return { bank: known?.pseudonym ?? 'gone', cellType: known?.cellType ?? 'gone' };
  };
  const { iterations, totalIterations, screenRounds } = diagnostics;
  return {
    ...base,
    findings: {
      ...{ iterations, totalIterations, screenRounds },
      screen: diagnostics.screen
        .map(({ bankId, ...found }) => ({ ...found, ...of(bankId) }))
        .sort((a, b) => Math.abs(b.t) - Math.abs(a.t)),
      excluded: diagnostics.excluded.map(({ bankId, ...found }) => ({ ...found, ...of(bankId) })),
      influence: diagnostics.influence.map(({ bankId, ...found }) => ({ ...found, bank: of(bankId).bank })),
      statements: diagnostics.statements.map((sentence) => withPseudonyms(sentence, names)),
    },
  };
}

function withPseudonyms(sentence: string, names: Known['names']): string {
  let told = sentence;
  for (const [id, { pseudonym }] of names) told = told.replaceAll(id, pseudonym);
  return told;
}
