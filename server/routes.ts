import { accountRoutes } from './accounts/routes';
import { bankRoutes } from './banks/routes';
import { cellTypeRoutes } from './cellTypes/routes';
import { checkRoutes } from './checks/routes';
import type { Csrf } from './http/csrf';
import type { Route } from './http/route';
import { outboxRoutes } from './outbox/routes';
import { uploadRoutes } from './uploads/routes';

/** Every route of the API. */
export function createRoutes(csrf: Csrf): Route[] {
  return [
    ...accountRoutes(csrf),
    ...outboxRoutes,
    ...cellTypeRoutes,
    ...bankRoutes,
    ...checkRoutes,
    ...uploadRoutes,
  ];
}
