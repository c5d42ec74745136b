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
  const { response, body } = await fetchBody(path, init, (answer) => answer.text());
  return readAnswer(schema, response.status, body);
}

/** An answer that is a file, with the name it is to be kept under. Errors as fetchAnswer. */
export async function fetchFile(path: string): Promise<{ blob: Blob; filename: string }> {
  const { response, body } = await fetchBody(path, {}, (answer) => answer.blob());
  if (!response.ok) throw errorOfAnswer(response.status, parseJson(await body.text()));
  const disposition = response.headers.get('content-disposition') ?? '';
  const filename = /filename="?([^";]+)"?/.exec(disposition)?.[1] ?? 'ebbline';
  return { blob: body, filename };
}

async function fetchBody<Body>(path: string, init: RequestInit, read: (answer: Response) => Promise<Body>) {
  try {
    const response = await fetch(apiOrigin + path, { credentials: 'include', ...init });
    return { response, body: await read(response) };
  } catch (error) {
    if (init.signal?.aborted) throw error;
    throw offlineError();
  }
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
