import { formatQuantity } from '@/lib/units';

import type { Rule } from '../screenTypes';

/** Where the correction to 0.2 It holds: calculation 2 of the product description. */
const validIt = { min: 0.05, max: 0.5 };

/** Outside its range the rate is not corrected for. */
export const testRate: Rule = ({ computed }) => {
  const rate = formatQuantity(computed.meanIt, 'It', { significant: 2 });
  const isFine = computed.meanIt >= validIt.min && computed.meanIt <= validIt.max;
  const range = `${validIt.min} to ${formatQuantity(validIt.max, 'It')}`;
  return {
    rule: 'testRate',
    title: isFine ? 'Test rate' : `Tested at ${rate}`,
    severity: isFine ? 'fits' : 'look',
    ownerText: isFine
      ? `Tested at ${rate}.`
      : `Tested at ${rate}. The correction to 0.2 It holds from ${range}, so this capacity stays as measured. Check the mean current too.`,
    moderatorText: isFine
      ? `${rate}; corrected to 0.2 It.`
      : `${rate}, outside ${range}: not corrected to 0.2 It.`,
    evidence: { meanIt: computed.meanIt },
  };
};
