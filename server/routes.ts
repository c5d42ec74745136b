import { accountRoutes } from './accounts/routes';
import type { Csrf } from './http/csrf';
import type { Route } from './http/route';

/** Every route of the API. */
export function createRoutes(csrf: Csrf): Route[] {
  return [...accountRoutes(csrf)];
}
