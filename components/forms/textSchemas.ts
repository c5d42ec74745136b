import { z } from 'zod';
import { parseNumber } from '@/lib/units';

const enterNumber = 'Enter a number.';

/**
 * Reads typed text as a number and holds it against a number schema of the contract.
 * @param toStored from the number typed to the one the schema is of: per cent to a fraction
 */
export function numberText<Read>(
  schema: z.ZodType<Read, number>,
  toStored: (typed: number) => number = (typed) => typed,
) {
  return z
    .string()
    .transform((text, context) => {
      const typed = parseNumber(text);
      if (typed !== undefined) return toStored(typed);
      context.addIssue({ code: 'custom', message: text.trim() === '' ? 'This is needed.' : enterNumber });
      return z.NEVER;
    })
    .pipe(schema);
}

/** As numberText; left empty it reads as null. */
export function optionalNumberText<Read>(
  schema: z.ZodType<Read, number>,
  toStored: (typed: number) => number = (typed) => typed,
) {
  const filled = numberText(schema, toStored);
  return z.string().transform((text, context): Read | null => {
    if (text.trim() === '') return null;
    const result = filled.safeParse(text);
    if (result.success) return result.data;
    result.error.issues.forEach((issue) => context.addIssue({ code: 'custom', message: issue.message }));
    return z.NEVER;
  });
}

/** One of a contract's choices, chosen in a form that begins with none chosen. */
export function chosen<Read extends string>(schema: z.ZodType<Read>) {
  return z.string().transform((text, context): Read => {
    const result = schema.safeParse(text);
    if (result.success) return result.data;
    context.addIssue({ code: 'custom', message: 'Choose one.' });
    return z.NEVER;
  });
}

/** Text that reads as null where it is left empty, else by its schema. */
export function optionalText<Read>(schema: z.ZodType<Read, string>) {
  return z.string().transform((text, context): Read | null => {
    if (text.trim() === '') return null;
    const result = schema.safeParse(text);
    if (result.success) return result.data;
    result.error.issues.forEach((issue) => context.addIssue({ code: 'custom', message: issue.message }));
    return z.NEVER;
  });
}
