import type { Count } from '@/lib/contract/counts';
import type { Contribution, ToldCount } from '@/lib/contract/standing';

import type { LoadedBank } from '../banks/queries';
import { PublicMember, Check } from '../db/models';
import type { Deps } from '../deps';
import { findCurrentFit } from '../fits/currentFit';
import { presentView } from '../fits/presentView';

const exactFrom = 20;
const halfway = 10;
const least = 5;

/** Small counts are told as between which numbers they lie, so that one check more gives nobody away. */
export function toldCount(count: Count): ToldCount {
  if (typeof count !== 'number') return count;
  if (count >= exactFrom) return { from: count, to: count };
  return count >= halfway ? { from: halfway, to: exactFrom - 1 } : { from: least, to: halfway - 1 };
}

/** What a bank's checks added to the pool; of others only what is public. */
export async function findContribution(
  deps: Deps,
  bank: LoadedBank,
  approved: number,
): Promise<Contribution> {
  const published = await PublicMember.count({
    include: [{ model: Check, as: 'check', where: { bankId: bank.id }, required: true }],
  });
  const { evidence } = presentView(await findCurrentFit(deps, 'public'), bank.cellTypeId, null);
  return {
    approved,
    published,
    cellType: evidence && { checks: toldCount(evidence.checks), banks: toldCount(evidence.banks) },
  };
}
