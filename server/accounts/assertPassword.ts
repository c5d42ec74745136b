import { User } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { SignedInActor } from '../policies';
import { isPasswordOf } from './passwords';

/**
 * The actor's account, once they have shown that they know its password: what can't be taken back asks for it again.
 * @throws AppError invalid beside the field, notSignedIn when the account is gone
 */
export async function assertPassword(
  { config }: Deps,
  { userId }: SignedInActor,
  password: string,
): Promise<User> {
  const user = await User.findOne({ where: { id: userId, erasedAt: null } });
  if (!user) throw new AppError('notSignedIn');
  if (!(await isPasswordOf(user, password, config.bcryptCost)))
    throw new AppError('invalid', undefined, { currentPassword: 'This is not your present password.' });
  return user;
}
