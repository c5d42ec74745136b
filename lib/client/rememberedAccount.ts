import { z } from 'zod';

import { type Session, sessionUserSchema } from '@/lib/contract/accounts';

const key = 'ebbline.account';
const rememberedSchema = z.object({
  user: sessionUserSchema,
  isDemo: z.boolean(),
  /** The server no longer knows the sign-in: nothing is opened by it any more. */
  hasRunOut: z.boolean(),
});

/**
 * Whom this browser was last signed in as: lets the pages open without a network, and tells a sign-in that ran out from
 * one that was ended.
 */
export function rememberedAccount(): z.infer<typeof rememberedSchema> | undefined {
  try {
    return rememberedSchema.safeParse(JSON.parse(window.localStorage.getItem(key) ?? 'null')).data;
  } catch {
    return undefined;
  }
}

/** Notes whom a session belongs to; of a visitor's, that the sign-in before has run out. */
export function rememberAccount(session: Session): Session {
  const { user, isDemo } = session;
  const before = rememberedAccount();
  if (user) write(JSON.stringify({ user, isDemo, hasRunOut: false }));
  else if (before) write(JSON.stringify({ ...before, hasRunOut: true }));
  return session;
}

/** For a sign-in that is ended by its owner. */
export function forgetAccount(): void {
  write(null);
}

function write(text: string | null) {
  try {
    if (text === null) window.localStorage.removeItem(key);
    else window.localStorage.setItem(key, text);
  } catch {
    // Storage is denied: the pages then need a network to open.
  }
}
