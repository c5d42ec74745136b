import type { Submission } from '@/lib/contract/moderation';
import { formatDate } from '@/lib/units';

export const layoutWords = ({ parallel, series }: { parallel: number; series: number }): string =>
  `${parallel}p${series}s`;

/** "Bank K7QF2 · check 4 of 4 · 2 Nov 2026" */
export function submissionLine({ bank, history, checkId, fields }: Submission): string {
  const place = history.findIndex((entry) => entry.checkId === checkId) + 1;
  return `Bank ${bank.pseudonym} · check ${place} of ${history.length} · ${formatDate(fields.reading.testedOn)}`;
}

/** Where the charge comes from. */
export const originWord = ({ fields, isFromFile }: Submission): string =>
  fields.uploadId ? 'From the log' : isFromFile ? 'From a file' : 'Typed';

/** The finding that proposes a repaired charge, if one does. */
export const proposalFinding = ({ findings }: Submission) =>
  findings.find(
    ({ severity, evidence }) => severity === 'repairable' && typeof evidence.repairedAh === 'number',
  );

/** The figure that screening thinks was meant, when a finding proposes one, Ah of the bank. */
export function proposedCapacityAh(submission: Submission): number | undefined {
  // A decided check stands as it was decided.
  if (submission.state !== 'submitted' && submission.state !== 'sentBack') return undefined;
  const proposed = proposalFinding(submission)?.evidence.repairedAh;
  return typeof proposed === 'number' ? proposed : undefined;
}
