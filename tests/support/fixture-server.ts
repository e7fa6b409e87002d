import { readFile } from 'node:fs/promises';
import { createServer, type Server } from 'node:http';
import { extname, join, normalize } from 'node:path';
import { boardFixture, boardListFixture, differenceFixture, emptyBoardFixture } from './fixtures/boards.ts';
import { citationFixture } from './fixtures/citations.ts';
import { deviceFixture, deviceListFixture } from './fixtures/devices.ts';
import { entryFixture, entryListFixture } from './fixtures/entries.ts';
import { versionResultsFixture } from './fixtures/method-results.ts';
import { opinionsFixture } from './fixtures/opinions.ts';
import { visitorFixture } from './fixtures/session.ts';

const types: Readonly<Record<string, string>> = { '.html': 'text/html; charset=utf-8', '.js': 'text/javascript', '.css': 'text/css', '.svg': 'image/svg+xml', '.woff2': 'font/woff2', '.woff': 'font/woff', '.json': 'application/json' };

/** As strict as the registry's own policy: nothing from elsewhere, no inline script. */
const policy = "default-src 'self'; script-src 'self' 'wasm-unsafe-eval'; style-src 'self'; img-src 'self' data:; font-src 'self'; connect-src 'self'; worker-src 'self'; object-src 'none'; base-uri 'none'; frame-ancestors 'none'";

export const publicAnswers = (path: string, search: URLSearchParams): unknown => {
  if (path === '/api/v1/me') return visitorFixture;
  if (path === '/api/v1/boards') return boardListFixture;
  if (path === '/api/v1/boards/quarter-turn-1q/1') return search.get('modality') === 'photonic' && search.get('within') === '30' ? emptyBoardFixture : { ...boardFixture, figure: search.get('figure') ?? boardFixture.figure };
  if (path === '/api/v1/boards/quarter-turn-1q/1/difference') return differenceFixture;
  if (path === '/api/v1/entries') return search.get('q') === 'nothing' ? { items: [], nextCursor: null } : entryListFixture;
  if (/^\/api\/v1\/entries\/EVB-000042\/v\/\d+\/results$/.test(path)) return versionResultsFixture;
  if (/^\/api\/v1\/entries\/EVB-000042\/v\/\d+\/citation$/.test(path)) return citationFixture;
  if (/^\/api\/v1\/entries\/EVB-000042\/v\/\d+\/opinions$/.test(path)) return opinionsFixture;
  if (path.startsWith('/api/v1/entries/EVB-000042')) return path.endsWith('/v/1') ? { ...entryFixture, version: 1, state: 'superseded' } : entryFixture;
  if (path === '/api/v1/devices') return deviceListFixture;
  if (path === '/api/v1/devices/meadow-5') return deviceFixture;
  return null;
};

/** Serves the built client with answers made from the contracts: for looking at pages without a database. Not shipped. */
export async function startFixtureServer(webRoot: string, answers = publicAnswers): Promise<{ server: Server; origin: string }> {
  const page = await readFile(join(webRoot, 'index.html'));
  const server = createServer((request, response) => {
    const url = new URL(request.url ?? '/', 'http://localhost');
    const send = (status: number, type: string, body: Buffer | string): void => { response.writeHead(status, { 'content-type': type, 'content-security-policy': policy }).end(body); };
    if (url.pathname.startsWith('/api/')) {
      const body = answers(url.pathname, url.searchParams);
      if (body === null) send(404, 'application/problem+json', JSON.stringify({ type: '/problems/not-found', title: 'There is nothing here', status: 404, detail: `No thing has the address ${url.pathname}.`, code: 'not-found' }));
      else send(200, 'application/json', JSON.stringify(body));
      return;
    }
    readFile(join(webRoot, normalize(url.pathname))).then((file) => send(200, types[extname(url.pathname)] ?? 'application/octet-stream', file), () => send(200, types['.html'] ?? '', page));
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const address = server.address();
  return { server, origin: `http://127.0.0.1:${typeof address === 'object' && address ? address.port : 0}` };
}
