import { hkdfSync } from 'node:crypto';

/** A key of its own for each use, from the server's secret (RFC 5869). */
export function derivedKey(secret: string, use: string): Buffer {
  return Buffer.from(hkdfSync('sha256', secret, '', `ebbline ${use}`, 32));
}
