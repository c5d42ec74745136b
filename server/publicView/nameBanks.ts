import { randomInt } from 'node:crypto';

import type { OrderedBank } from './canonicalOrder';
import type { Protections } from './protections';
import type { ReleaseRow } from './releaseFields';

/** As moderators' pseudonyms: no vowels, nothing that looks alike. */
const alphabet = 'CDFGHJKMNPQRTVWXY34679';
const length = 5;

export interface NamedBank extends OrderedBank {
  name: string;
}

/**
 * Gives each bank of a release a name of random characters that no bank has had before, in ascending order: a fit goes
 * by the order of names, and the order of the rows already tells only what the rows say.
 * @param taken names that banks have elsewhere, by bank
 */
export function nameBanks(
  banks: readonly OrderedBank[],
  taken: ReadonlyMap<string, string>,
  { hasFreshPseudonyms }: Protections,
): NamedBank[] {
  if (!hasFreshPseudonyms) return banks.map((bank) => ({ ...bank, name: taken.get(bank.bank) ?? bank.bank }));
  const used = new Set(taken.values());
  const names = new Set<string>();
  while (names.size < banks.length) {
    const name = Array.from({ length }, () => alphabet[randomInt(alphabet.length)]).join('');
    if (!used.has(name)) names.add(name);
  }
  const sorted = [...names].sort();
  return banks.map((bank, i) => ({ ...bank, name: sorted[i]! }));
}

/** The rows of a release, bank by bank. */
export function* releaseRows(banks: readonly NamedBank[]): Generator<ReleaseRow> {
  for (const { name, identity, checks } of banks)
    for (const { row } of checks) yield { bank: name, identity, row };
}
