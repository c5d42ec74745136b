import type { Bank } from '@/lib/contract/banks';
import type { Check, CheckFields, Computed } from '@/lib/contract/checks';
import type { LogResult } from '@/lib/contract/uploads';
import { computeCheck, type TestedBank } from '@/lib/measure';

/** A check with all that its figures were computed from, for showing how. */
export interface ComputedCase {
  bank: Bank;
  reading: CheckFields['reading'];
  conditions: CheckFields['conditions'];
  /** The check before; null for a first one. */
  previous: Check | null;
  computed: Computed;
}

/** The bank as the calculations know it. */
export function testedBank({ parallel, series, firstUseMonth, cellType }: Bank): TestedBank {
  return { parallel, series, firstUseMonth, ratedAhCell: cellType.ratedAh, nominalV: cellType.nominalV };
}

/** Calculations 2 and 3 of a check that is not stored yet, as the server will do them. */
export function computeCase(
  bank: Bank,
  { reading, conditions }: Pick<CheckFields, 'reading' | 'conditions'>,
  log: LogResult | null,
  previous: Check | null,
): ComputedCase {
  const before = previous && { testedOn: previous.reading.testedOn, efc: previous.computed.efc };
  const computed = computeCheck({ reading, conditions }, testedBank(bank), log, before);
  return { bank, reading, conditions, previous, computed };
}
