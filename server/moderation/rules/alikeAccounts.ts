import { formatCount } from '@/lib/units';

import type { Rule } from '../screenTypes';

/** Cell type, layout, limits and meter all the same within days. It happens between neighbours, so it is a look only. */
export const alikeAccounts: Rule = ({ account }) => {
  if (!account) return null;
  const count = account.alikeAccounts;
  const isFine = count === 0;
  return {
    rule: 'alikeAccounts',
    title: isFine ? 'No account like it' : 'Accounts that look alike',
    severity: isFine ? 'fits' : 'look',
    ownerText: isFine
      ? 'No other account submitted such a bank these days.'
      : 'Another account submitted a bank of the same make-up these days. If both are yours, keep to one: an owner counts once.',
    moderatorText: isFine
      ? 'No other account submitted a bank of this make-up within three days.'
      : `${formatCount(count)} other ${count === 1 ? 'account' : 'accounts'} submitted the same cell type, layout, limits and meter within three days. Neighbours, or one owner counted twice.`,
    evidence: { alikeAccounts: count },
  };
};
