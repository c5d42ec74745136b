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
  /** Of each file. */
  maxBytes: number;
  /** More of them are refused; they are in `req.files`. One by default, in `req.file`. */
  maxFiles?: number;
}

const megabyte = 1024 * 1024;

/**
 * Receives the file, or files, of a form into the incoming folder. The bank is looked up first, so that nothing is received
 * for others' banks.
 */
export const receiveFile =
  ({ action, maxBytes, maxFiles = 1 }: Reception) =>
  ({ storage: { incomingDir } }: Deps): RequestHandler => {
    mkdirSync(incomingDir, { recursive: true });
    const form = multer({
      // Without a name of its own the file gets a random one.
      storage: multer.diskStorage({ destination: incomingDir }),
      limits: { fileSize: maxBytes, files: maxFiles, fields: 5, fieldSize: 1024, parts: 5 + maxFiles },
      defParamCharset: 'utf8',
    });
    const receive = maxFiles === 1 ? form.single('file') : form.array('file', maxFiles);
    return async (req, res, next) => {
      const params = bankParamsSchema.safeParse(req.params);
      if (!params.success) throw new AppError('notFound');
      await findOwnBank(req.actor, action, params.data.bankId);
      receive(req, res, (error: unknown) => next(error && refusalOf(error, maxBytes, maxFiles)));
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

function refusalOf(error: unknown, maxBytes: number, maxFiles = 1): unknown {
  if (error instanceof MulterError) {
    if (error.code === 'LIMIT_FILE_COUNT' && maxFiles > 1)
      return new AppError('badRequest', undefined, {
        file: `At most ${maxFiles} files can be read as one log.`,
      });
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
