import { z } from 'zod';

import { idSchema, instantSchema } from './fields';
import { limits } from './limits';

export const roleSchema = z.enum(['owner', 'moderator', 'steward']);
export type Role = z.infer<typeof roleSchema>;

export const emailSchema = z
  .string({ error: 'Enter your e-mail address.' })
  .trim()
  .toLowerCase()
  .max(254, 'Keep it to 254 characters.')
  .pipe(z.email('Enter an e-mail address, such as name@example.org.'));

const newPasswordSchema = z
  .string({ error: 'Choose a password.' })
  .min(limits.passwordLength.min, `Use at least ${limits.passwordLength.min} characters.`)
  .max(limits.passwordLength.max, `Use at most ${limits.passwordLength.max} characters.`);

const tokenSchema = z
  .string({ error: 'The link is not complete.' })
  .min(20, 'The link is not complete.')
  .max(200);

export const registerRequestSchema = z.object({ email: emailSchema, password: newPasswordSchema });
export const verifyRequestSchema = z.object({ token: tokenSchema });
export const signInRequestSchema = z.object({
  email: emailSchema,
  password: z
    .string({ error: 'Enter your password.' })
    .min(1, 'Enter your password.')
    .max(limits.passwordLength.max),
});
export const signOutRequestSchema = z.object({ everywhere: z.boolean().default(false) });
export const resendVerificationRequestSchema = z.object({ email: emailSchema });
export const requestResetRequestSchema = z.object({ email: emailSchema });
export const resetRequestSchema = z.object({ token: tokenSchema, password: newPasswordSchema });

/** What can't be taken back asks for it again. */
export const presentPasswordSchema = z
  .string({ error: 'Enter your present password.' })
  .min(1, 'Enter your present password.')
  .max(limits.passwordLength.max);

export const changePasswordRequestSchema = z.object({
  currentPassword: presentPasswordSchema,
  password: newPasswordSchema,
});
export type ChangePasswordRequest = z.input<typeof changePasswordRequestSchema>;

/** The new address counts once the link mailed to it has been opened. */
export const changeEmailRequestSchema = z.object({
  email: emailSchema,
  currentPassword: presentPasswordSchema,
});
export type ChangeEmailRequest = z.input<typeof changeEmailRequestSchema>;

export const confirmEmailRequestSchema = z.object({ token: tokenSchema });
export type ConfirmEmailRequest = z.input<typeof confirmEmailRequestSchema>;

/** What happens to the checks of an account that is deleted. */
export const checksAfterwardsSchema = z.enum(['leave', 'withdraw'], {
  error: 'Choose what happens to your checks.',
});
export type ChecksAfterwards = z.infer<typeof checksAfterwardsSchema>;

export const deleteAccountRequestSchema = z.object({
  currentPassword: presentPasswordSchema,
  checks: checksAfterwardsSchema,
});
export type DeleteAccountRequest = z.input<typeof deleteAccountRequestSchema>;

/** Answer of everything that must not tell whether an address has an account. */
export const acceptedSchema = z.object({ accepted: z.literal(true) });

export const sessionUserSchema = z.object({
  id: idSchema,
  email: z.string(),
  role: roleSchema,
  /** Whether signing in asks for a code too; `due`: it must be set up before the role's work can be done. */
  secondFactor: z.enum(['on', 'off', 'due']),
});
export type SessionUser = z.infer<typeof sessionUserSchema>;

/** Who the browser is signed in as, and the token that state-changing requests carry in `x-csrf-token`. */
export const sessionSchema = z.object({
  user: sessionUserSchema.nullable(),
  csrfToken: z.string(),
  /** The access token has run out, and a refresh token is there to renew it with. */
  canRefresh: z.boolean(),
  isDemo: z.boolean(),
});
export type Session = z.infer<typeof sessionSchema>;

/** After the password: the session, or a visitor's who is asked for a code next. */
export const signInAnswerSchema = sessionSchema.extend({ asksForCode: z.boolean() });

export const demoAccountsSchema = z.object({
  accounts: z.array(
    z.object({ email: z.string(), password: z.string(), role: roleSchema, note: z.string() }),
  ),
});

export const outboxSchema = z.object({
  messages: z.array(
    z.object({
      id: idSchema,
      to: z.string(),
      subject: z.string(),
      text: z.string(),
      state: z.enum(['queued', 'sent', 'failed']),
      createdAt: instantSchema,
    }),
  ),
});
export type Outbox = z.infer<typeof outboxSchema>;

export type RegisterRequest = z.input<typeof registerRequestSchema>;
export type SignInRequest = z.input<typeof signInRequestSchema>;
export type SignOutRequest = z.input<typeof signOutRequestSchema>;
export type VerifyRequest = z.input<typeof verifyRequestSchema>;
export type ResendVerificationRequest = z.input<typeof resendVerificationRequestSchema>;
export type RequestResetRequest = z.input<typeof requestResetRequestSchema>;
export type ResetRequest = z.input<typeof resetRequestSchema>;
