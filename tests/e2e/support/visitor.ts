import type { Browser, BrowserContext, BrowserContextOptions, Page } from 'playwright-core';
import { signInQuietly } from './quick-sign-in.ts';

export interface Visitor {
  context: BrowserContext;
  page: Page;
  /** What went wrong unseen: console errors and warnings, scripts that threw, requests that left the registry. */
  faults: string[];
  /** Signs in through the stand-in's chooser, from the page that is open, and waits until the name stands in the header. */
  signIn(name: string): Promise<void>;
}

export interface Places {
  url: string;
  signIn: string;
}

export interface VisitorOptions extends BrowserContextOptions {
  /** The test asks for something that is refused. */
  refusals?: boolean;
  /** Name of the person who is signed in from the start. */
  as?: string;
}

/** A refused request is answered by the page; the browser's own line about it is expected where a test asks for a refusal. */
const aboutRefusal = /the server responded with a status of (?:401|403|404|409|410|422)\b/;

/** Someone with a browser of their own: no cookies, nothing remembered. */
export const openVisitor = async (browser: Browser, { url, signIn }: Places, options: VisitorOptions = {}): Promise<Visitor> => {
  const { refusals = false, as, ...more } = options;
  const context = await browser.newContext({ baseURL: url, viewport: { width: 1440, height: 900 }, acceptDownloads: true, reducedMotion: 'reduce', ...more });
  context.setDefaultTimeout(45_000);
  if (as !== undefined) await signInQuietly(context, as);
  const page = await context.newPage();
  const faults: string[] = [];
  page.on('console', (message) => {
    if (!['error', 'warning'].includes(message.type()) || (refusals && aboutRefusal.test(message.text()))) return;
    faults.push(`${page.url()}: ${message.type()}: ${message.text()}`);
  });
  page.on('pageerror', (error) => faults.push(`${page.url()}: ${error.message}`));
  context.on('request', (request) => {
    const { origin, protocol } = new URL(request.url());
    if (protocol === 'data:' || protocol === 'blob:' || origin === url || origin === signIn) return;
    faults.push(`${page.url()}: a request left the registry: ${request.url()}`);
  });
  return {
    context, page, faults,
    signIn: async (name) => {
      await page.getByRole('link', { name: 'Sign in', exact: true }).first().click();
      await page.getByRole('button', { name }).click();
      await page.getByRole('banner').getByText(name, { exact: true }).first().waitFor();
    },
  };
};
