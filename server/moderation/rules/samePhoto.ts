import { formatCount } from '@/lib/units';

import type { Rule } from '../screenTypes';

/**
 * Bits of 64 in which the looks of two pictures differ: the same picture scaled or saved anew, and one much like it.
 * Displays of one kind look alike, so that only the first is more than a look. Common practice, no source.
 */
const samePicture = 2;
const muchAlike = 6;

/** A photo of the meter belongs to one test: the same picture elsewhere, or one that looks the same. */
export const samePhoto: Rule = ({ photo }) => {
  if (!photo) return null;
  const { same, nearestBits } = photo;
  const isSame = same > 0 || (nearestBits !== null && nearestBits <= samePicture);
  const isAlike = nearestBits !== null && nearestBits <= muchAlike;
  const severity = isSame ? 'doubtful' : isAlike ? 'look' : 'fits';
  const evidence = { otherChecks: same, ...(nearestBits === null ? {} : { nearestBits }) };
  const rule = 'samePhoto';
  if (severity === 'fits') {
    const text = 'This photo was not seen before.';
    return { rule, title: 'Photo is new', severity, ownerText: text, moderatorText: text, evidence };
  }
  const others = `${formatCount(same)} other ${same === 1 ? 'check' : 'checks'}`;
  return {
    rule,
    title: isSame ? 'Photo seen before' : 'Photo much like another',
    severity,
    ownerText: isSame
      ? 'The same photo already stands behind another check. One test is one check; was the wrong picture chosen?'
      : 'The photo looks much like that of another check. Is it of this test?',
    moderatorText:
      same > 0
        ? `The same picture stands behind ${others}.`
        : `The nearest other photo differs in ${formatCount(nearestBits ?? 0)} of 64 bits of how it looks.`,
    evidence,
  };
};
