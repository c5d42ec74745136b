import { ApiError } from '@/lib/client/http';

/** What a failure with no form around it is told as, with the number to quote where there is one. */
export function problemOf(error: Error): string {
  if (!(error instanceof ApiError)) return 'Something went wrong in the program. Try again.';
  const messages = Object.values(error.fields);
  return [...(messages.length > 0 ? messages : [error.message]), error.requestId].filter(Boolean).join(' ');
}
