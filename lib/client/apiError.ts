import { errorBodySchema, type ErrorCode } from '@/lib/contract/errors';

/** The API's codes, and two that only a client can meet. */
export type ApiErrorCode = ErrorCode | 'offline' | 'unreadable';

interface ApiErrorParts {
  code: ApiErrorCode;
  message: string;
  /** Path of a field to its message; empty when the failure is of no field. */
  fields?: Record<string, string>;
  /** HTTP status; 0 when there was no answer. */
  status?: number;
  requestId?: string;
}

/** A request that did not succeed, in the API's one error shape. Branch on `code`, show `message`. */
export class ApiError extends Error {
  readonly code: ApiErrorCode;
  readonly fields: Record<string, string>;
  readonly status: number;
  readonly requestId: string | undefined;

  constructor({ code, message, fields = {}, status = 0, requestId }: ApiErrorParts) {
    super(message);
    this.name = 'ApiError';
    this.code = code;
    this.fields = fields;
    this.status = status;
    this.requestId = requestId;
  }
}

/** No answer arrived: no network, or nobody listening. */
export function offlineError(): ApiError {
  return new ApiError({ code: 'offline', message: 'There is no connection to the exchange at the moment.' });
}

/** An answer that is not what this version of the app expects, as after an update of the server. */
export function unreadableError(status: number): ApiError {
  const message = 'The answer could not be read. Reload the page to get its newest version.';
  return new ApiError({ code: 'unreadable', message, status });
}

/** The error that an answer's status and body tell. A proxy in between may answer in a shape of its own. */
export function errorOfAnswer(status: number, body: unknown): ApiError {
  const parsed = errorBodySchema.safeParse(body);
  if (parsed.success) return new ApiError({ ...parsed.data.error, status });
  if (status < 500) return unreadableError(status);
  return new ApiError({
    code: 'unavailable',
    message: 'The exchange does not answer properly at the moment. Try again shortly.',
    status,
  });
}

/** Whether the server no longer knows the browser's sign-in. */
export function isSessionLost(error: unknown): boolean {
  return error instanceof ApiError && (error.code === 'notSignedIn' || error.code === 'sessionEnded');
}
