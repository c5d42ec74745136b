import type { Transaction } from 'sequelize';

import type { User } from '../db/models';
import type { Deps } from '../deps';
import { appendTrail } from '../trail/appendTrail';

type AccountAction =
  | 'registered'
  | 'registeredAgain'
  | 'verified'
  | 'passwordReset'
  | 'passwordChanged'
  | 'emailChanged'
  | 'signedOutEverywhere'
  | 'sessionReused'
  | 'secondFactorOn'
  | 'secondFactorOff'
  | 'recoveryCodesRenewed'
  | 'deleted';

/** What an account did to itself, or the server to protect it. The trail holds no addresses. */
export async function appendAccountTrail(
  { clock }: Deps,
  user: Pick<User, 'id' | 'role'>,
  action: AccountAction,
  transaction: Transaction,
  details: Record<string, unknown> = {},
): Promise<void> {
  await appendTrail(
    {
      actor: action === 'sessionReused' ? 'system' : { userId: user.id, role: user.role },
      at: clock(),
      subjectType: 'account',
      subjectId: user.id,
      action,
      details,
    },
    transaction,
  );
}
