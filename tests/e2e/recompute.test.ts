import { readFileSync } from 'node:fs';
import { beforeAll, describe, expect, it } from 'vitest';
import type { Page } from 'playwright-core';
import type { Dataset } from '#shared/formats/types.ts';
import { laptop, phone, useBrowser } from '#tests/support/browser.ts';
import { accepted } from '#tests/support/life.ts';
import { makeDataset, makeDesk, makeDrawnSheet, type Desk } from '#tests/support/record.ts';
import { useRegistry } from '#tests/support/registry.ts';
import type { TestApp } from '#tests/support/test-app.ts';
import { axeFindings } from './support/axe.ts';

const registry = useRegistry();
const open = useBrowser();
let one = '';
let pair = '';

/** What the helpers of the record need of an application; nothing here goes through its requests. */
const appOf = (): TestApp => ({ deps: registry().deps, clock: registry().deps.clock } as unknown as TestApp);

const pairDataset = (desk: Desk): Dataset => {
  const dataset = JSON.parse(readFileSync('schema/conformance/M1/pair/dataset.json', 'utf8')) as Dataset;
  return { ...dataset, runSheet: null, device: { provider: desk.organisation.name, name: desk.device.name, modality: 'superconducting' } };
};

beforeAll(async () => {
  const desk = await makeDesk(appOf());
  one = (await accepted(appOf(), desk, makeDataset(desk, await makeDrawnSheet(appOf(), desk)), { replicates: 2000 })).accession;
  pair = (await accepted(appOf(), desk, pairDataset(desk), { replicates: 100 })).accession;
}, 300_000);

const entryPage = async (page: Page, accession: string): Promise<void> => {
  await page.goto(`${registry().base}/entries/${accession}`);
  await page.getByRole('heading', { name: 'Recompute' }).waitFor();
};
const section = (page: Page) => page.locator('#recompute');
const verdict = (page: Page) => section(page).locator('.msg').first();
const finished = async (page: Page): Promise<string> => {
  await verdict(page).waitFor({ timeout: 150_000 });
  return (await verdict(page).textContent()) ?? '';
};

describe('recomputing an entry in Chromium', () => {
  it('finds a one-qubit entry identical to what the registry froze in Node, to the last digit', async () => {
    const { page } = await open();
    await entryPage(page, one);
    await page.getByRole('button', { name: 'Recompute here' }).press('Enter');
    expect(await finished(page)).toMatch(/^Agrees.*Identical to the last digit: all 23 figures, their intervals, the sealed check and every replicate\. Recomputed by this browser in [\d.]+ seconds\.$/s);
    // The focus has stayed on the button, which now offers another run.
    expect(await page.evaluate(() => document.activeElement?.textContent)).toBe('Recompute again');
    const rows = section(page).getByRole('table').first().getByRole('row');
    expect(await rows.count()).toBe(24);
    expect(await section(page).getByRole('table').first().getByRole('cell', { name: 'none', exact: true }).count()).toBe(23);
    await section(page).getByText('Files, digests, seal and the rest of the result').click();
    const record = section(page).getByRole('table').last();
    expect(await record.getByText('Differs').count()).toBe(0);
    expect(await record.getByText('Canonical bytes of the recomputed result').isVisible()).toBe(true);
    expect(await axeFindings(page)).toEqual([]);
  });

  it('finds a pair of 1,023 parameters identical too', async () => {
    const { page } = await open({ viewport: phone, colorScheme: 'dark' });
    await entryPage(page, pair);
    await page.getByRole('button', { name: 'Recompute here' }).click();
    expect(await finished(page)).toMatch(/Identical to the last digit/);
    expect(await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth)).toBe(0);
    expect(await axeFindings(page)).toEqual([]);
  });

  it('is cancelled at once, leaves nothing running, and can be begun again', async () => {
    const { page } = await open({ viewport: laptop });
    await entryPage(page, pair);
    await page.getByRole('button', { name: 'Recompute here' }).click();
    await section(page).getByRole('progressbar').waitFor();
    expect(page.workers()).toHaveLength(1);
    const gone = page.workers()[0]!.waitForEvent('close');
    await page.getByRole('button', { name: 'Cancel' }).click();
    await gone;
    expect(page.workers()).toHaveLength(0);
    expect(await section(page).getByText('Cancelled. Nothing was kept.').first().isVisible()).toBe(true);
    await page.getByRole('button', { name: 'Recompute here' }).click();
    await section(page).getByRole('progressbar').waitFor();
    await page.getByRole('button', { name: 'Cancel' }).click();
  });

  it('names the figure and the difference where the frozen result was changed', async () => {
    const { page } = await open();
    await page.route('**/v/1/result', async (route) => {
      const answer = await route.fetch();
      await route.fulfill({ response: answer, body: (await answer.text()).replace(/("key":"gate-loss","qubits":\[0\],"reason":null,"replicates":2000,"standardError":[^,]+,"value":)[^}]+/, '$10.0001') });
    });
    await entryPage(page, one);
    await page.getByRole('button', { name: 'Recompute here' }).click();
    expect(await finished(page)).toMatch(/^Differs.*1 of 23 figures differs from what was frozen\. A file does not fit the record\./s);
    expect(await section(page).locator('tr.unlike').first().textContent()).toMatch(/^Gate loss/);
  });

  it.each([
    ['the data was withdrawn', 410, 'withdrawn', /The data was withdrawn/, false],
    ['the seal is still closed', 404, 'not-found', /is not handed out.*embargo/s, true],
    ['the registry fails', 503, 'unavailable', /could not be read.*Try again in a minute/s, true],
  ])('says in words that %s, and offers a way on', async (_, status, code, words, again) => {
    const { page } = await open();
    await page.route('**/v/1/seal', (route) => route.fulfill({ status, contentType: 'application/problem+json', body: JSON.stringify({ type: `/problems/${code}`, title: 'x', status, detail: 'The registry says so.', code }) }));
    page.removeAllListeners('console');
    await entryPage(page, one);
    await page.getByRole('button', { name: 'Recompute here' }).click();
    expect(await finished(page)).toMatch(words);
    expect(await page.getByRole('button', { name: 'Try again' }).isEnabled()).toBe(again);
    if (!again) return;
    await page.unroute('**/v/1/seal');
    await page.getByRole('button', { name: 'Try again' }).click();
    await section(page).getByText('Agrees', { exact: true }).first().waitFor({ timeout: 150_000 });
  });

  it('says that the connection broke', async () => {
    const { page } = await open();
    await page.route('**/v/1/dataset', (route) => route.abort('connectionreset'));
    page.removeAllListeners('console');
    await entryPage(page, one);
    await page.getByRole('button', { name: 'Recompute here' }).click();
    expect(await finished(page)).toMatch(/The registry could not be reached.*nothing of yours is lost/s);
  });
});
