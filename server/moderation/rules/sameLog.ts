import { formatCount } from '@/lib/units';

import type { Rule } from '../screenTypes';

/** One test is one check: a log that was used before. */
export const sameLog: Rule = ({ log, sameLogCheckIds }) => {
  if (!log) return null;
  const count = sameLogCheckIds.length;
  if (count === 0) {
    const text = 'This log was not seen before.';
    return {
      rule: 'sameLog',
      title: 'Log is new',
      severity: 'fits',
      ownerText: text,
      moderatorText: text,
      evidence: { otherChecks: 0 },
    };
  }
  return {
    rule: 'sameLog',
    title: 'Log seen before',
    severity: 'doubtful',
    ownerText:
      'The same log already stands behind another check. One test is one check; was the wrong file chosen?',
    moderatorText: `The same log, byte for byte, stands behind ${formatCount(count)} other ${count === 1 ? 'check' : 'checks'}.`,
    evidence: { otherChecks: count },
  };
};
