import { mkdirSync } from 'node:fs';

import type { RequestHandler } from 'express';
import multer, { MulterError } from 'multer';

import { findOwnBank } from '../banks/queries';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { Action } from '../policies';
import { bankParamsSchema } from './params';

interface Reception {
  action: Action;
  maxBytes: number;
}

const megabyte = 1024 * 1024;

/**
 * Receives the one file of a form into the incoming folder. The bank is looked up first, so that nothing is received
 * for others' banks.
 */
export const receiveFile =
  ({ action, maxBytes }: Reception) =>
  ({ storage: { incomingDir } }: Deps): RequestHandler => {
    mkdirSync(incomingDir, { recursive: true });
    const receive = multer({
      // Without a name of its own the file gets a random one.
      storage: multer.diskStorage({ destination: incomingDir }),
      limits: { fileSize: maxBytes, files: 1, fields: 5, fieldSize: 1024, parts: 6 },
      defParamCharset: 'utf8',
    }).single('file');
    return async (req, res, next) => {
      const params = bankParamsSchema.safeParse(req.params);
      if (!params.success) throw new AppError('notFound');
      await findOwnBank(req.actor, action, params.data.bankId);
      receive(req, res, (error: unknown) => next(error && refusalOf(error, maxBytes)));
    };
  };

/** Receives the one small file of a form, of no one bank, into memory. */
export const receiveTable = (maxBytes: number) => (): RequestHandler => {
  const receive = multer({
    storage: multer.memoryStorage(),
    limits: { fileSize: maxBytes, files: 1, fields: 5, fieldSize: 1024, parts: 6 },
    defParamCharset: 'utf8',
  }).single('file');
  return (req, res, next) => receive(req, res, (error: unknown) => next(error && refusalOf(error, maxBytes)));
};

function refusalOf(error: unknown, maxBytes: number): unknown {
  if (error instanceof MulterError) {
    if (error.code !== 'LIMIT_FILE_SIZE')
      return new AppError('badRequest', undefined, { file: error.message });
    const message = `The file is larger than ${maxBytes / megabyte} MB.`;
    return new AppError('tooLarge', undefined, { file: message });
  }
  const isMalformed = error instanceof Error && !('errno' in error);
  return isMalformed
    ? new AppError('badRequest', undefined, { file: 'The file did not arrive whole.' })
    : error;
}
