import { admitChanges, byClass, type Change } from './admitChanges';
import { type ApprovedBank, type PublicBank } from './bankRows';
import { coarsen } from './coarsen';
import { type Protections, protections as inForce } from './protections';
import { refineLevels } from './refineLevels';

export interface ReleasePlan {
  banks: PublicBank[];
  changes: Change[];
  /** Changes that too few of their like share. */
  held: Change[];
  /** Banks that no class protects. */
  waiting: ApprovedBank[];
}

/**
 * What of the public pool the next release holds. A release shows rows with what identifies a bank, so each of them,
 * and each change since the release before, must be one of enough owners' of its class. What must wait stands in the
 * next release as it did in the last.
 */
export function planRelease(
  pool: readonly PublicBank[],
  last: readonly PublicBank[],
  protections: Protections = inForce,
): ReleasePlan {
  const levelOf = new Map(last.map(({ bank, level }) => [bank, level]));
  const known = pool.flatMap((bank) => {
    const level = levelOf.get(bank.bank);
    return level === undefined ? [] : [{ ...bank, level }];
  });
  const coming = coarsen(
    pool.filter(({ bank }) => !levelOf.has(bank)),
    protections,
  );
  const step = admitChanges([...known, ...coming.banks], last, { groupOf: byClass, protections });
  const isTouched = new Set(
    [...step.admitted, ...step.held].map(({ before, after }) => (after ?? before)!.bank),
  );
  const finest = new Map(coarsen(step.banks, protections).banks.map(({ bank, level }) => [bank, level]));
  const refined = refineLevels(
    step.banks,
    ({ bank }) => (isTouched.has(bank) ? null : (finest.get(bank) ?? null)),
    protections,
  );
  const finer = new Map(refined.map(({ after }) => [after!.bank, after!]));
  return {
    banks: step.banks.map((bank) => finer.get(bank.bank) ?? bank),
    changes: [...step.admitted, ...refined],
    held: step.held,
    waiting: coming.waiting,
  };
}
