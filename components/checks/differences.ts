import type { CheckFields } from '@/lib/contract/checks';

import { conditionItems, endItems, meterItems, testItems } from './enteredItems';

type Entered = Pick<CheckFields, 'reading' | 'conditions' | 'sources' | 'note'>;

/** One thing that two versions of a check say differently; undefined where one leaves it out. */
export interface Difference {
  label: string;
  stored: string | undefined;
  typed: string | undefined;
}

/** What two versions of a check say differently, in the words and digits in which figures are looked over. */
export function differencesBetween(stored: Entered, typed: Entered): Difference[] {
  const [before, after] = [saidBy(stored), saidBy(typed)];
  const labels = [...new Set([...before.keys(), ...after.keys()])];
  return labels
    .map((label) => ({ label, stored: before.get(label), typed: after.get(label) }))
    .filter((one) => one.stored !== one.typed);
}

function saidBy(entered: Entered): Map<string, string> {
  const parts = { 'The test': testItems, Meter: meterItems, Ends: endItems, 'How it lived': conditionItems };
  const said = Object.entries(parts).flatMap(([part, itemsOf]) =>
    itemsOf(entered).map(({ label, value, source }) => {
      const words: [string, string] = [`${part}: ${label}`, source ? `${value}, ${source}` : value];
      return words;
    }),
  );
  return new Map(entered.note === '' ? said : [...said, ['Note', entered.note]]);
}
