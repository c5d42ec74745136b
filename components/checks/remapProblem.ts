import { ApiError } from '@/lib/client/http';

/** Why a log was not read again, in words. */
export function remapProblem(error: Error): string {
  if (!(error instanceof ApiError)) return 'The log could not be read again. Try once more.';
  return Object.values(error.fields)[0] ?? error.message;
}
