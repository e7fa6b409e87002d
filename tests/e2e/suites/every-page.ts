import AxeBuilder from '@axe-core/playwright';
import type { Browser } from 'playwright-core';
import { beforeAll, describe, expect, it } from 'vitest';
import { findAll, type Found } from '../support/found.ts';
import { pages, schemes, widths } from '../support/pages.ts';
import { settled } from '../support/settled.ts';
import type { Places } from '../support/visitor.ts';
import type { Open } from '../support/visitors.ts';

export const everyPage = (open: Open, browser: () => Browser, places: () => Places) => describe('every page, at 1440 and 390 px, light and dark', () => {
  let found: Found;
  beforeAll(async () => {
    found = await findAll(browser(), places());
  });

  it.each(pages.map((page) => [page.name, page] as const))('%s: axe finds nothing, nothing scrolls sideways, one heading of the first level', async (_name, { path, as, refusals = false }) => {
    const storageState = as ? found.sessions.get(as(found)) : undefined;
    const { page } = await open({ refusals, ...(storageState ? { storageState } : {}) });
    await page.goto(path(found));
    await settled(page);
    expect(await page.locator('h1').count()).toBe(1);
    expect(await page.title()).toMatch(/\S.*Evenbeam|Evenbeam/);
    for (const width of widths) {
      await page.setViewportSize(width);
      for (const colorScheme of schemes) {
        await page.emulateMedia({ colorScheme, reducedMotion: 'reduce' });
        const { violations } = await new AxeBuilder({ page }).analyze();
        const told = violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ target, failureSummary }) => `${target.join(' ')} (${failureSummary?.split('\n').at(1)?.trim()})`).join('; ')}`);
        expect(told, `${width.width} px, ${colorScheme}`).toEqual([]);
      }
      expect(await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth), `${width.width} px`).toBeLessThanOrEqual(0);
    }
  });
});
