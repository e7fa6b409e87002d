import type { Application, RequestHandler } from 'express';
import { AppError } from '#shared/errors/app-error.ts';
import type { Limit, Route } from '#api/lib/define-route.ts';
import type { Deps } from '#api/lib/deps.ts';
import { runRoute } from './run-route.ts';

/** Public reads may be made by a page of any site: they carry no one's rights. */
const openToAllSites: RequestHandler = (_request, response, next) => {
  response.set({ 'access-control-allow-origin': '*', 'access-control-expose-headers': 'link, location, retry-after, ratelimit', 'cross-origin-resource-policy': 'cross-origin' });
  next();
};

/** Puts every route on the application, and a 405 with `Allow` behind each address. */
export const mountRoutes = (app: Application, routes: readonly Route[], deps: Deps, limits: Record<Limit, RequestHandler>): void => {
  for (const route of routes) {
    app[route.method](route.path, limits[route.limit], ...(route.action === 'public.read' ? [openToAllSites] : []), runRoute(route, deps));
  }
  for (const path of new Set(routes.map((route) => route.path))) {
    const allow = routes.filter((route) => route.path === path).map((route) => route.method.toUpperCase());
    app.all(path, (request, response, next) => {
      response.set('allow', allow.join(', '));
      if (request.method === 'OPTIONS') return void response.status(204).end();
      next(new AppError('method-not-allowed', `${request.method} is not taken here; ${allow.join(', ')} ${allow.length > 1 ? 'are' : 'is'}.`));
    });
  }
};
