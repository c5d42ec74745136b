import type { Role, SessionUser } from '@/lib/contract/accounts';

import type { Config } from '../config';
import { SecondFactor } from '../db/models';

/** Whether somebody may not do the work of their role until signing in asks for a code. */
export const isSecondFactorDue = ({ requiresSecondFactor }: Config, role: Role, hasFactor: boolean) =>
  requiresSecondFactor && role !== 'owner' && !hasFactor;

/** The confirmed second factor of an account; null where its password alone signs in. */
export async function findConfirmedFactor(userId: string): Promise<SecondFactor | null> {
  const factor = await SecondFactor.findByPk(userId);
  return factor?.confirmedAt ? factor : null;
}

export async function secondFactorState(
  config: Config,
  { id, role }: { id: string; role: Role },
): Promise<SessionUser['secondFactor']> {
  if (await findConfirmedFactor(id)) return 'on';
  return isSecondFactorDue(config, role, false) ? 'due' : 'off';
}
