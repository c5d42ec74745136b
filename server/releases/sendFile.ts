import { pipeline } from 'node:stream/promises';

import type { Request, Response } from 'express';

import type { ReleaseFile } from '../db/models';
import type { FileStorage } from '../uploads/storage';

const year = 365 * 24 * 3600;

/**
 * Streams a file of a release, whole or the one range asked for (RFC 9110, section 14). A release never changes: a
 * browser may keep its files for good, and their checksum is their tag.
 */
export async function sendFile(
  { storageKey, name, number, type, bytes, sha256 }: ReleaseFile,
  storage: FileStorage,
  { req, res }: { req: Request; res: Response },
): Promise<void> {
  const tag = `"${sha256}"`;
  res.set({
    'Accept-Ranges': 'bytes',
    'Access-Control-Allow-Origin': '*',
    'Cache-Control': `public, max-age=${year}, immutable, no-transform`,
    'Content-Disposition': `attachment; filename="${name.startsWith('ebbline') ? name : `release-${number}-${name}`}"`,
    'Content-Type': type,
    ETag: tag,
  });
  if (req.fresh) {
    res.status(304).end();
    return;
  }
  const wanted = req.headers['if-range'] && req.headers['if-range'] !== tag ? undefined : req.range(bytes);
  if (wanted === -1) {
    res.status(416).set('Content-Range', `bytes */${bytes}`).end();
    return;
  }
  const range = Array.isArray(wanted) && wanted.type === 'bytes' && wanted.length === 1 ? wanted[0]! : null;
  const { start, end } = range ?? { start: 0, end: bytes - 1 };
  if (range) res.status(206).set('Content-Range', `bytes ${start}-${end}/${bytes}`);
  res.set('Content-Length', String(end - start + 1));
  if (req.method === 'HEAD') {
    res.end();
    return;
  }
  await pipeline(await storage.open(storageKey, { start, end }), res);
}
