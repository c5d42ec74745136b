import { z } from 'zod';

/** The element of a public page that holds the answers it begins with; written by the server. */
const elementId = 'first-answers';
const answersSchema = z.array(z.object({ path: z.string(), body: z.unknown() }));

let answers: ReadonlyMap<string, unknown> | undefined;

function readAnswers(): ReadonlyMap<string, unknown> {
  if (typeof document === 'undefined') return new Map();
  const text = document.getElementById(elementId)?.textContent;
  if (!text) return new Map();
  try {
    return new Map(answersSchema.parse(JSON.parse(text)).map(({ path, body }) => [path, body]));
  } catch {
    // The page then asks for what it could not read.
    return new Map();
  }
}

/**
 * The answer of the API that came with the page, as a query begins with it; undefined where there is none, or none
 * that the schema takes. Its age counts from the page's loading, so that it is asked for anew like any other.
 */
export function firstAnswer<Schema extends z.ZodType>(schema: Schema, path: string) {
  return {
    initialData: (): z.output<Schema> | undefined => {
      answers ??= readAnswers();
      return schema.safeParse(answers.get(path)).data;
    },
    initialDataUpdatedAt: () => (typeof performance === 'undefined' ? 0 : performance.timeOrigin),
  };
}
