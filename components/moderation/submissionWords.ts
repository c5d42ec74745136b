import type { Submission } from '@/lib/contract/moderation';
import { formatDate } from '@/lib/units';

export const layoutWords = ({ parallel, series }: { parallel: number; series: number }): string =>
  `${parallel}p${series}s`;

/** "Bank K7QF2 · check 4 of 4 · 2 Nov 2026" */
export function submissionLine({ bank, history, checkId, fields }: Submission): string {
  const place = history.findIndex((entry) => entry.checkId === checkId) + 1;
  return `Bank ${bank.pseudonym} · check ${place} of ${history.length} · ${formatDate(fields.reading.testedOn)}`;
}

/** The figure that screening thinks was meant, when a finding proposes one, Ah of the bank. */
export function proposedCapacityAh({ findings }: Submission): number | undefined {
  for (const { severity, evidence } of findings) {
    if (severity === 'repairable' && typeof evidence.repairedAh === 'number') return evidence.repairedAh;
  }
  return undefined;
}
