import { formatCount } from '@/lib/units';

import type { Rule } from '../screenTypes';

/** Checks from one account in an hour: an evening of catching up, and more than are typed by hand. Common practice, no source. */
const look = 12;
const doubtful = 40;

/** Many submissions at once from one account. */
export const burst: Rule = ({ account }) => {
  if (!account) return null;
  const count = account.submittedInHour;
  const isFine = count <= look;
  const text = `${formatCount(count)} ${count === 1 ? 'check' : 'checks'} from this account within the hour.`;
  return {
    rule: 'burst',
    title: isFine ? 'Pace of submissions' : 'Many checks at once',
    severity: isFine ? 'fits' : count <= doubtful ? 'look' : 'doubtful',
    ownerText: isFine ? text : `${text} That is welcome when they are old readings; say so in the note.`,
    moderatorText: isFine ? text : `${text} Old readings entered together, or made-up ones: compare them.`,
    evidence: { submittedInHour: count },
  };
};
