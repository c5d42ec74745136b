import { z } from 'zod';

import { presentPasswordSchema } from './accounts';
import { instantSchema } from './fields';

/** Six digits of the app, or a recovery code; blanks and dashes do not count. */
const codeSchema = z
  .string({ error: 'Enter the code.' })
  .trim()
  .min(1, 'Enter the code.')
  .max(40, 'Enter the code.');

/** Whether signing in asks for a code, and what is left of the codes for emergencies. */
export const secondFactorSchema = z.object({
  isOn: z.boolean(),
  since: instantSchema.nullable(),
  recoveryCodesLeft: z.number().int(),
  /** The account may not do its work without it. */
  isRequired: z.boolean(),
});
export type SecondFactor = z.infer<typeof secondFactorSchema>;

export const beginSecondFactorRequestSchema = z.object({ currentPassword: presentPasswordSchema });
export type BeginSecondFactorRequest = z.input<typeof beginSecondFactorRequestSchema>;

/** What an authenticator app needs, once: the secret as text, as a link, and as the squares of a QR code. */
export const secondFactorOfferSchema = z.object({
  /** Base32. */
  secret: z.string(),
  /** otpauth:// */
  uri: z.string(),
  /** Squares along an edge, and an SVG path of the dark ones, one unit each. */
  qr: z.object({ size: z.number().int(), path: z.string() }),
});
export type SecondFactorOffer = z.infer<typeof secondFactorOfferSchema>;

export const confirmSecondFactorRequestSchema = z.object({ code: codeSchema });
export type ConfirmSecondFactorRequest = z.input<typeof confirmSecondFactorRequestSchema>;

/** Shown this once. */
export const recoveryCodesSchema = z.object({ recoveryCodes: z.array(z.string()) });

/** For turning it off, and for fresh recovery codes. */
export const passwordAndCodeRequestSchema = z.object({
  currentPassword: presentPasswordSchema,
  code: codeSchema,
});
export type PasswordAndCodeRequest = z.input<typeof passwordAndCodeRequestSchema>;

/** The second step of signing in. */
export const signInCodeRequestSchema = z.object({ code: codeSchema });
export type SignInCodeRequest = z.input<typeof signInCodeRequestSchema>;
