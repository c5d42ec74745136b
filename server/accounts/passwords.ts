import { createHash } from 'node:crypto';

import bcrypt from 'bcryptjs';

/**
 * bcrypt reads 72 bytes at most; hashing first lets every character of a long password count. Normalised, so that the
 * same letters typed on another machine are the same password.
 */
const shorten = (password: string) =>
  createHash('sha256').update(password.normalize('NFKC')).digest('base64');

/** @param cost bcrypt's, from the configuration */
export function hashPassword(password: string, cost: number): Promise<string> {
  return bcrypt.hash(shorten(password), cost);
}

/** Takes as long when there is no account, so that the time of an answer does not tell. */
export async function isPasswordOf(
  account: { passwordHash: string } | null,
  password: string,
  cost: number,
): Promise<boolean> {
  const isRight = await bcrypt.compare(shorten(password), account?.passwordHash ?? hashOfNobody(cost));
  return account !== null && isRight;
}

/** Well-formed, and the hash of no password known to anybody. */
const hashOfNobody = (cost: number) => `$2b$${String(cost).padStart(2, '0')}$${'/'.repeat(53)}`;
