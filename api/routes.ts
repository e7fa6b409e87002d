import type { Route } from './lib/define-route.ts';
import { healthRoutes } from './modules/health/routes.ts';
import { sessionRoutes } from './modules/session/routes.ts';

/** Every route of the API. A route that is not in this list does not exist; one in it has a rule. */
export const routes: readonly Route[] = [...healthRoutes, ...sessionRoutes];
