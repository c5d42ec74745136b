import type { z } from 'zod';

import { ApiError, isSessionLost, offlineError } from './apiError';
import { apiOrigin, fetchAnswer, fetchFile, readAnswer } from './fetchAnswer';
import { currentCsrfToken, readSession } from './sessionTokens';

export { ApiError, type ApiErrorCode, isSessionLost } from './apiError';

interface RequestOptions {
  method?: 'GET' | 'POST' | 'PUT' | 'DELETE';
  /** Sent as JSON. */
  body?: object;
  signal?: AbortSignal;
}

/**
 * One call of the API: carries the CSRF token, renews an access token that has run out and tries once more, and
 * parses the answer by its schema.
 * @param path from `/api/` on
 * @throws ApiError for every failure except an abort; code 'offline' when no answer arrived
 */
export async function apiRequest<Schema extends z.ZodType>(
  schema: Schema,
  path: string,
  { method = 'GET', body, signal }: RequestOptions = {},
): Promise<z.output<Schema>> {
  return withSession(async () => {
    const headers: Record<string, string> = { accept: 'application/json' };
    if (body) headers['content-type'] = 'application/json';
    if (method !== 'GET') headers['x-csrf-token'] = await currentCsrfToken();
    return fetchAnswer(schema, path, { method, headers, signal, body: body && JSON.stringify(body) });
  });
}

interface UploadOptions {
  /** Further form fields, sent before the file. */
  fields?: Record<string, string>;
  /** Called with the share sent so far, 0..1. */
  onProgress?: (fraction: number) => void;
  signal?: AbortSignal;
}

/**
 * Sends a file, or several at once, as form field `file` by POST, telling how far they have come. Errors and session as apiRequest; an abort
 * rejects with the signal's reason.
 */
export async function uploadFile<Schema extends z.ZodType>(
  schema: Schema,
  path: string,
  file: File | readonly File[],
  options: UploadOptions = {},
): Promise<z.output<Schema>> {
  return withSession(async () => {
    const files = file instanceof File ? [file] : file;
    const { status, text } = await sendForm(path, files, await currentCsrfToken(), options);
    return readAnswer(schema, status, text);
  });
}

/**
 * Fetches a file and hands it to the browser to keep. Errors and session as apiRequest, which a plain link would not
 * have: a page whose access token has run out would save the refusal.
 */
export async function saveFile(path: string): Promise<void> {
  const { blob, filename } = await withSession(() => fetchFile(path));
  keepFile(blob, filename);
}

/** Hands something made in the browser to it to keep; works without a network. */
export function keepFile(blob: Blob, filename: string): void {
  const url = URL.createObjectURL(blob);
  const anchor = document.createElement('a');
  anchor.href = url;
  anchor.download = filename;
  anchor.click();
  // The browser reads the address after the click has been dealt with.
  setTimeout(() => URL.revokeObjectURL(url), 60_000);
}

/** Fetches a file that the page itself shows. Errors and session as apiRequest, which an address in a page would not have. */
export async function readFile(path: string): Promise<Blob> {
  return (await withSession(() => fetchFile(path))).blob;
}

/** fetch can't tell how much of a body has been sent; XMLHttpRequest can. */
function sendForm(
  path: string,
  files: readonly File[],
  csrfToken: string,
  { fields = {}, onProgress, signal }: UploadOptions,
): Promise<{ status: number; text: string }> {
  const form = new FormData();
  for (const [name, value] of Object.entries(fields)) form.append(name, value);
  for (const file of files) form.append('file', file, file.name);
  return new Promise((resolve, reject) => {
    if (signal?.aborted) return reject(signal.reason);
    const request = new XMLHttpRequest();
    const abort = () => request.abort();
    signal?.addEventListener('abort', abort);
    request.open('POST', apiOrigin + path);
    request.withCredentials = true;
    request.setRequestHeader('x-csrf-token', csrfToken);
    request.upload.onprogress = ({ loaded, total }) => onProgress?.(total > 0 ? loaded / total : 0);
    request.onload = () => resolve({ status: request.status, text: request.responseText });
    request.onerror = () => reject(offlineError());
    request.onabort = () => reject(signal?.reason);
    request.onloadend = () => signal?.removeEventListener('abort', abort);
    request.send(form);
  });
}

/** Runs a request; refused for want of a fresh token, reads the session anew and runs it once more. */
async function withSession<T>(request: () => Promise<T>): Promise<T> {
  try {
    return await request();
  } catch (error) {
    if (!isStale(error)) throw error;
    const session = await readSession().catch(() => undefined);
    // A visitor would only be refused again, except where the page's CSRF token was the old sign-in's.
    if (!session || (!session.user && isSessionLost(error))) throw error;
    return request();
  }
}

const isStale = (error: unknown) =>
  error instanceof ApiError && (error.code === 'notSignedIn' || error.code === 'csrf');
