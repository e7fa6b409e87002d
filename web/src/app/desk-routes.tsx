import type { LazyRouteFunction, RouteObject } from 'react-router-dom';
import type { RouteModule } from './lazy-route.ts';

type PageOf = (load: () => Promise<RouteModule>) => LazyRouteFunction<RouteObject>;

/** Pages behind sign-in: desk, run sheets, submissions, reviews, tokens. */
export const deskRoutes = (_page: PageOf): RouteObject[] => [];
