import { minimumOwners } from '@/lib/contract/limits';

/**
 * What keeps a bank or its owner from being found in anything public. The product knows one set of values only, these;
 * tests and the attack hand others to the functions here, to show that an attack finds what each of them keeps.
 */
export interface Protections {
  /** Owners behind every published number, row class and change. */
  minimumOwners: number;
  /** Largest share of a group's checks that may be one owner's. */
  maxOwnerShare: number;
  /** Identifying fields are generalised until enough owners share them. */
  isCoarsened: boolean;
  /** Changes of fewer owners wait, between one fit and the next and between releases. */
  isHeldBack: boolean;
  /** Parts that would give away a whole's hidden rest are held back with it. */
  isComplementKept: boolean;
  /** Values are rounded as the field policy says. */
  isRounded: boolean;
  /** Counts below twenty are told as ranges. */
  hasCountRanges: boolean;
  /** Banks get a name of their own in each release, and none is the moderators'. */
  hasFreshPseudonyms: boolean;
  /** Rows stand in an order made from what they say, not from whose they are. */
  isShuffled: boolean;
}

export const protections: Protections = {
  minimumOwners,
  maxOwnerShare: 0.5,
  isCoarsened: true,
  isHeldBack: true,
  isComplementKept: true,
  isRounded: true,
  hasCountRanges: true,
  hasFreshPseudonyms: true,
  isShuffled: true,
};

interface Owned {
  owner: string;
  /** How much of the group it is: its checks. */
  weight: number;
}

/** Whether a group may be told of: enough owners, none of them most of it. */
export function isEnough(
  group: readonly Owned[],
  { minimumOwners: least, maxOwnerShare }: Protections,
): boolean {
  const weights = new Map<string, number>();
  let total = 0;
  for (const { owner, weight } of group) {
    weights.set(owner, (weights.get(owner) ?? 0) + weight);
    total += weight;
  }
  if (weights.size < least) return false;
  return Math.max(0, ...weights.values()) <= maxOwnerShare * total;
}
