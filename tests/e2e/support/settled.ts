import type { Page } from 'playwright-core';

/** Waits until a page shows what it came to show: its heading, its fonts, and nothing that is still loading. */
export const settled = async (page: Page): Promise<void> => {
  await page.locator('main h1').first().waitFor({ state: 'attached' });
  await page.waitForFunction(async () => {
    await document.fonts.ready;
    return document.querySelector('main .loading, main [aria-busy="true"]') === null;
  });
};
