import type { Page } from 'playwright-core';

/** Waits until a page shows what it came to show: its heading, its fonts, and nothing that is still loading. */
export const settled = async (page: Page): Promise<void> => {
  await page.locator('main h1').first().waitFor({ state: 'attached' });
  await page.waitForFunction(() => document.querySelector('main .loading, main [aria-busy="true"]') === null);
  await page.evaluate(() => document.fonts.ready.then(() => true));
};
