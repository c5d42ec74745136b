import { formatCount } from '@/lib/units';

import type { Rule } from '../screenTypes';

/** Submissions from one account in an hour, a file of earlier checks being one: an evening of catching up, and more than are typed by hand. Common practice, no source. */
const look = 12;
const doubtful = 40;

/** Many submissions at once from one account. */
export const burst: Rule = ({ account }) => {
  if (!account) return null;
  const count = account.submittedInHour;
  const isFine = count <= look;
  const text = `${formatCount(count)} ${count === 1 ? 'submission' : 'submissions'} from this account within the hour.`;
  return {
    rule: 'burst',
    title: isFine ? 'Pace of submissions' : 'Many submissions at once',
    severity: isFine ? 'fits' : count <= doubtful ? 'look' : 'doubtful',
    ownerText: isFine
      ? text
      : `${text} That is welcome when they are old readings; say so in the note, or send them as one file.`,
    moderatorText: isFine ? text : `${text} Old readings typed one by one, or made-up ones: compare them.`,
    evidence: { submittedInHour: count },
  };
};
