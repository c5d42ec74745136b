import type { Csrf } from './http/csrf';
import type { Route } from './http/route';

/** Every route of the API. */
export function createRoutes(_csrf: Csrf): Route[] {
  return [];
}
