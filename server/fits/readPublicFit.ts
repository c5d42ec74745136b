import type { PublicFit } from '@/lib/contract/fits';

import { Fit } from '../db/models';
import type { Deps } from '../deps';
import { findCurrentFit } from './currentFit';
import { presentPublicFit } from './presentPublicFit';
import { findCellTypeNames, findPastFits } from './queries';

/** The public fit in force with what it is checked by, and those before it. */
export async function readPublicFit(deps: Deps): Promise<PublicFit> {
  const [inForce, past, names] = await Promise.all([
    findCurrentFit(deps, 'public'),
    findPastFits(),
    findCellTypeNames(),
  ]);
  const stored = inForce && (await Fit.findByPk(inForce.id, { attributes: { exclude: ['curves'] } }));
  return presentPublicFit(inForce, stored, past, names);
}
