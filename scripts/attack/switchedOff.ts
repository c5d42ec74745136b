import { type Protections, protections } from '@/server/publicView/protections';

/** Each protection switched off in turn. */
export const switchedOff: Record<string, Protections> = {
  'five owners behind each number': { ...protections, minimumOwners: 1 },
  'no owner more than half': { ...protections, maxOwnerShare: 1 },
  // Holding changes back by class would keep rare rows by itself.
  'identifying fields generalised': { ...protections, isCoarsened: false, isHeldBack: false },
  'changes of few held back': { ...protections, isHeldBack: false },
  'parts held back that give the rest away': { ...protections, isComplementKept: false },
  'values rounded': { ...protections, isRounded: false },
  'small counts as ranges': { ...protections, hasCountRanges: false },
  'names drawn anew': { ...protections, hasFreshPseudonyms: false },
  'rows in an order of their own': { ...protections, isShuffled: false },
};
