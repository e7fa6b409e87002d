import { createHmac } from 'node:crypto';
import supertest from 'supertest';
import { sessionCookieName } from '#api/middleware/session.ts';
import { newSecret } from '#api/lib/secrets.ts';
import type { TestApp } from './test-app.ts';

export type Method = 'get' | 'post' | 'put' | 'patch' | 'delete';
export type Client = (method: Method, path: string) => supertest.Test;

const signed = (value: string, secret: string): string => `s:${value}.${createHmac('sha256', secret).update(value).digest('base64').replace(/=+$/, '')}`;

/** Requests of nobody in particular. */
export const asStranger = ({ app }: TestApp): Client => (method, path) => supertest(app)[method](path);

/** Requests of a signed-in person: a session row and its cookie, with the token against forgery. */
export const signInAs = async ({ app, deps }: TestApp, user: { id: string }): Promise<Client> => {
  const sid = newSecret();
  const csrf = newSecret();
  const expires = new Date(Date.now() + 3_600_000);
  const sess = { cookie: { originalMaxAge: 3_600_000, expires, httpOnly: true, path: '/', sameSite: 'lax' }, passport: { user: user.id }, csrf };
  await deps.pool.query('insert into session (sid, sess, expire) values ($1, $2, $3)', [sid, sess, expires]);
  const cookie = `${sessionCookieName(deps.config.secureCookies)}=${encodeURIComponent(signed(sid, deps.config.sessionSecret))}`;
  return (method, path) => supertest(app)[method](path).set('cookie', cookie).set('x-csrf-token', csrf);
};

/** Requests of an organisation's script. */
export const withToken = ({ app }: TestApp, secret: string): Client => (method, path) => supertest(app)[method](path).set('authorization', `Bearer ${secret}`);
