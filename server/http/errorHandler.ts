import type { ErrorRequestHandler } from 'express';
import type { Logger } from 'pino';

import { AppError } from '../errors';
import { StorageError } from '../uploads/storage';

/** Every failure leaves through here in the one error shape; what is not an AppError is logged once and is a 500. */
export function errorHandler(logger: Logger): ErrorRequestHandler {
  return (error, req, res, next) => {
    if (res.headersSent) return next(error);
    const known = asAppError(error);
    if (!known) logger.error({ err: error, requestId: req.id }, 'request failed');
    const answer = known ?? new AppError(error instanceof StorageError ? 'unavailable' : 'internal');
    res.status(answer.status).json(answer.toBody(known ? undefined : String(req.id)));
  };
}

function asAppError(error: unknown): AppError | undefined {
  if (error instanceof AppError) return error;
  // body-parser's own errors carry a type and a 4xx status.
  if (error instanceof Error && 'type' in error && 'status' in error) {
    if (error.type === 'entity.too.large') return new AppError('tooLarge');
    if (typeof error.status === 'number' && error.status < 500) return new AppError('badRequest');
  }
  // Express's own, such as a broken percent sign in an address.
  if (error instanceof URIError) return new AppError('badRequest');
  return undefined;
}
