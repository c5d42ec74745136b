import { createHash, createHmac, randomBytes } from 'node:crypto';

/** 256 random bits as text that fits into an address. */
export const drawToken = () => randomBytes(32).toString('base64url');

/** What of a token is stored: whoever reads the database can use none. A token is random, so no salt is needed. */
export const hashToken = (token: string) => createHash('sha256').update(token).digest('hex');

/** The one token that follows another; only the server can tell it. */
export const successorOf = (token: string, secret: string) =>
  createHmac('sha256', secret).update(`refresh:${token}`).digest('base64url');
