import { Router, type RequestHandler } from 'express';
import { AppError } from '#shared/errors/app-error.ts';
import type { Deps } from '#api/lib/deps.ts';
import { newSecret } from '#api/lib/secrets.ts';
import { callbackPath, googlePassport } from './google-strategy.ts';

/** A path within the registry, or its first page: never another site. */
export const safeReturn = (wanted: unknown): string =>
  typeof wanted === 'string' && /^\/(?![/\\])[^\s\\]*$/.test(wanted) && wanted.length < 1000 && !wanted.startsWith('/auth/') ? wanted : '/';

/**
 * The two browser addresses of signing in. They answer with redirects, so they stand outside the route list;
 * everything else a session can do is in routes.ts.
 */
export const signInPages = (deps: Deps, limit: RequestHandler): Router => {
  const own = googlePassport(deps);
  const router = Router();
  const home = new URL(deps.config.publicUrl);
  router.get('/auth/google', limit, (request, response, next) => {
    // The session cookie must be set on the host that the sign-in service will send the browser back to.
    if (request.get('host') !== home.host) return response.redirect(303, deps.config.publicUrl + request.originalUrl);
    request.session.returnTo = safeReturn(request.query.returnTo);
    own.authenticate('google')(request, response, next);
  });
  router.get(callbackPath, limit, (request, response, next) => {
    const returnTo = safeReturn(request.session.returnTo);
    own.authenticate('google', (fault: unknown, user: { id: string } | false | null) => {
      if (fault) return next(fault instanceof AppError ? fault : new AppError('unavailable', 'The sign-in service did not answer as it should. Sign in again.', [], { cause: fault }));
      if (!user) return next(new AppError('not-signed-in', 'Sign-in was broken off, or took too long. Start again from the registry.'));
      request.logIn(user, (error: unknown) => {
        if (error) return next(error);
        request.session.csrf = newSecret();
        request.session.save((failed: unknown) => (failed ? next(failed) : response.redirect(303, returnTo)));
      });
    })(request, response, next);
  });
  return router;
};
