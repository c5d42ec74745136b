import { type ApprovedBank, asOwned, groupBy, type PublicBank } from './bankRows';
import { coarsestLevel, generalise, identityKey } from './identity';
import { isEnough, type Protections } from './protections';

interface Coarsened {
  banks: PublicBank[];
  /** Banks that not even the coarsest class protects: they wait for more of their like. */
  waiting: ApprovedBank[];
}

/**
 * Finds the finest level for each bank at which enough owners share its identifying fields, from the coarsest class
 * downwards. Within a cell type, what would be left over alone takes the smallest class beside it along; across cell
 * types it does not, since that would cost a well-known cell type its name.
 */
export function coarsen(banks: readonly ApprovedBank[], protections: Protections): Coarsened {
  const result: Coarsened = { banks: [], waiting: [] };
  if (!protections.isCoarsened) {
    result.banks = banks.map((bank) => ({ ...bank, level: 0 }));
    return result;
  }
  const isSafe = (group: readonly ApprovedBank[]) => isEnough(group.map(asOwned), protections);
  for (const group of at(banks, coarsestLevel)) {
    if (isSafe(group)) refine(group, coarsestLevel);
    else result.waiting.push(...group);
  }
  return result;

  function refine(group: ApprovedBank[], level: number): void {
    if (level === 0) {
      place(group, level);
      return;
    }
    const parts = at(group, level - 1);
    const safe = parts.filter(isSafe).sort((a, b) => a.length - b.length);
    const rest = parts.filter((part) => !isSafe(part)).flat();
    if (level === coarsestLevel) {
      if (isSafe(rest)) place(rest, level);
      else result.waiting.push(...rest);
    } else {
      while (rest.length > 0 && safe.length > 0 && !isSafe(rest)) rest.push(...safe.shift()!);
      place(rest, level);
    }
    for (const part of safe) refine(part, level - 1);
  }

  function place(group: readonly ApprovedBank[], level: number): void {
    result.banks.push(...group.map((bank) => ({ ...bank, level })));
  }
}

const at = (banks: readonly ApprovedBank[], level: number): ApprovedBank[][] => [
  ...groupBy(banks, ({ identity }) => identityKey(generalise(identity, level))).values(),
];
