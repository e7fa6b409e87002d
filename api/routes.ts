import type { Route } from './lib/define-route.ts';
import { boardRoutes } from './modules/boards/routes.ts';
import { campaignRoutes } from './modules/campaigns/routes.ts';
import { citationRoutes } from './modules/citations/routes.ts';
import { deviceRoutes } from './modules/devices/routes.ts';
import { entryRoutes } from './modules/entries/routes.ts';
import { gateClassRoutes } from './modules/gate-classes/routes.ts';
import { healthRoutes } from './modules/health/routes.ts';
import { landingRoutes } from './modules/landing/routes.ts';
import { logRoutes } from './modules/log/routes.ts';
import { methodRoutes } from './modules/methods/routes.ts';
import { officeRoutes } from './modules/office/routes.ts';
import { opinionRoutes } from './modules/opinions/routes.ts';
import { reviewRoutes } from './modules/reviews/routes.ts';
import { runSheetRoutes } from './modules/run-sheets/routes.ts';
import { sessionRoutes } from './modules/session/routes.ts';
import { submissionRoutes } from './modules/submissions/routes.ts';
import { tokenRoutes } from './modules/tokens/routes.ts';
import { withdrawalRoutes } from './modules/withdrawals/routes.ts';

/** Every route of the API. A route that is not in this list does not exist; one in it has a rule. */
export const routes: readonly Route[] = [
  ...healthRoutes, ...sessionRoutes, ...gateClassRoutes, ...boardRoutes, ...entryRoutes, ...citationRoutes, ...landingRoutes, ...deviceRoutes, ...runSheetRoutes, ...submissionRoutes, ...reviewRoutes, ...opinionRoutes, ...tokenRoutes, ...logRoutes, ...withdrawalRoutes, ...methodRoutes, ...campaignRoutes, ...officeRoutes,
];
