import { resolve } from 'node:path';
import { chromium, type Browser } from 'playwright-core';
import { afterAll, afterEach, beforeAll, expect } from 'vitest';
import { chromiumPath } from '#api/cli/test/chromium.ts';
import { browserArguments } from '#tests/support/browser.ts';
import { openVisitor, type Places, type Visitor, type VisitorOptions } from './visitor.ts';

export interface OpenOptions extends VisitorOptions {
  /** Stays for the whole file; others leave with the test that opened them. */
  lasting?: boolean;
}

export type Open = (options?: OpenOptions) => Promise<Visitor>;

/** What the page showed when a test failed, for whoever looks into it. */
const keepPicture = async ({ page }: Visitor, name: string): Promise<void> => {
  const path = resolve('.data/e2e-failures', `${name.toLowerCase().replace(/[^a-z0-9]+/g, '-')}.png`);
  await page.screenshot({ path, fullPage: true, timeout: 10_000 }).catch(() => undefined);
};

/** A browser for the test file this is called in; `open` opens visitors. After each test none may have met an unseen fault. */
export const useVisitors = (registry: () => Places): { open: Open; browser: () => Browser } => {
  let browser: Browser | undefined;
  const visitors = new Map<Visitor, boolean>();
  beforeAll(async () => {
    browser = await chromium.launch({ executablePath: chromiumPath, args: browserArguments });
  });
  afterEach(async ({ task }) => {
    if (task.result?.state === 'fail') await Promise.all([...visitors.keys()].map((visitor, i) => keepPicture(visitor, `${task.name}-${i + 1}`)));
    const faults = [...visitors.keys()].flatMap((visitor) => visitor.faults.splice(0));
    for (const [visitor, lasting] of visitors) {
      if (lasting) continue;
      await visitor.context.close();
      visitors.delete(visitor);
    }
    expect(faults).toEqual([]);
  });
  afterAll(async () => {
    await browser?.close();
  });
  const running = (): Browser => {
    if (!browser) throw new Error('The browser is there only while tests run.');
    return browser;
  };
  const open: Open = async ({ lasting = false, ...options } = {}) => {
    const visitor = await openVisitor(running(), registry(), options);
    visitors.set(visitor, lasting);
    return visitor;
  };
  return { open, browser: running };
};
