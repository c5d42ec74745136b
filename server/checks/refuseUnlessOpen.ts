import type { Check } from '../db/models';
import { AppError } from '../errors';

/** @throws AppError alreadyDecided after a decision, conflict for a withdrawn check */
export function refuseUnlessOpen({ state }: Check): void {
  if (state === 'submitted' || state === 'sentBack') return;
  if (state === 'withdrawn')
    throw new AppError('conflict', 'This check was withdrawn. Submit it as a new one.');
  throw new AppError('alreadyDecided', 'A moderator has decided on this check. Reload to see how.');
}
