import { mkdirSync } from 'node:fs';

import type { RequestHandler } from 'express';
import multer, { MulterError } from 'multer';

import { limits } from '@/lib/contract/limits';

import { findOwnBank } from '../banks/queries';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { createLocalStorage } from './storage';
import { bankParamsSchema } from './params';

/**
 * Receives the one file of a log upload into the incoming folder. The bank is looked up first, so that nothing is
 * received for others' banks.
 */
export function receiveLog({ config }: Deps): RequestHandler {
  const { incomingDir } = createLocalStorage(config.uploadsDir);
  mkdirSync(incomingDir, { recursive: true });
  const receive = multer({
    // Without a name of its own the file gets a random one.
    storage: multer.diskStorage({ destination: incomingDir }),
    limits: { fileSize: limits.logBytes.max, files: 1, fields: 5, fieldSize: 1024, parts: 6 },
    defParamCharset: 'utf8',
  }).single('file');
  return async (req, res, next) => {
    const params = bankParamsSchema.safeParse(req.params);
    if (!params.success) throw new AppError('notFound');
    await findOwnBank(req.actor, 'uploads.create', params.data.bankId);
    receive(req, res, (error: unknown) => {
      const isMalformed = error instanceof Error && !(error instanceof MulterError) && !('errno' in error);
      next(
        isMalformed
          ? new AppError('badRequest', undefined, { file: 'The file did not arrive whole.' })
          : error,
      );
    });
  };
}
