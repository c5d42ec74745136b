import type { Correctable, Correction } from '@/lib/contract/checks';
import { formatDate, formatDuration, formatQuantity } from '@/lib/units';

import type { Decision } from '../db/models';

interface Subject {
  cellTypeName: string;
  testedOn: string;
  isPooled: boolean;
  /** Address of the bank's page. */
  link: string;
}

interface Notice {
  subject: string;
  text: string;
}

const greeting = 'Good day,';
const ending = 'Ebbline, the exchange of measured battery fade';

/** What the owner is told of a decision. */
export function noticeOf(
  { action, words }: Pick<Decision, 'action' | 'words'>,
  correction: Correction | null,
  subject: Subject,
): Notice {
  switch (action) {
    case 'approve':
      return approvedNotice(subject);
    case 'correct':
      return correctedNotice(subject, words, correction);
    case 'realFailure':
      return realFailureNotice(subject);
    case 'sendBack':
      return sentBackNotice(subject, words);
    case 'turnAway':
      return turnedAwayNotice(subject, words);
    case 'recall':
      return recalledNotice(subject, words);
    case 'merge':
      return mergedNotice(subject);
  }
}

/** A moderator asks something before the check can join the pool. */
function sentBackNotice({ cellTypeName, testedOn, link }: Subject, question: string): Notice {
  return write('A question about your capacity check', [
    `a moderator has a question about the check of ${formatDate(testedOn)} on your ${cellTypeName} bank:`,
    question,
    `You can answer, or correct the figures, here: ${link}`,
    'What you typed is kept. The check waits for your answer.',
  ]);
}

function approvedNotice({ cellTypeName, testedOn, isPooled, link }: Subject): Notice {
  return write('Your capacity check was approved', [
    `the check of ${formatDate(testedOn)} on your ${cellTypeName} bank was approved. Thank you for measuring.`,
    isPooled
      ? 'It counts in the working fit now. It goes public, without a name, together with the checks of at least four other owners, so that nobody can tell yours from theirs.'
      : 'The bank was not bought new, so the check counts for its own curve and for comparisons, and stays out of the pooled lives.',
    `Your bank's curve: ${link}`,
    'The next check is due in about a year.',
  ]);
}

function turnedAwayNotice({ cellTypeName, testedOn, link }: Subject, reason: string): Notice {
  return write('Your capacity check was not taken into the pool', [
    `the check of ${formatDate(testedOn)} on your ${cellTypeName} bank was turned away, for this reason:`,
    reason,
    `It stays in your bank's history: ${link}`,
    'A new test is welcome at any time.',
  ]);
}

const figureWords: Record<keyof Correctable, [label: string, write: (value: number) => string]> = {
  capacityAh: ['charge', (value) => formatQuantity(value, 'Ah', { decimals: 1 })],
  energyWh: ['energy', (value) => formatQuantity(value / 1000, 'kWh', { decimals: 2 })],
  meanCurrentA: ['mean current', (value) => formatQuantity(value, 'A', { decimals: 1 })],
  durationS: ['duration', formatDuration],
  temperatureStartC: ['temperature at the start', (value) => formatQuantity(value, '°C', { decimals: 1 })],
  temperatureEndC: ['temperature at the end', (value) => formatQuantity(value, '°C', { decimals: 1 })],
};

function correctedNotice(
  { cellTypeName, testedOn, link }: Subject,
  reason: string,
  correction: Correction | null,
): Notice {
  const keys = Object.keys(correction?.after ?? {}) as (keyof Correctable)[];
  const lines = keys.map((key) => {
    const [label, figure] = figureWords[key];
    return `${label}: ${figure(correction!.before[key]!)} as you gave it, ${figure(correction!.after[key]!)} as corrected`;
  });
  return write('Your capacity check was approved with a correction', [
    `a moderator approved the check of ${formatDate(testedOn)} on your ${cellTypeName} bank with a correction:`,
    lines.join('\n'),
    reason,
    `Your own figures are kept beside it. If the correction is wrong, object to it here, and the check goes back to the moderators as you gave it: ${link}`,
  ]);
}

function realFailureNotice({ cellTypeName, testedOn, link }: Subject): Notice {
  return write('Your capacity check was kept as a real failure', [
    `the check of ${formatDate(testedOn)} on your ${cellTypeName} bank was approved and marked as a real failure. It counts, and no screening takes it out. Failures are told of too rarely: thank you.`,
    'A swollen, leaking or warm cell stays out of use. Do not press it flat and do not charge it.',
    `Your bank's page: ${link}`,
  ]);
}

function recalledNotice({ cellTypeName, testedOn, link }: Subject, reason: string): Notice {
  return write('Your capacity check was taken out of the pool', [
    `the check of ${formatDate(testedOn)} on your ${cellTypeName} bank had been approved and was recalled, for this reason:`,
    reason,
    `It stays in your bank's history: ${link}`,
  ]);
}

function mergedNotice({ cellTypeName, testedOn, link }: Subject): Notice {
  return write('Two of your capacity checks are one', [
    `the check of ${formatDate(testedOn)} on your ${cellTypeName} bank is of the same test as another one of this bank, so the two were made one. The other one stays.`,
    `Your bank's page: ${link}`,
  ]);
}

const write = (subject: string, paragraphs: string[]): Notice => ({
  subject,
  text: [greeting, ...paragraphs, ending].join('\n\n'),
});
