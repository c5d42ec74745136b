import type { Request, Response } from 'express';

import type { Session } from '@/lib/contract/accounts';

import { User } from '../db/models';
import type { Deps } from '../deps';
import type { Csrf } from '../http/csrf';
import { signAccessToken } from '../http/actor';
import type { Actor } from '../policies';
import { secondFactorState } from '../secondFactor/secondFactorOf';
import { setAccessCookie, setRefreshCookie } from './cookies';
import type { SignedIn } from './signIn';

interface Exchange {
  deps: Deps;
  req: Request;
  res: Response;
}

/** Who the browser is signed in as, with the CSRF token of that sign-in. */
export async function sessionAnswer(
  csrf: Csrf,
  exchange: Exchange,
  actor: Actor,
  hasRefreshToken = false,
): Promise<Session> {
  const { deps, req, res } = exchange;
  const user = actor.role === 'visitor' ? null : await User.findByPk(actor.userId);
  return {
    user: user && {
      ...{ id: user.id, email: user.email, role: user.role },
      secondFactor: await secondFactorState(deps.config, user),
    },
    csrfToken: csrf.issue(req, res, user ? actor : { role: 'visitor' }),
    canRefresh: !user && hasRefreshToken,
    isDemo: deps.config.isDemo,
  };
}

/** Hands a sign-in to the browser: its cookies, and the answer for it. */
export async function beginSession(
  csrf: Csrf,
  exchange: Exchange,
  { actor, refreshToken }: SignedIn,
): Promise<Session> {
  const { deps, res } = exchange;
  setAccessCookie(deps.config, res, signAccessToken(deps.config, actor));
  setRefreshCookie(deps.config, res, refreshToken);
  return sessionAnswer(csrf, exchange, actor);
}
