import { gzipSync } from 'node:zlib';
import AxeBuilder from '@axe-core/playwright';
import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import type { Dataset, RunSheet } from '#shared/formats/types.ts';
import { phone, signInThroughChooser, useBrowser } from '#tests/support/browser.ts';
import { takeCounts } from '#tests/support/record.ts';
import { useRegistry } from '#tests/support/registry.ts';

const registry = useRegistry();
const visit = useBrowser();
const patience = { timeout: 90_000 };

/** The file a laboratory would send back: the sheet's circuits with counts of a device of 0.2 % loss a gate. */
const datasetOf = (sheet: RunSheet, sha256: string, seed: number): Dataset => ({
  format: 'evenbeam.dataset', formatVersion: '1.0.0', title: 'Spring run, left half', gateClass: sheet.gateClass, runSheet: { id: sheet.id ?? '', sha256 },
  device: { provider: sheet.device?.provider ?? '', name: sheet.device?.name ?? '', modality: 'superconducting' }, register: sheet.register, gates: sheet.gates,
  patches: sheet.patches.map(({ qubits, circuits }) => ({ qubits, circuits: takeCounts(circuits, sheet.shots, seed) })),
  acquisition: { startedAt: '2026-05-04T08:00:00Z', endedAt: '2026-05-04T09:10:00Z', software: 'in-house 1.4' }, contributors: [{ name: 'A. Example' }], licence: 'CC-BY-4.0',
});

const faultsOf = async (page: Page): Promise<string[]> => (await new AxeBuilder({ page }).analyze()).violations.map((v) => `${v.id}: ${v.nodes.map((n) => n.target.join(' ')).join(', ')}`);
const overflow = (page: Page): Promise<number> => page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);

/** Adds a device on the planner, draws a sheet for it and gives the sheet as the page tells it. */
const drawSheet = async (page: Page, device: string): Promise<{ id: string; sheet: RunSheet; sha256: string }> => {
  await page.goto(`${registry().base}/desk/run-sheets/new`);
  const add = page.getByRole('button', { name: 'Add a device' });
  await page.getByLabel('Gate class').waitFor();
  if (await add.isVisible()) await add.click();
  await page.getByLabel('Name', { exact: true }).fill(device);
  await page.getByLabel('Name', { exact: true }).press('Enter');
  await expect.poll(() => page.getByLabel('Device', { exact: true }).locator('option:checked').textContent(), patience).toBe(device);
  await page.getByLabel('Qubit').fill('q3');
  await page.getByLabel('Circuits').fill('200');
  await page.getByLabel('Shots each').fill('500');
  await page.getByText(/uncertain by/).waitFor(patience);
  await page.getByRole('button', { name: 'Draw this run sheet' }).click();
  await page.getByRole('link', { name: 'Download the sheet, JSON' }).waitFor(patience);
  const id = new URL(page.url()).pathname.split('/').at(-1) ?? '';
  const view = (await (await page.request.get(`${registry().base}/api/v1/run-sheets/${id}`)).json()) as { file: string; sheetSha256: string };
  return { id, sheet: (await (await page.request.get(registry().base + view.file)).json()) as RunSheet, sha256: view.sheetSha256 };
};

describe('from a plan to an entry', () => {
  it('is walked by a contributor and a curator through the screens alone', async () => {
    const { page } = await visit();
    await signInThroughChooser(page, registry().base, 'Ida Marsh', '/desk');
    await page.getByRole('heading', { name: 'Desk', level: 1 }).waitFor();
    const { id: sheetId, sheet, sha256 } = await drawSheet(page, 'Meadow-77');
    expect(await faultsOf(page)).toEqual([]);

    await page.getByRole('link', { name: 'Submit its counts' }).click();
    const bytes = gzipSync(JSON.stringify(datasetOf(sheet, sha256, 7)));
    await page.locator('input[type=file]').setInputFiles({ name: 'meadow-77 spring.json.gz', mimeType: 'application/gzip', buffer: bytes });
    await page.getByText('follows the format. Nothing has been sent yet.').waitFor(patience);
    await page.getByRole('button', { name: 'Submit this dataset' }).click();
    await page.waitForURL(/\/desk\/submissions\/S-\d+$/, patience);
    const submission = new URL(page.url()).pathname.split('/').at(-1) ?? '';
    await page.getByRole('heading', { name: 'Preview' }).waitFor(patience);
    expect(await page.getByRole('row', { name: /^Retained signal, depth 16/ }).textContent()).toMatch(/0\.9\d+ ?0\.\d+ to [01]\.\d+/);

    const send = page.getByRole('button', { name: 'Send to review' });
    expect(await send.isDisabled()).toBe(true);
    await page.getByText('Fill in how the device was reached and the interests first.').waitFor();
    await page.getByLabel('How the device was reached').fill('own device, laboratory access');
    await page.getByLabel('Interests').fill('employed by the provider');
    await page.getByRole('button', { name: 'Save the record' }).click();
    await page.getByText('Saved.').waitFor(patience);
    expect(await faultsOf(page)).toEqual([]);
    await send.click();
    await page.getByRole('button', { name: 'Save the record' }).waitFor({ state: 'detached', ...patience });

    const curator = (await visit()).page;
    await signInThroughChooser(curator, registry().base, 'Ruth Holloway', '/review');
    await curator.getByRole('link', { name: new RegExp(submission) }).click();
    await curator.getByRole('heading', { level: 1, name: 'Spring run, left half' }).waitFor(patience);
    await curator.getByRole('button', { name: 'Claim this case' }).click();
    await curator.getByRole('radio', { name: /^Accept/ }).check();
    await curator.getByRole('textbox', { name: 'Reason' }).fill('Sound throughout.');
    await curator.getByRole('checkbox', { name: /^I have no tie/ }).check();
    expect(await faultsOf(curator)).toEqual([]);
    await curator.getByRole('button', { name: 'Accept and freeze' }).click();
    await curator.getByText(`${submission} is decided`).waitFor(patience);

    await page.goto(`${registry().base}/desk/submissions/${submission}`);
    await page.getByRole('link', { name: /^EVB-\d+\.1$/ }).waitFor(patience);
    await page.goto(`${registry().base}/desk/run-sheets/${sheetId}`);
    await page.getByRole('link', { name: `Open its submission ${submission}` }).waitFor(patience);
  });

  it('tells the faults of a file with their places before anything is sent', async () => {
    const { page } = await visit({ viewport: phone });
    await signInThroughChooser(page, registry().base, 'Ida Marsh', '/desk/submissions/new');
    const sent: string[] = [];
    page.on('request', (request) => { if (request.method() === 'POST') sent.push(request.url()); });
    await page.locator('input[type=file]').setInputFiles({ name: 'broken.json', mimeType: 'application/json', buffer: Buffer.from('{"format":"evenbeam.dataset","formatVersion":"1.0.0"}') });
    await page.getByText('Nothing was sent.').waitFor(patience);
    expect(await page.getByRole('row').count()).toBeGreaterThan(5);
    expect(sent).toEqual([]);
    expect(await overflow(page)).toBeLessThanOrEqual(0);
    expect(await faultsOf(page)).toEqual([]);
  });
});
