import { createHash } from 'node:crypto';
import { promisify } from 'node:util';
import { brotliCompress, constants, gzip } from 'node:zlib';

import type { Request, Response } from 'express';
import type { Sequelize } from 'sequelize';

import { changeCount } from '../db/watchChanges';

/** An answer that is the same for everyone, with its tag and the ways it is sent. */
export interface KeptAnswer {
  type: string;
  status: number;
  etag: string;
  plain: Buffer;
  br: Buffer;
  gzip: Buffer;
}

export interface MadeAnswer {
  type: string;
  status?: number;
  content: string | Buffer;
}

/** More than there are pages; an address with parameters of all kinds must not fill the memory. */
const mostKept = 300;

interface Shelf {
  count: number;
  answers: Map<string, Promise<KeptAnswer>>;
}

const shelves = new WeakMap<Sequelize, Shelf>();

/**
 * Gives an answer from memory, made anew when any table behind visitors' pages has changed since: so also when another
 * fit is in force. Asked for many times at once it is made once.
 */
export function keptAnswer(db: Sequelize, key: string, make: () => Promise<MadeAnswer>): Promise<KeptAnswer> {
  const shelf = shelfOf(db);
  const known = shelf.answers.get(key);
  if (known) return known;
  const made = make().then(packed);
  const oldest = shelf.answers.keys().next().value;
  if (shelf.answers.size >= mostKept && oldest !== undefined) shelf.answers.delete(oldest);
  shelf.answers.set(key, made);
  made.catch(() => shelf.answers.delete(key));
  return made;
}

function shelfOf(db: Sequelize): Shelf {
  const count = changeCount(db);
  const known = shelves.get(db);
  if (known?.count === count) return known;
  const fresh: Shelf = { count, answers: new Map() };
  shelves.set(db, fresh);
  return fresh;
}

const brotli = promisify(brotliCompress);
const zip = promisify(gzip);
/** Packed once and sent often, yet somebody waits for the first: not the slowest. */
const quality = { params: { [constants.BROTLI_PARAM_QUALITY]: 6 } };

async function packed({ type, status = 200, content }: MadeAnswer): Promise<KeptAnswer> {
  const plain = Buffer.from(content);
  const isPicture = type.startsWith('image/');
  const [br, gzipped] = isPicture ? [plain, plain] : await Promise.all([brotli(plain, quality), zip(plain)]);
  const hash = createHash('sha256').update(type).update(plain).digest('base64url').slice(0, 22);
  return { type, status, plain, br, gzip: gzipped, etag: `W/"${hash}"` };
}

/** Sends it as the client can read it, or says that what the client has is still so. */
export function sendKept(req: Request, res: Response, answer: KeptAnswer): void {
  res.status(answer.status);
  res.setHeader('Cache-Control', 'no-cache');
  res.setHeader('ETag', answer.etag);
  res.vary('Accept-Encoding');
  if (answer.status === 200 && req.fresh) {
    res.status(304).end();
    return;
  }
  const encoding = answer.type.startsWith('image/') ? false : req.acceptsEncodings('br', 'gzip');
  res.type(answer.type);
  if (encoding === 'br' || encoding === 'gzip') res.setHeader('Content-Encoding', encoding);
  res.end(encoding === 'br' ? answer.br : encoding === 'gzip' ? answer.gzip : answer.plain);
}
