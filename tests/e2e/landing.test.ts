import { createServer, type Server } from 'node:http';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { buildAll } from '#api/cli/build.ts';
import { laptop, useBrowser } from '#tests/support/browser.ts';
import { accepted } from '#tests/support/life.ts';
import { makeDataset, makeDesk } from '#tests/support/record.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const app = useTestApp({ settings: { WEB_ROOT: 'dist/web' } });
const open = useBrowser();
let server: Server;
let base = '';
let accession = '';

beforeAll(async () => {
  await buildAll(() => undefined);
  const desk = await makeDesk(app());
  ({ accession } = await accepted(app(), desk, makeDataset(desk, null, { title: '"></script><script>alert(1)</script>' })));
  server = createServer(app().app);
  await new Promise<void>((done) => server.listen(0, '127.0.0.1', done));
  const address = server.address();
  base = `http://127.0.0.1:${typeof address === 'object' && address ? address.port : 0}`;
}, 300_000);
afterAll(() => {
  server.closeAllConnections();
  server.close();
});

describe('an entry’s page in Chromium', () => {
  it('keeps its JSON-LD under the content policy, has one title, and sheds the marks on the way to another page', async () => {
    const { page } = await open({ viewport: laptop });
    await page.goto(`${base}/entries/${accession}`);
    await page.getByRole('heading', { name: 'Cite' }).waitFor({ timeout: 120_000 });
    const data = JSON.parse((await page.locator('script[type="application/ld+json"]').textContent()) ?? '') as { '@type': string; alternateName: string };
    expect([data['@type'], data.alternateName]).toEqual(['Dataset', '"></script><script>alert(1)</script>']);
    expect(await page.locator('head title').count()).toBe(1);
    expect(await page.title()).toContain(`${accession}.1 | Evenbeam`);
    await page.getByRole('link', { name: 'Boards' }).first().click();
    await page.waitForURL(`${base}/boards`);
    expect(await page.locator('head [data-served]').count()).toBe(0);
  });

  it('copies a citation to the clipboard', async () => {
    const { page, context } = await open({ viewport: laptop });
    await context.grantPermissions(['clipboard-read', 'clipboard-write'], { origin: base });
    await page.goto(`${base}/entries/${accession}/v/1`);
    await page.getByRole('button', { name: 'Copy in APA style' }).press('Enter', { timeout: 120_000 });
    await page.getByText('Copied in APA style.').waitFor();
    expect(await page.evaluate(() => navigator.clipboard.readText())).toContain(`(${accession}.1) [Data set]. Evenbeam.`);
  });
});
