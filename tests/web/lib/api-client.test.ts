import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { z } from 'zod';
import { apiDo, apiGet, apiSend, forgetCsrfToken } from '#web/lib/api-client.ts';
import { ApiError, asApiError } from '#web/lib/api-error.ts';
import { contributorFixture } from '#tests/support/fixtures/session.ts';

const shape = z.object({ n: z.number() });
const json = (body: unknown, status = 200): Response => new Response(JSON.stringify(body), { status, headers: { 'content-type': 'application/json' } });
const problem = (status: number, code: string, more = {}) => json({ type: `/problems/${code}`, title: 'Title', status, detail: 'What is wrong.', code, ...more }, status);

let calls: { path: string; init: RequestInit }[] = [];
let answers: (Response | Error)[] = [];
const headersOf = (i: number): Record<string, string> => (calls[i]?.init.headers ?? {}) as Record<string, string>;

beforeEach(() => {
  calls = [];
  answers = [];
  forgetCsrfToken();
  vi.stubGlobal('fetch', vi.fn((path: string, init: RequestInit) => {
    calls.push({ path, init });
    const answer = answers.shift();
    return answer instanceof Response ? Promise.resolve(answer) : Promise.reject(answer ?? new Error('no answer prepared'));
  }));
});
afterEach(() => { vi.unstubAllGlobals(); });

const failing = async (promise: Promise<unknown>): Promise<ApiError> => {
  const error: unknown = await promise.then(() => null, (e: unknown) => e);
  expect(error).toBeInstanceOf(ApiError);
  return asApiError(error);
};

describe('api client', () => {
  it('leaves out empty query fields and checks the answer against its contract', async () => {
    answers = [json({ n: 1 })];
    expect(await apiGet('/api/v1/x', shape, { query: { a: 'b c', none: undefined, empty: '' } })).toEqual({ n: 1 });
    expect(calls[0]?.path).toBe('/api/v1/x?a=b+c');
  });

  it('turns an RFC 9457 problem into a typed error with its fields, help page and reference', async () => {
    answers = [problem(422, 'unusable-file', { instance: '7f3a-19c2', errors: [{ pointer: '/licence', message: 'is not a known licence id' }] })];
    const error = await failing(apiGet('/api/v1/x', shape));
    expect(error).toMatchObject({ fault: 'problem', status: 422, code: 'unusable-file', title: 'Title', message: 'What is wrong.', help: '/problems/unusable-file', reference: '7f3a-19c2' });
    expect(error.fields).toEqual([{ pointer: '/licence', message: 'is not a known licence id' }]);
  });

  it('has words of its own where a failed answer is no problem document', async () => {
    answers = [new Response('<html>bad gateway</html>', { status: 502 })];
    expect(await failing(apiGet('/api/v1/x', shape))).toMatchObject({ fault: 'problem', status: 502, code: 'http-502' });
  });

  it('names the place where an answer breaks its contract', async () => {
    answers = [json({ n: 'one' })];
    const error = await failing(apiGet('/api/v1/x', shape));
    expect(error.fault).toBe('contract');
    expect(error.message).toContain('/api/v1/x: n,');
    answers = [new Response('not json', { status: 200 })];
    expect((await failing(apiGet('/api/v1/x', shape))).message).toContain('not JSON');
  });

  it('says so when the registry cannot be reached', async () => {
    answers = [new TypeError('Failed to fetch')];
    expect(await failing(apiGet('/api/v1/x', shape))).toMatchObject({ fault: 'offline', status: 0 });
  });

  it('says so when there is no answer in time', async () => {
    vi.stubGlobal('fetch', (_: string, init: RequestInit) => new Promise((_resolve, reject) => { init.signal?.addEventListener('abort', () => reject(init.signal?.reason)); }));
    const error = await failing(apiGet('/api/v1/x', shape, { timeoutMs: 20 }));
    expect(error.fault).toBe('timeout');
    expect(error.message).toMatch(/^The registry did not answer within \S+ seconds\. Nothing of yours is lost\.$/);
  });

  it('passes on a caller’s own giving up; that is no fault', async () => {
    const gone = new AbortController();
    gone.abort();
    answers = [new DOMException('gone', 'AbortError')];
    await expect(apiGet('/api/v1/x', shape, { signal: gone.signal })).rejects.toMatchObject({ name: 'AbortError' });
  });

  it('sends the session’s token, asked for once, and the idempotency key with a change', async () => {
    answers = [json(contributorFixture), json({ n: 1 }), new Response(null, { status: 204 })];
    await apiSend('POST', '/api/v1/x', shape, { json: { a: 1 }, idempotencyKey: 'key-1' });
    await apiDo('DELETE', '/api/v1/x');
    expect(calls.map((c) => c.path)).toEqual(['/api/v1/me', '/api/v1/x', '/api/v1/x']);
    expect(headersOf(1)).toMatchObject({ 'x-csrf-token': 'csrf-contributor', 'content-type': 'application/json', 'idempotency-key': 'key-1' });
    expect(calls[1]?.init.body).toBe('{"a":1}');
  });

  it('fetches a new token and repeats once where the old one is refused', async () => {
    answers = [json(contributorFixture), problem(403, 'origin-refused'), json({ ...contributorFixture, csrfToken: 'second' }), json({ n: 2 })];
    expect(await apiSend('POST', '/api/v1/x', shape)).toEqual({ n: 2 });
    expect(headersOf(3)['x-csrf-token']).toBe('second');
  });

  it('does not repeat a change that is refused for another reason', async () => {
    answers = [json(contributorFixture), problem(409, 'wrong-state')];
    expect(await failing(apiSend('POST', '/api/v1/x', shape))).toMatchObject({ code: 'wrong-state' });
    expect(calls).toHaveLength(2);
  });
});
