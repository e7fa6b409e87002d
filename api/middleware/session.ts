import connectPgSimple from 'connect-pg-simple';
import type { RequestHandler } from 'express';
import session from 'express-session';
import type { Deps } from '#api/lib/deps.ts';

declare module 'express-session' {
  interface SessionData {
    passport?: { user?: string };
    /** Synchroniser token; made at sign-in. */
    csrf?: string;
    returnTo?: string;
  }
}

/** A session ends a week after sign-in, used or not. */
const lifeMs = 7 * 24 * 3600 * 1000;

export const sessionCookieName = (secure: boolean): string => (secure ? '__Host-evenbeam' : 'evenbeam');

/** Sessions in PostgreSQL; a cookie is set only once there is something to remember. */
export const sessions = ({ config, pool, log }: Pick<Deps, 'config' | 'pool' | 'log'>): RequestHandler => {
  const Store = connectPgSimple(session);
  return session({
    name: sessionCookieName(config.secureCookies),
    secret: config.sessionSecret,
    resave: false,
    saveUninitialized: false,
    proxy: config.trustProxy > 0,
    store: new Store({ pool, tableName: 'session', disableTouch: true, pruneSessionInterval: false, errorLog: (...faults: unknown[]) => log.error({ faults }, 'session store') }),
    cookie: { httpOnly: true, sameSite: 'lax', secure: config.secureCookies, path: '/', maxAge: lifeMs },
  });
};
