import { createServer, type Server } from 'node:http';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { User } from '#api/entities/user.ts';
import { createApp } from '#api/app.ts';
import { configFrom } from '#api/config/config.ts';
import { freePort } from '#api/cli/free-port.ts';
import { startGoogleStandIn, type GoogleStandIn } from '#api/fakes/google/start.ts';
import { inventedPeople } from '#api/fakes/people.ts';
import { registerPeople } from '#api/fakes/register-people.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const test = useTestApp();
const credentials = { clientId: 'evenbeam-local', clientSecret: 'local-only' };
let standIn: GoogleStandIn;
let server: Server;
let base = '';

beforeAll(async () => {
  const port = await freePort();
  base = `http://127.0.0.1:${port}`;
  standIn = await startGoogleStandIn({ ...credentials, publicUrl: base, redirectUri: `${base}/auth/google/callback` });
  const { deps } = test();
  const google = { ...deps.config.google, authorizationUrl: standIn.authorizationUrl, tokenUrl: standIn.tokenUrl, userinfoUrl: standIn.userinfoUrl };
  server = createServer(createApp({ ...deps, config: { ...deps.config, publicUrl: base, google } }));
  await new Promise<void>((resolve) => server.listen(port, '127.0.0.1', resolve));
  await registerPeople(deps.orm.em.fork(), deps.clock.now());
});
afterAll(async () => {
  await standIn.stop();
  server.closeAllConnections();
  await new Promise((resolve) => server.close(resolve));
});

/** A browser's cookie jar, as far as this test needs one. */
const browser = () => {
  let cookie = '';
  return async (url: string, init: RequestInit = {}): Promise<Response> => {
    const answer = await fetch(url, { ...init, redirect: 'manual', headers: { ...(cookie && url.startsWith(base) ? { cookie } : {}) } });
    const set = answer.headers.get('set-cookie');
    if (set && url.startsWith(base)) cookie = set.split(';')[0] ?? '';
    return answer;
  };
};

const fieldsOf = (html: string): Record<string, string> =>
  Object.fromEntries([...html.matchAll(/name="([^"]+)" value="([^"]*)">/g)].map(([, name, value]) => [name ?? '', (value ?? '').replaceAll('&amp;', '&')]));

const choose = async (go: ReturnType<typeof browser>, subject: string, returnTo = '/desk'): Promise<string> => {
  const start = await go(`${base}/auth/google?returnTo=${encodeURIComponent(returnTo)}`);
  const chooser = await go(start.headers.get('location') ?? '');
  const fields = fieldsOf(await chooser.text());
  delete fields.subject;
  const chosen = await go(standIn.authorizationUrl, { method: 'POST', body: new URLSearchParams({ ...fields, subject }) });
  return chosen.headers.get('location') ?? '';
};

describe('sign-in through the stand-in', () => {
  it('brings a person back where they were, as themselves, with a new session id', async () => {
    const go = browser();
    const callback = await choose(go, inventedPeople[0]?.subject ?? '', '/submissions/S-000001?tab=checks');
    const landed = await go(callback);
    expect(landed.status).toBe(303);
    expect(landed.headers.get('location')).toBe('/submissions/S-000001?tab=checks');
    expect(landed.headers.get('set-cookie')).toMatch(/^evenbeam=.*HttpOnly; SameSite=Lax$/);
    const me = (await (await go(`${base}/api/v1/me`)).json()) as { user: { name: string }; organisations: { name: string }[]; csrfToken: string };
    expect(me.user.name).toBe('Ida Marsh');
    expect(me.organisations.map(({ name }) => name)).toEqual(['Larkspur Quantics']);
    expect(me.csrfToken).toHaveLength(43);
  });

  it('takes a code once, and only in the browser that began', async () => {
    const [mine, theirs] = [browser(), browser()];
    const callback = await choose(mine, inventedPeople[1]?.subject ?? '');
    expect((await theirs(callback)).status).toBe(401);
    expect((await mine(callback)).status).toBe(303);
    expect((await mine(callback)).status).toBe(401);
  });

  it('returns nobody to another site', async () => {
    for (const elsewhere of ['https://elsewhere.example/', '//elsewhere.example', '/\\elsewhere.example', '/auth/sign-out']) {
      const go = browser();
      const landed = await go(await choose(go, inventedPeople[2]?.subject ?? '', elsewhere));
      expect(landed.headers.get('location')).toBe('/');
    }
  });

  it('shows a page instead of sending a code to an address that is not the registry’s', async () => {
    const go = browser();
    const start = new URL((await go(`${base}/auth/google`)).headers.get('location') ?? '');
    start.searchParams.set('redirect_uri', 'http://127.0.0.1:1/steal');
    const answer = await go(start.href);
    expect(answer.status).toBe(400);
    expect(await answer.text()).toContain('not to http://127.0.0.1:1/steal');
  });

  it('refuses a code without the verifier that its challenge was made from', async () => {
    const go = browser();
    const callback = new URL(await choose(go, inventedPeople[0]?.subject ?? ''));
    const body = new URLSearchParams({ grant_type: 'authorization_code', code: callback.searchParams.get('code') ?? '', redirect_uri: `${base}/auth/google/callback`, client_id: credentials.clientId, client_secret: credentials.clientSecret, code_verifier: 'x'.repeat(43) });
    expect(await (await fetch(standIn.tokenUrl, { method: 'POST', body })).json()).toEqual({ error: 'invalid_grant' });
  });

  it('does not start beside real credentials or under a public address', async () => {
    const plan = { ...credentials, redirectUri: 'x', publicUrl: base };
    await expect(startGoogleStandIn({ ...plan, realClientId: '123.apps' })).rejects.toThrow('GOOGLE_CLIENT_ID is set');
    await expect(startGoogleStandIn({ ...plan, publicUrl: 'https://evenbeam.example' })).rejects.toThrow('public address');
    const settings = { DATABASE_URL: 'postgres://a@127.0.0.1/b', SESSION_SECRET: 'x'.repeat(32), LOG_SIGNING_KEY: 'x', GOOGLE_CLIENT_ID: 'a', GOOGLE_CLIENT_SECRET: 'b', SMTP_URL: 'smtp://127.0.0.1', PUBLIC_URL: 'https://evenbeam.example', GOOGLE_AUTHORIZATION_URL: standIn.authorizationUrl };
    expect(() => configFrom(settings)).toThrow('local stand-in');
  });

  it('registers invented people once', async () => {
    const em = test().deps.orm.em.fork();
    const before = await em.count(User);
    await registerPeople(em.fork(), new Date());
    expect(await em.fork().count(User)).toBe(before);
  });
});
