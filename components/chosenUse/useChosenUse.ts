import type { Use } from '@/lib/contract/cells';
import { chosenUseQuery, chosenUseSearch, type ReadUse, readChosenUse } from '@/lib/contract/chosenUse';

import { type AddressPart, useAddressed } from './useAddressed';

export interface ChosenUse {
  use: Use;
  /** What in the address was of no sense. */
  notes: readonly string[];
  /** Takes hold at once; the address follows. */
  setUse: (use: Use) => void;
  /** The choice as the end of an address, to carry it to another page. */
  search: string;
}

const part: AddressPart<ReadUse> = { read: readChosenUse, write: ({ use }) => chosenUseQuery(use) };

/** The use a page is at, which lives in its address, so that a link shows the same. */
export function useChosenUse(): ChosenUse {
  const [{ use, notes }, set] = useAddressed(part);
  return { use, notes, setUse: (next) => set({ use: next, notes: [] }), search: chosenUseSearch(use) };
}
