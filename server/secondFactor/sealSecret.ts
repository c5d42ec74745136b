import { createCipheriv, createDecipheriv, randomBytes } from 'node:crypto';

import { derivedKey } from './derivedKey';

const algorithm = 'aes-256-gcm';
const keyOf = (serverSecret: string) => derivedKey(serverSecret, 'second factor secrets');

/** Encrypts a secret for the database, bound to its account: moved to another row it can't be opened. */
export function sealSecret(secret: string, userId: string, serverSecret: string): string {
  const iv = randomBytes(12);
  const cipher = createCipheriv(algorithm, keyOf(serverSecret), iv).setAAD(Buffer.from(userId));
  const sealed = Buffer.concat([cipher.update(secret, 'utf8'), cipher.final()]);
  return [iv, cipher.getAuthTag(), sealed].map((part) => part.toString('base64url')).join('.');
}

/** @throws Error when it was altered, or sealed for another account or by another server's secret */
export function openSecret(text: string, userId: string, serverSecret: string): string {
  const [iv, tag, sealed] = text.split('.').map((part) => Buffer.from(part, 'base64url'));
  if (!iv || !tag || !sealed) throw new Error('a sealed secret has three parts');
  const decipher = createDecipheriv(algorithm, keyOf(serverSecret), iv, { authTagLength: 16 });
  decipher.setAAD(Buffer.from(userId)).setAuthTag(tag);
  return Buffer.concat([decipher.update(sealed), decipher.final()]).toString('utf8');
}
