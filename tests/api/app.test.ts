import { describe, expect, it } from 'vitest';
import { asStranger } from '#tests/support/sign-in.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const test = useTestApp();

describe('the web application', () => {
  it('answers the health question with database, queue and methods', async () => {
    const answer = await asStranger(test())('get', '/api/health').expect(200);
    expect(answer.body).toEqual({ status: 'ok', database: 'ok', queue: 'ok', methods: ['M1'] });
  });

  it('allows no inline script, no framing, and names no server software', async () => {
    const { headers } = await asStranger(test())('get', '/api/health');
    // WebAssembly alone, for the method's kernels: no inline script, no evaluated text.
    expect(headers['content-security-policy']).toContain("script-src 'self' 'wasm-unsafe-eval';");
    expect(headers['content-security-policy']).not.toContain("'unsafe-");
    expect(headers['content-security-policy']).toContain("frame-ancestors 'none'");
    expect(headers['x-powered-by']).toBeUndefined();
    expect(headers['x-request-id']).toMatch(/^[0-9a-f-]{36}$/);
  });

  it('answers an unknown address with problem details whose type is a help page', async () => {
    const answer = await asStranger(test())('get', '/api/v1/nothing?x=1').expect(404);
    expect(answer.headers['content-type']).toContain('application/problem+json');
    expect(answer.body).toMatchObject({ type: '/problems/not-found', title: expect.any(String), status: 404, detail: 'There is nothing at /api/v1/nothing.', instance: '/api/v1/nothing' });
  });

  it('answers a method that an address does not take with 405 and Allow', async () => {
    const answer = await asStranger(test())('delete', '/api/health').expect(405);
    expect(answer.headers.allow).toBe('GET');
  });

  it('serves published schemas for a year to any site, with their own media type, and nothing outside', async () => {
    const answer = await asStranger(test())('get', '/schema/gate-class/quarter-turn-1q/1.json').expect(200);
    expect(answer.headers).toMatchObject({ 'access-control-allow-origin': '*', 'cache-control': 'public, max-age=31536000, immutable' });
    expect(answer.body.id).toBe('quarter-turn-1q/1');
    await asStranger(test())('get', '/schema/../package.json').expect(404);
    await asStranger(test())('get', '/schema/%2e%2e/package.json').expect(404);
  });
});
