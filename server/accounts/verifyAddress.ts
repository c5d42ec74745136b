import type { Deps } from '../deps';
import { appendAccountTrail } from './accountTrail';
import { redeemToken } from './oneTimeTokens';

/** Confirms the address a token was mailed to. Errors: `gone`. */
export async function verifyAddress(deps: Deps, token: string): Promise<void> {
  await deps.db.transaction(async (transaction) => {
    const user = await redeemToken(deps, token, 'verify', transaction);
    await user.update({ emailVerifiedAt: deps.clock() }, { transaction });
    await appendAccountTrail(deps, user, 'verified', transaction);
  });
}
