import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { useRunningRegistry } from './support/registry.ts';
import { steward } from './support/found.ts';
import { useVisitors } from './support/visitors.ts';

const registry = useRunningRegistry();
const { open } = useVisitors(registry);
const patience = { timeout: 240_000 };

const state = (page: Page, words: RegExp): Promise<void> => page.getByRole('status').filter({ hasText: words }).first().waitFor(patience);

describe('a campaign in a running registry', () => {
  it('is started, paused and resumed by a steward; afterwards the board and the entries show the draft beside the frozen figures', async () => {
    const { page } = await open({ as: steward });
    await page.goto('/');
    await page.getByRole('link', { name: 'Office', exact: true }).first().click();
    await page.getByRole('button', { name: 'Start a campaign with M2' }).click();
    await page.getByRole('button', { name: 'Yes, start it' }).click();
    await page.waitForURL(/\/steward\/campaigns\/C-\d+$/, patience);
    await page.getByRole('button', { name: 'Pause' }).click();
    await state(page, /^Paused\. Nothing is handed out/);
    expect(await page.getByText(/^\d+ of \d+ estimated, (?:\d+ (?:failed|left out), )?\d+ waiting\.$/).count()).toBe(1);
    await page.getByRole('button', { name: 'Go on' }).click();
    await state(page, /^Finished\./);
    const total = Number(/^(\d+) of \1 estimated/.exec((await page.getByText(/^\d+ of \d+ estimated/).first().textContent()) ?? '')?.[1]);
    expect(total).toBeGreaterThan(3);

    await page.goto('/boards/quarter-turn-1q/1');
    const official = await page.getByRole('table').first().textContent();
    await page.getByLabel('Method version').selectOption('M2');
    await page.waitForURL(/method=M2/);
    await page.getByText('Draft version, not the registry’s figures; nothing is ranked by it.').waitFor(patience);
    await expect.poll(() => page.getByRole('table').first().textContent(), patience).not.toBe(official);

    const { items } = (await (await page.request.get('/api/v1/entries?gateClass=quarter-turn-1q/1')).json()) as { items: { accession: string; version: number }[] };
    await page.goto(`/entries/${items[0]?.accession}`);
    const versions = page.getByRole('table', { name: 'Retained signal at depth 16 by method version' });
    await versions.getByRole('rowheader').filter({ hasText: 'M2Draft, added later' }).waitFor(patience);
    expect(await versions.getByRole('row').count()).toBe(3);
    expect(((await (await page.request.get('/api/health')).json()) as { methods: string[] }).methods).toEqual(['M1']);
  }, 600_000);
});
