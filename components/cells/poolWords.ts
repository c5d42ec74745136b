import type { Absence, PoolSummary } from '@/lib/contract/cells';
import { formatCount, formatYears } from '@/lib/units';

/** "4,216 checks on 1,204 banks, screened and pooled. Readings reach 7.4 years." */
export function poolSentence({ evidence, reachYears }: PoolSummary): string {
  if (!evidence) return 'No checks are published yet.';
  const counts = `${formatCount(evidence.checks)} checks on ${formatCount(evidence.banks)} banks, screened and pooled.`;
  return reachYears === null ? counts : `${counts} Readings reach ${formatYears(reachYears)}.`;
}

const waitingSentences: Record<PoolSummary['waiting'], string | null> = {
  none: null,
  fewerThanFiveOwners:
    'Approved checks wait to be published. They join when at least 5 owners of a cell type wait, so that no figure gives one owner away.',
  due: 'Approved checks of at least 5 owners of a cell type are being added now.',
};

/** What waits outside the public pool, or null when nothing does. */
export const waitingSentence = ({ waiting }: PoolSummary): string | null => waitingSentences[waiting];

/** Why there is no figure, and what would help. */
export const absenceWords: Record<Absence, { short: string; long: string }> = {
  tooFewOwners: {
    short: 'too few owners yet',
    long: 'Fewer than 5 owners stand behind this, so no figure is shown. Checks of more owners would bring one.',
  },
  tooFewChecks: {
    short: 'too few checks yet',
    long: 'There are not enough checks at different ages to draw a curve. More yearly checks would bring one.',
  },
  notConverged: {
    short: 'no steady figure',
    long: 'The readings do not settle on one curve, so none is shown.',
  },
  noFit: { short: 'not fitted yet', long: 'The pool has not been fitted yet.' },
};
