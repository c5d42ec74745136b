import type { Role } from '@/lib/contract/accounts';
import { hashPassword } from '@/server/accounts/passwords';
import { User } from '@/server/db/models';

import type { Browser } from './browser';
import type { TestServer } from './testServer';

export const goodPassword = 'tide table in the hall';

/** An account with a known password, confirmed unless told otherwise. */
export async function createAccount(
  { deps }: TestServer,
  email: string,
  { role = 'owner', isConfirmed = true }: { role?: Role; isConfirmed?: boolean } = {},
): Promise<User> {
  return User.create({
    email,
    role,
    passwordHash: await hashPassword(goodPassword, deps.config.bcryptCost),
    emailVerifiedAt: isConfirmed ? deps.clock() : null,
  });
}

export const signInAs = (browser: Browser, email: string, password = goodPassword) =>
  browser.post('/api/account/sign-in', { email, password });
