import { randomInt } from 'node:crypto';

import type { Transaction } from 'sequelize';

import { Bank } from '../db/models';

/** No vowels, so that no words appear; none of 0 O 1 I L, 5 S, 2 Z, 8 B, which look alike. */
const alphabet = 'CDFGHJKMNPQRTVWXY34679';
const length = 5;
const maxTries = 50;

/**
 * Draws the five characters moderators know a bank by. Nothing of the bank goes into them. Unique because the
 * transaction holds the write lock; the database's constraint stands behind it.
 */
export async function drawPseudonym(transaction: Transaction): Promise<string> {
  for (let tries = 0; tries < maxTries; tries += 1) {
    const pseudonym = Array.from({ length }, () => alphabet[randomInt(alphabet.length)]).join('');
    if ((await Bank.count({ where: { pseudonym }, transaction })) === 0) return pseudonym;
  }
  throw new Error('no free pseudonym was found');
}
