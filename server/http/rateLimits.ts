import type { RequestHandler } from 'express';
import { ipKeyGenerator, rateLimit } from 'express-rate-limit';

import type { Config } from '../config';
import { AppError } from '../errors';
import type { LimitName } from './route';

const minute = 60_000;

const windows: Record<LimitName, { windowMs: number; limit: number }> = {
  signIn: { windowMs: 15 * minute, limit: 20 },
  reset: { windowMs: 60 * minute, limit: 10 },
  submission: { windowMs: 60 * minute, limit: 60 },
  upload: { windowMs: 60 * minute, limit: 60 },
  // A token can't be guessed anyway; this keeps anyone from trying.
  sharedLink: { windowMs: 15 * minute, limit: 120 },
  publicApi: { windowMs: 15 * minute, limit: 600 },
};

/** One limiter per name, counted per account where signed in, else per address. */
export function createRateLimits({ hasRateLimits }: Config): Record<LimitName, RequestHandler> {
  const create = ({ windowMs, limit }: { windowMs: number; limit: number }) =>
    rateLimit({
      windowMs,
      limit,
      standardHeaders: 'draft-8',
      legacyHeaders: false,
      skip: () => !hasRateLimits,
      keyGenerator: ({ actor, ip }) => (actor.role === 'visitor' ? ipKeyGenerator(ip ?? '') : actor.userId),
      handler: (_req, _res, next) => next(new AppError('tooManyRequests')),
    });
  return {
    signIn: create(windows.signIn),
    reset: create(windows.reset),
    submission: create(windows.submission),
    upload: create(windows.upload),
    sharedLink: create(windows.sharedLink),
    publicApi: create(windows.publicApi),
  };
}
