import { admitChanges, byCellType } from '../publicView/admitChanges';
import { type ApprovedBank, asOwned, classOf, groupBy, type PublicBank } from '../publicView/bankRows';
import { coarsestLevel, namedLevel } from '../publicView/identity';
import { isEnough, type Protections, protections as inForce } from '../publicView/protections';
import { refineLevels } from '../publicView/refineLevels';
import type { ApprovedMember, PublicPoolMember } from './poolRow';

export interface StepPlan {
  /** Members to write: new ones, and ones whose row, class or level has changed since. */
  put: PublicPoolMember[];
  /** Ids of the checks to take out. */
  remove: string[];
  /** How many owners the step concerns. */
  owners: number;
}

/**
 * What of the difference between the approved checks and the public pool may go public now. The pool shows curves and
 * dots by cell type: changes of each cell type go when they concern five owners, those that add and those that take
 * away by themselves. Cell types of too few owners are counted, and shown, as one.
 */
export function planStep(
  approved: readonly ApprovedMember[],
  members: readonly PublicPoolMember[],
  protections: Protections = inForce,
): StepPlan | null {
  const published = publicBanks(members);
  const banks = levelled(approvedBanks(approved), published, protections);
  const step = admitChanges(banks, published, { groupOf: byCellType, protections });
  const isTouched = new Set(step.admitted.map(({ before, after }) => (after ?? before)!.bank));
  const refined = refineLevels(
    step.banks,
    ({ bank }) => (isTouched.has(bank) ? null : namedLevel),
    protections,
  );
  const admitted = [...step.admitted, ...refined];
  if (admitted.length === 0) return null;
  const put = admitted.flatMap(({ after }) => (after ? membersOf(after) : []));
  const stays = new Set(put.map(({ checkId }) => checkId));
  const before = admitted.flatMap(({ before: bank }) => bank?.checks ?? []);
  return {
    put,
    remove: before.map(({ checkId }) => checkId).filter((checkId) => !stays.has(checkId)),
    owners: new Set(admitted.map(({ before: was, after }) => (after ?? was)!.owner)).size,
  };
}

/** A bank keeps its level while it stays; one that comes is named where its cell type is, or can be. */
function levelled(
  banks: readonly ApprovedBank[],
  published: readonly PublicBank[],
  protections: Protections,
): PublicBank[] {
  const levelOf = new Map(published.map(({ bank, level }) => [bank, level]));
  const named = new Set(published.filter(({ level }) => level <= namedLevel).map(namedClass));
  const coming = banks.filter(({ bank }) => !levelOf.has(bank));
  for (const [key, group] of groupBy(coming, namedClass))
    if (isEnough(group.map(asOwned), protections) || !protections.isCoarsened) named.add(key);
  return banks.map((bank) => ({
    ...bank,
    level: levelOf.get(bank.bank) ?? (named.has(namedClass(bank)) ? namedLevel : coarsestLevel),
  }));
}

const namedClass = ({ identity }: ApprovedBank): string => classOf({ identity, level: namedLevel });

/** The public pool's members as banks. */
export function publicBanks(members: readonly PublicPoolMember[]): PublicBank[] {
  return [...groupBy(members, ({ row }) => row.bank).values()].map((own) => {
    const { row, identity, level } = own[0]!;
    return {
      ...{ bank: row.bank, owner: row.owner, identity, level },
      checks: own.map(({ checkId, row: one }) => ({ checkId, row: one })),
    };
  });
}

/** Checks of unclear clamping are in no fit and in nothing public. */
function approvedBanks(approved: readonly ApprovedMember[]): ApprovedBank[] {
  const clear = approved.filter(({ row }) => !row.isClampingUnclear);
  return [...groupBy(clear, ({ row }) => row.bank).values()].map((own) => ({
    ...{ bank: own[0]!.row.bank, owner: own[0]!.row.owner, identity: own[0]!.identity },
    checks: own.map(({ checkId, row }) => ({ checkId, row })),
  }));
}

const membersOf = ({ identity, level, checks }: PublicBank): PublicPoolMember[] =>
  checks.map(({ checkId, row }) => ({ checkId, row, identity, level }));
