import type { FieldPath, FieldValues, UseFormReturn } from 'react-hook-form';

import { ApiError } from '@/lib/client/http';

/** What of a failure is told above the button: all that stands beside no field of the form. */
export function formProblem(error: Error | null, fieldNames: readonly string[]): string | undefined {
  if (!error) return undefined;
  if (!(error instanceof ApiError)) return 'Something unexpected happened. Try again.';
  const entries = Object.entries(error.fields);
  const elsewhere = entries.filter(([name]) => !fieldNames.includes(name)).map(([, message]) => message);
  if (elsewhere.length > 0) return elsewhere.join(' ');
  if (entries.length > 0) return undefined;
  if (error.code === 'offline')
    return `${error.message} What you typed is kept here; try again when there is one.`;
  return error.requestId ? `${error.message} ${error.requestId}` : error.message;
}

/** Puts the server's messages beside their fields and takes the reader to the first. */
export function showFieldErrors<Values extends FieldValues>(
  error: Error,
  { setError, getValues }: Pick<UseFormReturn<Values>, 'setError' | 'getValues'>,
): void {
  if (!(error instanceof ApiError)) return;
  const names = Object.keys(getValues());
  const known = Object.entries(error.fields).filter(([name]) => names.includes(name));
  known.forEach(([name, message], index) =>
    setError(name as FieldPath<Values>, { type: 'server', message }, { shouldFocus: index === 0 }),
  );
}
