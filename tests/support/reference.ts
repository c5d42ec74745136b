import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';

/** Path of a file among the shared reference values, which lie beside the repository. */
export function referencePath(name: string): string {
  return resolve(__dirname, '../../../shared/reference', name);
}

/** A reference file of JSON, typed by the caller. */
export function readReferenceJson<T>(name: string): T {
  return JSON.parse(readFileSync(referencePath(name), 'utf8')) as T;
}
