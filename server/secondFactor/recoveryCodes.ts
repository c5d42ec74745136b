import { createHmac, randomInt } from 'node:crypto';

import type { Transaction } from 'sequelize';

import { RecoveryCode } from '../db/models';
import type { Deps } from '../deps';
import { derivedKey } from './derivedKey';

const count = 10;
/** Without letters that are read as others. 32 of them, so ten are 50 bits. */
const alphabet = '0123456789abcdefghjkmnpqrstvwxyz';
const length = 10;

/** What was typed, as the code is compared: without blanks and dashes. */
export const plainCode = (typed: string) => typed.toLowerCase().replace(/[\s-]/g, '');

const drawCode = () => Array.from({ length }, () => alphabet[randomInt(alphabet.length)]).join('');

const hashOf = (secret: string, userId: string, code: string) =>
  createHmac('sha256', derivedKey(secret, 'recovery codes')).update(`${userId}:${code}`).digest('hex');

/** Ten fresh codes in place of all earlier ones; only their keyed hashes are stored. */
export async function issueRecoveryCodes(
  { config }: Deps,
  userId: string,
  transaction: Transaction,
): Promise<string[]> {
  const codes = Array.from({ length: count }, drawCode);
  await RecoveryCode.destroy({ where: { userId }, transaction });
  await RecoveryCode.bulkCreate(
    codes.map((code) => ({ userId, codeHash: hashOf(config.secret, userId, code) })),
    { transaction },
  );
  return codes.map((code) => `${code.slice(0, length / 2)}-${code.slice(length / 2)}`);
}

/** Uses a code up; answers whether it was there to be used. */
export async function spendRecoveryCode(
  { config, clock }: Deps,
  userId: string,
  code: string,
  transaction: Transaction,
): Promise<boolean> {
  const where = { userId, codeHash: hashOf(config.secret, userId, code), usedAt: null };
  const [spent] = await RecoveryCode.update({ usedAt: clock() }, { where, transaction });
  return spent === 1;
}
