import { generate } from 'otplib';

import type { TestServer } from './testServer';
import type { Browser } from './browser';
import { goodPassword } from './accounts';

/** What an authenticator app shows at a time. */
export const codeAt = (secret: string, now: Date): Promise<string> =>
  generate({ secret, epoch: Math.floor(now.getTime() / 1000) });

/** A code that is good at no time near: one digit beside the right one, and none of its neighbours. */
export async function wrongCodeAt(secret: string, now: Date): Promise<string> {
  const near = await Promise.all(
    [-30, 0, 30].map((shift) => codeAt(secret, new Date(now.getTime() + shift * 1000))),
  );
  const wrong = ['000000', '000001', '000002', '000003'].find((code) => !near.includes(code));
  return wrong!;
}

/** Turns the second step on for whoever is signed in; answers the secret and the recovery codes. */
export async function setUpCodes(
  { deps }: TestServer,
  browser: Pick<Browser, 'post'>,
): Promise<{ secret: string; recoveryCodes: string[] }> {
  const begun = await browser.post('/api/account/second-factor/begin', { currentPassword: goodPassword });
  const { secret } = begun.body as { secret: string };
  const code = await codeAt(secret, deps.clock());
  const { body } = await browser.post('/api/account/second-factor/confirm', { code });
  return { secret, recoveryCodes: body.recoveryCodes };
}
