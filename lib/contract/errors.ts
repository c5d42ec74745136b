import { z } from 'zod';

/** Every error of the API, by the code clients branch on (never on message text), with its HTTP status. */
export const errorStatuses = {
  invalid: 422,
  badRequest: 400,
  notSignedIn: 401,
  wrongCredentials: 401,
  sessionEnded: 401,
  notAllowed: 403,
  addressUnconfirmed: 403,
  accountLocked: 403,
  secondFactorDue: 403,
  csrf: 403,
  notFound: 404,
  methodNotAllowed: 405,
  conflict: 409,
  versionConflict: 409,
  alreadyDecided: 409,
  gone: 410,
  tooLarge: 413,
  unsupportedType: 415,
  tooManyRequests: 429,
  internal: 500,
  unavailable: 503,
} as const;

export type ErrorCode = keyof typeof errorStatuses;

const errorCodes = Object.keys(errorStatuses) as [ErrorCode, ...ErrorCode[]];

/** The one error shape, end to end. `fields` maps a field's path (`conditions.depthFraction`) to its message. */
export const errorBodySchema = z.object({
  error: z.object({
    code: z.enum(errorCodes),
    message: z.string(),
    fields: z.record(z.string(), z.string()),
    requestId: z.string().optional(),
  }),
});

export type ErrorBody = z.infer<typeof errorBodySchema>;
