import type { Browser } from 'playwright-core';
import { beforeAll, describe, expect, it } from 'vitest';
import { axeFindings } from '../support/axe.ts';
import { findAll, type Found } from '../support/found.ts';
import { pages, schemes, widths } from '../support/pages.ts';
import { settled } from '../support/settled.ts';
import type { Places, Visitor } from '../support/visitor.ts';
import type { Open } from '../support/visitors.ts';

export const everyPage = (open: Open, browser: () => Browser, places: () => Places) => describe('every page, at 1440 and 390 px, light and dark', () => {
  let found: Found;
  /** One for each person, and one of those who must meet no refusal: opening a browser's profile anew takes longer than a page. */
  const visitors = new Map<string, Visitor>();
  const visitorFor = async (person: string | null, refusals: boolean): Promise<Visitor> => {
    const key = `${person ?? ''}/${refusals}`;
    const storageState = person === null ? undefined : found.sessions.get(person);
    const visitor = visitors.get(key) ?? (await open({ lasting: true, refusals, ...(storageState ? { storageState } : {}) }));
    visitors.set(key, visitor);
    return visitor;
  };

  beforeAll(async () => {
    found = await findAll(browser(), places());
  });

  it.each(pages.map((page) => [page.name, page] as const))('%s: axe finds nothing, nothing scrolls sideways, one heading of the first level', async (_name, { path, as, refusals = false }) => {
    const { page } = await visitorFor(as ? as(found) : null, refusals);
    await page.setViewportSize(widths[0]);
    await page.emulateMedia({ colorScheme: schemes[0], reducedMotion: 'reduce' });
    await page.goto(path(found));
    await settled(page);
    expect(await page.locator('h1').count()).toBe(1);
    expect(await page.title()).toMatch(/Evenbeam/);
    for (const width of widths) {
      await page.setViewportSize(width);
      for (const colorScheme of schemes) {
        await page.emulateMedia({ colorScheme, reducedMotion: 'reduce' });
        // Every rule at both widths; a change of scheme at one width changes nothing but colours.
        expect(await axeFindings(page, colorScheme === 'dark'), `${width.width} px, ${colorScheme}`).toEqual([]);
      }
      expect(await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth), `${width.width} px`).toBeLessThanOrEqual(0);
    }
  });
});
