import type { z } from 'zod';

import { errorOfAnswer, offlineError, unreadableError } from './apiError';

/** Where the API is: the page's own origin, or another port while developing. */
export const apiOrigin = process.env.EXPO_PUBLIC_API_ORIGIN ?? '';

/**
 * One request without any knowledge of sessions: sends it, and parses the answer by its schema.
 * @throws ApiError for every failure except an abort, which stays what fetch made it
 */
export async function fetchAnswer<Schema extends z.ZodType>(
  schema: Schema,
  path: string,
  init: RequestInit = {},
): Promise<z.output<Schema>> {
  let response: Response;
  let text: string;
  try {
    response = await fetch(apiOrigin + path, { credentials: 'include', ...init });
    text = await response.text();
  } catch (error) {
    if (init.signal?.aborted) throw error;
    throw offlineError();
  }
  return readAnswer(schema, response.status, text);
}

/** The body of an answer by its schema, or the error it tells. */
export function readAnswer<Schema extends z.ZodType>(
  schema: Schema,
  status: number,
  text: string,
): z.output<Schema> {
  const body = parseJson(text);
  if (status < 200 || status > 299) throw errorOfAnswer(status, body);
  const parsed = schema.safeParse(body);
  if (!parsed.success) throw unreadableError(status);
  return parsed.data;
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}
