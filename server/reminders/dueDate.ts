import { addMonths } from '@/lib/units';

/** Checks are asked for about once a year. */
const monthsBetweenChecks = 12;

interface BankInTime {
  /** Day of the bank's last check that stands; null before the first. */
  lastTestedOn: string | null;
  /** Sold or retired. */
  isEnded: boolean;
  chosen: { dueOn: string | null; setAfter: string | null } | null;
}

/** The day the owner chose, until a check has been made since. */
export function ownDueOn({ chosen, lastTestedOn }: Pick<BankInTime, 'chosen' | 'lastTestedOn'>) {
  return chosen !== null && chosen.setAfter === lastTestedOn ? chosen.dueOn : null;
}

/** The day a bank's next check is due: the owner's own, else a year after the last. Null where nothing says when. */
export function dueOn(bank: BankInTime): string | null {
  if (bank.isEnded) return null;
  const own = ownDueOn(bank);
  if (own !== null) return own;
  return bank.lastTestedOn === null ? null : addMonths(bank.lastTestedOn, monthsBetweenChecks);
}
