import { formatDate } from '@/lib/units';

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

/** A moderator asks something before the check can join the pool. */
export function sentBackNotice({ cellTypeName, testedOn, link }: Subject, question: string): Notice {
  return write('A question about your capacity check', [
    `a moderator has a question about the check of ${formatDate(testedOn)} on your ${cellTypeName} bank:`,
    question,
    `You can answer, or correct the figures, here: ${link}`,
    'What you typed is kept. The check waits for your answer.',
  ]);
}

export function approvedNotice({ cellTypeName, testedOn, isPooled, link }: Subject): Notice {
  return write('Your capacity check was approved', [
    `the check of ${formatDate(testedOn)} on your ${cellTypeName} bank was approved. Thank you for measuring.`,
    isPooled
      ? 'It counts in the working fit now. It goes public, without a name, together with the checks of at least four other owners, so that nobody can tell yours from theirs.'
      : 'The bank was not bought new, so the check counts for its own curve and for comparisons, and stays out of the pooled lives.',
    `Your bank's curve: ${link}`,
    'The next check is due in about a year.',
  ]);
}

export function turnedAwayNotice({ cellTypeName, testedOn, link }: Subject, reason: string): Notice {
  return write('Your capacity check was not taken into the pool', [
    `the check of ${formatDate(testedOn)} on your ${cellTypeName} bank was turned away, for this reason:`,
    reason,
    `It stays in your bank's history: ${link}`,
    'A new test is welcome at any time.',
  ]);
}

const write = (subject: string, paragraphs: string[]): Notice => ({
  subject,
  text: [greeting, ...paragraphs, ending].join('\n\n'),
});
