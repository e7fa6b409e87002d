import { mkdirSync, mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { asStranger } from '#tests/support/sign-in.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const webRoot = mkdtempSync(join(tmpdir(), 'evenbeam-web-'));
mkdirSync(join(webRoot, 'assets'));
writeFileSync(join(webRoot, 'index.html'), '<!doctype html><title>the page</title>');
writeFileSync(join(webRoot, 'assets', 'main-abc123.js'), 'export {};');
const test = useTestApp({ settings: { RATE_LIMITS: '1', WEB_ROOT: webRoot, PUBLIC_URL: 'https://evenbeam.example', GOOGLE_AUTHORIZATION_URL: 'https://accounts.example/authorize' } });
const ask = (...args: Parameters<ReturnType<typeof asStranger>>) => asStranger(test())(...args);

describe('the built client', () => {
  it('answers every page address, help pages and /schema included, and is asked for anew each time', async () => {
    for (const path of ['/', '/boards/quarter-turn-1q/1', '/problems/not-found', '/schema']) {
      const answer = await ask('get', path).set('accept', 'text/html').expect(200);
      expect(answer.text).toContain('the page');
      expect(answer.headers['cache-control']).toBe('no-cache');
    }
  });

  it('answers an address that no page has with the page too, which says so, and with status 404', async () => {
    for (const path of ['/no-such-page', '/schema/dataset', '/boards/quarter-turn-1q', '/wp-login.php']) expect((await ask('get', path).set('accept', 'text/html').expect(404)).text, path).toContain('the page');
  });

  it('keeps hashed files for a year, and answers 404 for one that is gone', async () => {
    expect((await ask('get', '/assets/main-abc123.js').expect(200)).headers['cache-control']).toBe('public, max-age=31536000, immutable');
    await ask('get', '/assets/main-old.js').set('accept', '*/*').expect(404);
    await ask('get', '/schema/nothing/1.0.0.schema.json').set('accept', 'text/html').expect(404);
  });
});

describe('under https', () => {
  it('asks for strict transport and binds the session cookie to the host', async () => {
    const answer = await ask('get', '/auth/google').set('host', 'evenbeam.example').set('x-forwarded-proto', 'https');
    expect(answer.headers['strict-transport-security']).toContain('max-age=63072000');
    // Without a trusted proxy the connection does not count as secure, so no cookie is given away.
    expect(answer.headers['set-cookie']).toBeUndefined();
  });
});

describe('the allowance', () => {
  it('is announced with every answer and, once used up, refused with Retry-After', async () => {
    const first = await ask('get', '/auth/google').set('host', 'evenbeam.example');
    expect(first.headers.ratelimit).toBeDefined();
    let answer = first;
    for (let i = 0; i < 70 && answer.status !== 429; i += 1) answer = await ask('get', '/auth/google').set('host', 'evenbeam.example');
    expect(answer.status).toBe(429);
    expect(answer.body.code).toBe('rate-limited');
    expect(Number(answer.headers['retry-after'])).toBeGreaterThan(0);
  });
});
