import { createHmac } from 'node:crypto';

import { blindShare } from '@/lib/contract/agreement';

/**
 * Whether a check's decision gets a second, blind look: the first 32 bits of HMAC-SHA-256(seed, 'blind ' + check id), as
 * a share of 2^32, lie below 5 %. Always the same for a check, and not to be told beforehand without the seed.
 */
export function isDrawn(checkId: string, seed: string): boolean {
  const digest = createHmac('sha256', seed).update(`blind ${checkId}`).digest();
  return digest.readUInt32BE(0) / 2 ** 32 < blindShare;
}
