import type { Health } from '@/lib/contract/steward';
import {
  formatCount,
  formatDuration,
  formatInstant,
  formatNumber,
  formatPercent,
  formatQuantity,
} from '@/lib/units';

const hoursPerDay = 24;

/** A span in the unit that reads best: minutes, hours or days. */
export function spanWords(hours: number): { value: string; unit: string } {
  if (hours < 1) return { value: formatNumber(hours * 60, { decimals: 0 }), unit: 'min' };
  if (hours < 2 * hoursPerDay) return { value: formatNumber(hours, { decimals: 1 }), unit: 'h' };
  return { value: formatNumber(hours / hoursPerDay, { decimals: 1 }), unit: 'days' };
}

const giga = 1e9;
const mega = 1e6;

export function bytesWords(bytes: number): string {
  return bytes >= giga
    ? formatQuantity(bytes / giga, 'GB', { decimals: 1 })
    : formatQuantity(bytes / mega, 'MB', { decimals: 1 });
}

export function shareWords({ decided, approvedFraction }: Health['queue']['shares'][number]): string {
  if (approvedFraction === null) return 'none decided';
  return `${formatPercent(approvedFraction)} of ${formatCount(decided)} decided`;
}

/** One run of the fit in a line. */
export function runWords(run: Health['fits']['last'][number]): string {
  const when = `${formatInstant(run.fittedAt)}, took ${formatDuration(run.durationMs / 1000)}`;
  const outcome = run.isGood ? '' : `, failed: ${run.reason ?? 'no reason given'}`;
  return `${when}${outcome}${run.isOfThisCode ? '' : ', made by other code'}`;
}

const jobWords: Record<string, string> = {
  sendMail: 'Sending mail',
  settleDecision: 'What follows a decision',
  dailyTick: 'Daily round',
  sendDueReminders: 'Reminders',
  integrateLog: 'Reading a log',
  refit: 'Refit',
  verifyTrail: 'Checking the trail',
};

export const jobWord = (kind: string) => jobWords[kind] ?? kind;

/** What the last walk along the trail found. */
export function trailWords({ lastCheck, isChecking }: Health['trail']): string {
  if (isChecking) return 'Being checked now.';
  if (!lastCheck) return 'Not checked yet.';
  const { at, entries, problems } = lastCheck;
  const when = `Checked on ${formatInstant(at)}`;
  if (problems.length === 0) return `${when}: whole, ${formatCount(entries)} entries.`;
  return `${when}: ${formatCount(problems.length)} of ${formatCount(entries)} entries are not as they were written.`;
}
