import { doubleCsrf } from 'csrf-csrf';
import type { Request, RequestHandler, Response } from 'express';

import type { Config } from '../config';
import { AppError } from '../errors';
import type { Actor } from '../policies';

export interface Csrf {
  /** Refuses a state-changing request without the token of its sign-in. */
  protect: RequestHandler;
  /** The token for the actor the answer is about, set as a cookie beside it. */
  issue: (req: Request, res: Response, actor: Actor) => string;
}

const cookieName = 'ebblineCsrf';

/** Signed double-submit tokens, bound to the sign-in. */
export function createCsrf({ secret, hasSecureCookies }: Config): Csrf {
  const { doubleCsrfProtection, generateCsrfToken } = doubleCsrf({
    getSecret: () => secret,
    // A page that was open while its sign-in ended is still that page: it is told of the end, and can sign in anew.
    getSessionIdentifier: ({ actor, endedFamilyId }) =>
      actor.role === 'visitor' ? (endedFamilyId ?? 'visitor') : actor.familyId,
    getCsrfTokenFromRequest: (req) => req.headers['x-csrf-token'],
    cookieName,
    cookieOptions: { sameSite: 'strict', httpOnly: true, secure: hasSecureCookies, path: '/' },
  });
  return {
    protect: (req, res, next) =>
      doubleCsrfProtection(req, res, (error) => next(error && new AppError('csrf'))),
    issue(req, res, actor) {
      req.actor = actor;
      // A token that is still good is kept, so that two tabs do not take it from each other.
      return generateCsrfToken(req, res, { overwrite: typeof req.cookies[cookieName] !== 'string' });
    },
  };
}
