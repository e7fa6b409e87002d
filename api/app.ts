import { randomUUID } from 'node:crypto';
import express, { type Application } from 'express';
import { pinoHttp } from 'pino-http';
import type { Deps } from './lib/deps.ts';
import type { Route } from './lib/define-route.ts';
import { nothingHere, problems } from './middleware/errors.ts';
import { mountRoutes } from './middleware/mount-routes.ts';
import { rateLimits } from './middleware/rate-limits.ts';
import { securityHeaders } from './middleware/security-headers.ts';
import { sessions } from './middleware/session.ts';
import { clientFiles, schemaFiles } from './middleware/static-files.ts';
import { landingPages } from './modules/landing/pages.ts';
import { signInPages } from './modules/session/sign-in-pages.ts';
import { routes as allRoutes } from './routes.ts';

/** The whole web application, not yet listening. Tests may give a route list of their own. */
export const createApp = (deps: Deps, routes: readonly Route[] = allRoutes): Application => {
  const { config, log } = deps;
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', config.trustProxy);
  app.set('query parser', 'simple');
  app.use(
    pinoHttp({
      logger: log,
      genReqId: (_request, response) => {
        const id = randomUUID();
        response.setHeader('x-request-id', id);
        return id;
      },
      autoLogging: { ignore: (request) => request.url === '/api/health' },
      redact: ['req.headers.authorization', 'req.headers.cookie', 'req.headers["x-csrf-token"]', 'res.headers["set-cookie"]'],
      customLogLevel: (_request, response, fault) => (fault || response.statusCode >= 500 ? 'error' : 'info'),
    }),
  );
  app.use(securityHeaders(config.secureCookies));
  const limits = rateLimits(config.rateLimits);
  app.use(['/api', '/auth'], sessions(deps));
  app.use(signInPages(deps, limits['sign-in']));
  mountRoutes(app, routes, deps, limits);
  app.use('/schema', schemaFiles(config.schemaRoot));
  app.use(landingPages(deps, limits.read));
  app.use(clientFiles(config.webRoot));
  app.use(nothingHere);
  app.use(problems(log));
  return app;
};
