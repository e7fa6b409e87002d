import { Readable } from 'node:stream';
import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { AppError } from '#shared/errors/app-error.ts';
import { defineRoute } from '#api/lib/define-route.ts';
import { bytes, reply } from '#api/lib/reply.ts';
import { asStranger } from '#tests/support/sign-in.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const item = z.object({ depth: z.number().int().max(64), names: z.array(z.string().min(1)) });
const routes = [
  defineRoute({ method: 'post', path: '/api/t/items', action: 'public.read', summary: '-', body: item, response: item, handler: async ({ body }) => ({ ...body, secret: 'must not leave' }) }),
  defineRoute({ method: 'get', path: '/api/t/list', action: 'public.read', summary: '-', query: z.object({ limit: z.coerce.number().int().max(200) }), response: z.object({ limit: z.number() }), handler: async ({ query }) => query }),
  defineRoute({ method: 'get', path: '/api/t/fault', action: 'public.read', summary: '-', handler: async () => { throw new Error('password=hunter2 at /srv/secret.ts'); } }),
  defineRoute({ method: 'get', path: '/api/t/odd', action: 'public.read', summary: '-', response: item, handler: async () => ({ depth: 1.5, names: [] }) }),
  defineRoute({ method: 'post', path: '/api/t/raw', action: 'public.read', summary: '-', raw: { types: ['application/json'] }, response: z.object({ size: z.number(), encoding: z.string() }), handler: async ({ raw }) => {
    let size = 0;
    for await (const chunk of raw.stream) size += (chunk as Buffer).length;
    return reply({ size, encoding: raw.contentEncoding }, { status: 202, headers: { location: '/api/t/raw/1' } });
  } }),
  defineRoute({ method: 'get', path: '/api/t/stream', action: 'public.read', summary: '-', produces: ['application/octet-stream'], handler: async () => bytes(Readable.from([Buffer.from([1, 2]), Buffer.from([3])]), 'application/octet-stream', { headers: { etag: '"abc"' } }) }),
  defineRoute({ method: 'get', path: '/api/t/gone/:id', action: 'public.read', summary: '-', params: z.object({ id: z.string().regex(/^EVB-\d{6}$/, 'must look like EVB-000042') }), load: async (): Promise<{ thing: { owner: null } }> => { throw new AppError('not-found', 'There is no entry EVB-000001.'); }, handler: async () => undefined }),
];
const test = useTestApp({ routes, faultsExpected: true });
const ask = (...args: Parameters<ReturnType<typeof asStranger>>) => asStranger(test())(...args);

describe('a request', () => {
  it('with faults in its body is told all of them, each by pointer with the value given', async () => {
    const answer = await ask('post', '/api/t/items').send({ depth: 120, names: ['a', ''] }).expect(400);
    expect(answer.body.code).toBe('invalid-request');
    expect(answer.body.errors.map(({ pointer }: { pointer: string }) => pointer)).toEqual(['/depth', '/names/1']);
    expect(answer.body.errors[0].message).toContain('Given: 120.');
  });

  it('with a fault in its query or address is told which part', async () => {
    expect((await ask('get', '/api/t/list?limit=900').expect(400)).body.detail).toMatch(/^In the query, limit: .* Given: "900"\.$/);
    expect((await ask('get', '/api/t/gone/EVB-1').expect(400)).body.detail).toBe('In the address, id: must look like EVB-000042. Given: "EVB-1".');
    expect((await ask('get', '/api/t/gone/%E0%A4%A').expect(400)).body.code).toBe('invalid-request');
  });

  it('that is not JSON, not readable or too large is refused by its own code', async () => {
    expect((await ask('post', '/api/t/items').type('text/plain').send('x').expect(415)).body.code).toBe('unsupported-media-type');
    expect((await ask('post', '/api/t/items').type('application/json').send('{"depth": 1,').expect(400)).body.code).toBe('malformed-json');
    expect((await ask('post', '/api/t/items').send({ depth: 1, names: ['x'.repeat(300_000)] }).expect(413)).body.code).toBe('too-large');
  });

  it('for something that is not there gets the loader’s sentence', async () => {
    expect((await ask('get', '/api/t/gone/EVB-000001').expect(404)).body.detail).toBe('There is no entry EVB-000001.');
  });

  it('with a raw body is handed over as a stream, compressed or not', async () => {
    const answer = await ask('post', '/api/t/raw').type('application/json').set('content-encoding', 'gzip').send('12345').expect(202);
    expect(answer.body).toEqual({ size: 5, encoding: 'gzip' });
    expect(answer.headers.location).toBe('/api/t/raw/1');
    await ask('post', '/api/t/raw').type('text/csv').send('1').expect(415);
    await ask('post', '/api/t/raw').type('application/json').set('content-encoding', 'br').send('1').expect(415);
  });
});

describe('an answer', () => {
  it('carries only what its contract names', async () => {
    expect((await ask('post', '/api/t/items').send({ depth: 1, names: [] }).expect(200)).body).toEqual({ depth: 1, names: [] });
  });

  it('of an unforeseen fault tells a number and no inside detail', async () => {
    for (const path of ['/api/t/fault', '/api/t/odd']) {
      const answer = await ask('get', path).expect(500);
      expect(JSON.stringify(answer.body)).not.toMatch(/hunter2|secret|depth|stack/);
      expect(answer.body.detail).toContain(answer.headers['x-request-id']);
    }
  });

  it('in bytes arrives whole with its own headers', async () => {
    const answer = await ask('get', '/api/t/stream').buffer(true).expect(200);
    expect(Buffer.from(answer.body)).toEqual(Buffer.from([1, 2, 3]));
    expect(answer.headers.etag).toBe('"abc"');
  });

  it('to a public read may be used by a page of any site; OPTIONS names the methods', async () => {
    expect((await ask('get', '/api/t/list?limit=1')).headers['access-control-allow-origin']).toBe('*');
  });
});
