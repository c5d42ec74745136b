import { createHash } from 'node:crypto';

import jwt from 'jsonwebtoken';
import { z } from 'zod';

import { User } from '../db/models';
import type { Deps } from '../deps';

/** How long the code may follow the password. */
export const stepMinutes = 10;

const audience = 'sign-in code';
const claimsSchema = z.object({ sub: z.string(), pwd: z.string() });

/** Tells two passwords apart without telling anything of either. */
const markOf = ({ passwordHash }: User) =>
  createHash('sha256').update(passwordHash).digest('base64url').slice(0, 16);

const seconds = (instant: Date) => Math.floor(instant.getTime() / 1000);

/** Says that the password was right; good for entering a code and nothing else. */
export function signStepToken({ config, clock }: Deps, user: User): string {
  const iat = seconds(clock());
  const claims = { sub: user.id, pwd: markOf(user), aud: audience, iat, exp: iat + stepMinutes * 60 };
  return jwt.sign(claims, config.secret, { algorithm: 'HS256' });
}

/** The account whose password was entered; null when that is too long ago or the password is another since. */
export async function readStepToken(
  { config, clock }: Deps,
  token: string | undefined,
): Promise<User | null> {
  if (token === undefined) return null;
  try {
    const claims = jwt.verify(token, config.secret, {
      algorithms: ['HS256'],
      audience,
      clockTimestamp: seconds(clock()),
    });
    const { sub, pwd } = claimsSchema.parse(claims);
    const user = await User.findOne({ where: { id: sub, erasedAt: null } });
    return user && markOf(user) === pwd ? user : null;
  } catch {
    return null;
  }
}
