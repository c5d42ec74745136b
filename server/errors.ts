import type { z } from 'zod';

import { type ErrorBody, type ErrorCode, errorStatuses } from '@/lib/contract/errors';

const defaultMessages: Record<ErrorCode, string> = {
  invalid: 'Some fields need another look.',
  badRequest: 'The request could not be read.',
  notSignedIn: 'Sign in to go on.',
  wrongCredentials: 'The e-mail address or the password is not right.',
  sessionEnded: 'Your sign-in has ended. Sign in again to go on.',
  notAllowed: 'Your account may not do this.',
  addressUnconfirmed: 'Confirm your e-mail address first: the link is in the mail we have just sent again.',
  accountLocked: 'This account is locked. The mail sent to its address says how to go on.',
  secondFactorDue:
    'Moderators and stewards sign in with a code too. Set it up in your account before you go on.',
  csrf: 'The page has been open for long. Reload it and try again.',
  notFound: 'There is nothing at this address.',
  methodNotAllowed: 'This address does not take that kind of request.',
  conflict: 'This clashes with something that is already there.',
  versionConflict:
    'It was changed elsewhere in the meantime. Reload to see the newer state; what you typed is kept here.',
  alreadyDecided: 'Somebody else decided on this one first.',
  gone: 'This link has been used or has run out.',
  tooLarge: 'That is more than fits.',
  unsupportedType: 'This kind of file cannot be used here.',
  tooManyRequests: 'Too many tries. Wait a little and try again.',
  internal: 'Something went wrong on our side. Try again; if it stays, tell us the number below.',
  unavailable: 'This is not available at the moment. Try again shortly.',
};

/** A failure meant for the client. Anything else that is thrown is a 500. */
export class AppError extends Error {
  readonly status: number;

  constructor(
    readonly code: ErrorCode,
    message: string = defaultMessages[code],
    readonly fields: Record<string, string> = {},
  ) {
    super(message);
    this.name = 'AppError';
    this.status = errorStatuses[code];
  }

  toBody(requestId?: string): ErrorBody {
    return { error: { code: this.code, message: this.message, fields: this.fields, requestId } };
  }
}

/** zod's issues as an `invalid` error: the first message of each field. */
export function invalidInput(error: z.ZodError): AppError {
  const fields: Record<string, string> = {};
  for (const { path, message } of error.issues) fields[path.join('.')] ??= message;
  return new AppError('invalid', undefined, fields);
}
