import { z } from 'zod';

/** Reads a value by a schema inside a transform; every issue stays at its own field. */
export function readBy<Read>(schema: z.ZodType<Read>) {
  return (value: unknown, context: z.RefinementCtx): Read => {
    const result = schema.safeParse(value);
    if (result.success) return result.data;
    for (const { path, message } of result.error.issues) context.addIssue({ code: 'custom', path, message });
    return z.NEVER;
  };
}

/** Reads typed values by a schema that depends on them, such as one that asks for a window only where one was chosen. */
export function readThrough<Typed, Read>(schemaFor: (typed: Typed) => z.ZodType<Read>) {
  return z.custom<Typed>().transform((typed, context): Read => readBy(schemaFor(typed))(typed, context));
}
