import { Session, User } from '../db/models';
import type { Deps } from '../deps';
import type { Actor } from '../policies';
import { appendAccountTrail } from './accountTrail';
import { hashToken } from './secretTokens';
import { endSessionsOf } from './sessions';

/**
 * Ends this sign-in, or every one of the account. Known by the access token or, when that has run out, by the refresh
 * token; whoever has neither is signed out already.
 */
export async function signOut(
  deps: Deps,
  actor: Actor,
  { everywhere, refreshToken }: { everywhere: boolean; refreshToken: string | undefined },
): Promise<void> {
  await deps.db.transaction(async (transaction) => {
    const session =
      refreshToken === undefined
        ? null
        : await Session.findOne({ where: { tokenHash: hashToken(refreshToken) }, transaction });
    const family = session ?? (actor.role === 'visitor' ? null : actor);
    if (!family) return;
    const { userId, familyId } = family;
    await endSessionsOf(deps, everywhere ? { userId } : { familyId }, transaction);
    const user = await User.findByPk(userId, { transaction });
    if (everywhere && user) await appendAccountTrail(deps, user, 'signedOutEverywhere', transaction);
  });
}
