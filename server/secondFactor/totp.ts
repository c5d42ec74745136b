import { generateSecret, generateURI, verify } from 'otplib';

/** Time-based codes (RFC 6238) as every authenticator app makes them: SHA-1, six digits, steps of 30 s. */
const stepSeconds = 30;
const digits = /^\d{6}$/;

/** 160 random bits in base32, as RFC 4226 recommends. */
export const drawSecret = () => generateSecret({ length: 20 });

export const secretLink = (secret: string, label: string) =>
  generateURI({ issuer: 'Ebbline', label, secret, algorithm: 'sha1', digits: 6, period: stepSeconds });

/**
 * The time step a code is of, from the step before now to the one after, as clocks differ; null for any other code and
 * for one of a step up to `lastStep`, which has been used.
 */
export async function stepOfCode(
  secret: string,
  code: string,
  now: Date,
  lastStep: number | null,
): Promise<number | null> {
  if (!digits.test(code)) return null;
  const epoch = Math.floor(now.getTime() / 1000);
  const result = await verify({ secret, token: code, epoch, epochTolerance: stepSeconds });
  if (!result.valid || !('timeStep' in result)) return null;
  return lastStep !== null && result.timeStep <= lastStep ? null : result.timeStep;
}
