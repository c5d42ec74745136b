import { type Bank as BankContract, bankFieldsSchema } from '@/lib/contract/banks';

import { presentCellTypeBrief } from '../cellTypes/present';
import { countChecks, type LoadedBank } from './queries';

/** Banks for their owner. The pseudonym is not among it: it is for moderators. */
export async function presentBanks(banks: LoadedBank[]): Promise<BankContract[]> {
  const counts = await countChecks(banks.map(({ id }) => id));
  return banks.map((bank) => ({
    ...bankFieldsSchema.parse(bank.get()),
    id: bank.id,
    version: bank.version,
    cellType: presentCellTypeBrief(bank.cellType),
    ratedAh: bank.cellType.ratedAh * bank.parallel,
    checkCount: counts.get(bank.id) ?? 0,
    events: bank.events.map(({ id, happenedOn, kind, note }) => ({ id, happenedOn, kind, note })),
  }));
}

export async function presentBank(bank: LoadedBank): Promise<BankContract> {
  const [presented] = await presentBanks([bank]);
  return presented!;
}
