import { accountRoutes } from './accounts/routes';
import { agreementRoutes } from './agreement/routes';
import { bankRoutes } from './banks/routes';
import { catalogueRoutes } from './catalogue/routes';
import { cellRoutes } from './cells/routes';
import { cellTypeRoutes } from './cellTypes/routes';
import { checkRoutes } from './checks/routes';
import { earlierCheckRoutes } from './earlierChecks/routes';
import { fitRoutes } from './fits/routes';
import type { Csrf } from './http/csrf';
import type { Route } from './http/route';
import { moderationRoutes } from './moderation/routes';
import { outboxRoutes } from './outbox/routes';
import { ownDataRoutes } from './ownData/routes';
import { publicApiRoutes } from './publicApi/routes';
import { releaseRoutes } from './releases/routes';
import { reminderRoutes } from './reminders/routes';
import { recordRoutes } from './records/routes';
import { standingRoutes } from './standing/routes';
import { photoRoutes } from './uploads/photoRoutes';
import { secondFactorRoutes } from './secondFactor/routes';
import { stewardRoutes } from './steward/routes';
import { uploadRoutes } from './uploads/routes';

/** Every route of the API. */
export function createRoutes(csrf: Csrf): Route[] {
  return [
    ...accountRoutes(csrf),
    ...secondFactorRoutes,
    ...stewardRoutes,
    ...outboxRoutes,
    ...cellTypeRoutes,
    ...cellRoutes,
    ...catalogueRoutes,
    ...moderationRoutes,
    ...agreementRoutes,
    ...fitRoutes,
    ...releaseRoutes,
    ...publicApiRoutes,
    ...bankRoutes,
    ...standingRoutes,
    ...recordRoutes,
    ...reminderRoutes,
    ...ownDataRoutes(csrf),
    ...checkRoutes,
    ...earlierCheckRoutes,
    ...uploadRoutes,
    ...photoRoutes,
  ];
}
