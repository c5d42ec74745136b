import { demoSeed, generateDemo } from '@/data/demo/generateDemo';
import { plannedBanks } from '@/data/demo/people';

import { demoAccounts } from '../accounts/demoAccounts';
import { hashPassword } from '../accounts/passwords';
import { Bank, BankEvent, CellType, Check, Finding, QuotedClaim, TrailEntry, User } from '../db/models';
import type { Deps } from '../deps';
import { requestRefit } from '../fits/requestRefit';
import { publicStep } from '../pool/publicStep';
import { computeBank } from './demoChecks';
import { bankRow, cellTypeRows, checkRow, claimRows, eventRows, findingRows } from './demoRows';
import { chained, entriesOf } from './demoTrail';
import { demoUsers } from './demoUsers';
import { insertMany } from './insertMany';

/**
 * Fills a database without users with the demo scenario: accounts, catalogue, banks, checks with their figures, the
 * trail, the public pool in one step; and asks for the first fit. One transaction, so that a start that was cut off
 * is made good by the next. Answers whether it did.
 */
export async function seedDemo(deps: Deps): Promise<boolean> {
  if ((await User.count()) > 0) return false;
  const demo = generateDemo(demoSeed);
  const computed = demo.banks.map((bank) => ({ bank, checks: computeBank(bank) }));
  const passwordHash = await hashPassword(demoAccounts[0]!.password, deps.config.bcryptCost);
  const users = demoUsers(demo).map((user) => ({
    ...{ ...user, passwordHash, emailVerifiedAt: user.createdAt, updatedAt: user.createdAt },
  }));
  const checks = computed.flatMap(({ bank, checks: ofBank }) =>
    ofBank.map((check) => checkRow(bank.id, check)),
  );
  const findings = computed.flatMap(({ checks: ofBank }, place) =>
    ofBank.flatMap((check) => findingRows(check, place < plannedBanks.length)),
  );
  const trail = chained(computed.flatMap(({ bank, checks: ofBank }) => entriesOf(bank, ofBank)));
  await deps.db.transaction(async (transaction) => {
    await insertMany(User, users, transaction);
    await insertMany(CellType, cellTypeRows(), transaction);
    await insertMany(QuotedClaim, claimRows(demoSeed), transaction);
    await insertMany(Bank, demo.banks.map(bankRow), transaction);
    await insertMany(BankEvent, demo.banks.flatMap(eventRows), transaction);
    await insertMany(Check, checks, transaction);
    await insertMany(Finding, findings, transaction);
    await insertMany(TrailEntry, trail, transaction);
    await publicStep(deps, transaction);
    await requestRefit(deps, transaction);
  });
  return true;
}
