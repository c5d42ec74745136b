import { useCallback } from 'react';
import { get, type FieldPath, type FieldValues, type UseFormReturn } from 'react-hook-form';
import { ApiError } from '@/lib/client/http';

export interface ServerErrorOptions {
  /** Where a path of the API stands in the form, when it is called otherwise there. */
  fieldFor?: (path: string) => string;
}

/**
 * Tells a form what the server refused: messages of fields it has beside those fields, the rest above its button.
 * Give what it returns the error that sending threw.
 */
export function useServerErrors<Form extends FieldValues, Read>(
  form: UseFormReturn<Form, unknown, Read>,
  { fieldFor = (path) => path }: ServerErrorOptions = {},
): (error: unknown) => void {
  const { setError, getValues } = form;
  return useCallback(
    (error: unknown) => {
      if (!(error instanceof ApiError)) {
        setError('root.server', {
          message: 'Something went wrong in the program. What you typed is still here.',
        });
        return;
      }
      const unplaced: string[] = [];
      let isFirst = true;
      for (const [path, message] of Object.entries(error.fields)) {
        const name = fieldFor(path);
        // Paths come from outside: only those that the form has are set on it.
        if (get(getValues(), name) === undefined) unplaced.push(message);
        else setError(name as FieldPath<Form>, { type: 'server', message }, { shouldFocus: isFirst });
        isFirst = false;
      }
      setError('root.server', { type: error.code, message: [error.message, ...unplaced].join(' ') });
    },
    [fieldFor, getValues, setError],
  );
}
