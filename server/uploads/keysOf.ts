import type { Upload } from '../db/models';

/** Where all files of an upload are kept: a photo's small twin and a log's further files among them. */
export function keysOf({ storageKey, thumbKey, parts }: Upload): string[] {
  return [storageKey, ...(thumbKey ? [thumbKey] : []), ...(parts ?? []).map((part) => part.storageKey)];
}
