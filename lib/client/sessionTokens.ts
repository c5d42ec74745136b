import { type Session, sessionSchema } from '@/lib/contract/accounts';

import { isSessionLost } from './apiError';
import { fetchAnswer } from './fetchAnswer';

/** What state-changing requests carry; known once a session has been read. */
let csrfToken: string | undefined;
let renewal: Promise<Session> | undefined;

/** The token for state-changing requests, asked for if no session has been read yet. */
export async function currentCsrfToken(): Promise<string> {
  return csrfToken ?? (await readSession()).csrfToken;
}

/** Notes the token of a session that an answer brought. */
export function keepSession(session: Session): Session {
  csrfToken = session.csrfToken;
  return session;
}

/**
 * Who the browser is signed in as. When the access token has run out, it is renewed by the refresh token, once for
 * all who ask meanwhile. A refresh token that is no longer good leaves a visitor.
 */
export function readSession(): Promise<Session> {
  renewal ??= renew().finally(() => (renewal = undefined));
  return renewal;
}

async function renew(): Promise<Session> {
  const session = await askSession();
  if (!session.canRefresh) return session;
  const headers = { 'x-csrf-token': session.csrfToken };
  try {
    return keepSession(await fetchAnswer(sessionSchema, '/api/account/refresh', { method: 'POST', headers }));
  } catch (error) {
    if (isSessionLost(error)) return askSession();
    throw error;
  }
}

const askSession = async () => keepSession(await fetchAnswer(sessionSchema, '/api/account/session'));
