import type { Check, CheckFields } from '@/lib/contract/checks';

/** Whether a stored check holds the figures just sent: one that had arrived before under the same key holds those of then. */
export function isAsSent(
  { reading, conditions }: Pick<CheckFields, 'reading' | 'conditions'>,
  stored: Pick<Check, 'reading' | 'conditions'>,
): boolean {
  const isSame = (sent: object, kept: object) => {
    const values = new Map(Object.entries(kept));
    return Object.entries(sent).every(([field, value]) => values.get(field) === value);
  };
  return isSame(reading, stored.reading) && isSame(conditions, stored.conditions);
}
