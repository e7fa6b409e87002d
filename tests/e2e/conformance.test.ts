import { createServer, type Server } from 'node:http';
import { readFileSync } from 'node:fs';
import type { AddressInfo } from 'node:net';
import { build } from 'esbuild';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { BrowserFindings } from '#tests/conformance/browser.ts';
import type { ConformanceIndex } from '#tests/conformance/vectors.ts';
import { useBrowser } from '#tests/support/browser.ts';

const open = useBrowser();
const root = 'schema/conformance/M1/';
let server: Server;

beforeAll(async () => {
  const { outputFiles } = await build({ entryPoints: ['tests/conformance/browser.ts'], bundle: true, write: false, format: 'esm', target: 'es2022', logLevel: 'silent' });
  const script = outputFiles[0]?.text ?? '';
  server = createServer((request, response) => {
    const path = request.url ?? '/';
    if (path === '/') response.setHeader('content-type', 'text/html').end('<!doctype html><link rel="icon" href="data:,"><script type="module" src="/run.js"></script>');
    else if (path === '/run.js') response.setHeader('content-type', 'text/javascript').end(script);
    else response.end(readFileSync(path.slice(1)));
  });
  await new Promise<void>((done) => server.listen(0, '127.0.0.1', done));
});
afterAll(async () => {
  server.closeAllConnections();
  await new Promise((done) => server.close(done));
});

describe('the method in Chromium', () => {
  it('gives every conformance vector the published bytes, replicates and sampler numbers that Node gives', async () => {
    const { page } = await open();
    await page.goto(`http://127.0.0.1:${(server.address() as AddressInfo).port}/`);
    await page.waitForFunction(() => 'runVectors' in globalThis);
    const found = await page.evaluate(() => (globalThis as unknown as { runVectors: () => Promise<BrowserFindings> }).runVectors());
    const index = JSON.parse(readFileSync(`${root}index.json`, 'utf8')) as ConformanceIndex;
    expect(found.vectors).toEqual(index.vectors.map(({ name, files, replicatesSha256 }) => ({ name, resultSha256: files.result.sha256, replicatesSha256 })));
    expect(found.sampler).toBe(readFileSync(`${root}${index.sampler.path}`, 'utf8'));
  });
});
