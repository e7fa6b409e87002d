import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, expect } from 'vitest';
import { chromiumPath } from '#api/cli/test/chromium.ts';

/** Lets Chromium run as root without a display, and ask nothing of the network by itself. */
export const browserArguments = ['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update', '--disable-sync'];

/** Widths at which every screen must hold. */
export const laptop = { width: 1440, height: 900 };
export const phone = { width: 390, height: 844 };

export interface Visitor {
  page: Page;
  context: BrowserContext;
}

/** A real browser for the test file. What its pages print or throw, and what the content policy blocks, fails the test. */
export const useBrowser = (): ((options?: { viewport?: typeof laptop; colorScheme?: 'light' | 'dark' }) => Promise<Visitor>) => {
  let browser: Browser | undefined;
  let contexts: BrowserContext[] = [];
  let heard: string[] = [];
  beforeAll(async () => {
    browser = await chromium.launch({ executablePath: chromiumPath, args: browserArguments });
  });
  afterAll(() => browser?.close());
  afterEach(async () => {
    await Promise.all(contexts.map((context) => context.close()));
    contexts = [];
    const printed = heard;
    heard = [];
    expect(printed, 'a page printed or threw').toEqual([]);
  });
  return async ({ viewport = laptop, colorScheme = 'light' } = {}) => {
    if (!browser) throw new Error('The browser is there only while tests run.');
    const context = await browser.newContext({ viewport, colorScheme, locale: 'en-GB', timezoneId: 'UTC' });
    contexts.push(context);
    const page = await context.newPage();
    page.on('console', (message) => {
      if (message.type() === 'error' || message.type() === 'warning') heard.push(`${message.type()}: ${message.text()} (${page.url()})`);
    });
    page.on('pageerror', (fault) => heard.push(`thrown: ${fault.message} (${page.url()})`));
    return { page, context };
  };
};

/** Signs in through the chooser, as a reader would, and waits for the page that was asked for. */
export const signInThroughChooser = async (page: Page, base: string, name: string, returnTo = '/'): Promise<void> => {
  await page.goto(`${base}/auth/google?returnTo=${encodeURIComponent(returnTo)}`);
  await page.getByRole('button', { name: new RegExp(`^${name}`) }).click();
  await page.waitForURL(`${base}${returnTo}`);
};
