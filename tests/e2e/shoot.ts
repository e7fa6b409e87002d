import { mkdirSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { chromium } from 'playwright-core';
import { chromiumPath } from '#api/cli/test/chromium.ts';
import { browserArguments } from '#tests/support/browser.ts';
import { findAll } from './support/found.ts';
import { pages, schemes, widths } from './support/pages.ts';
import { settled } from './support/settled.ts';
import { openVisitor } from './support/visitor.ts';

/** Takes a picture of every page of a running registry, at both widths, light and dark: `npm run shots -- OUTDIR [BASE] [NAME-PATTERN]`. */
const [folder, base = 'http://127.0.0.1:8080', pattern = '.'] = process.argv.slice(2);
if (folder === undefined) {
  console.error('Use: npm run shots -- OUTDIR [BASE, http://127.0.0.1:8080 if absent] [NAME-PATTERN]');
  process.exit(2);
}
mkdirSync(resolve(folder), { recursive: true });
const places = { url: new URL(base).origin, signIn: '' };
const browser = await chromium.launch({ executablePath: chromiumPath, args: browserArguments });
let shots = 0;
let wide = 0;
try {
  const found = await findAll(browser, places);
  for (const { name, path, as } of pages.filter((page) => new RegExp(pattern).test(page.name))) {
    let address: string;
    try {
      address = path(found);
    } catch (fault) {
      console.log(`${name}: left out. ${fault instanceof Error ? fault.message : String(fault)}`);
      continue;
    }
    const storageState = as ? found.sessions.get(as(found)) : undefined;
    const { context, page, faults } = await openVisitor(browser, places, { refusals: true, ...(storageState ? { storageState } : {}) });
    await page.goto(address);
    await settled(page);
    for (const width of widths) {
      await page.setViewportSize(width);
      for (const colorScheme of schemes) {
        await page.emulateMedia({ colorScheme, reducedMotion: 'reduce' });
        await page.screenshot({ path: join(folder, `${name}-${width.width}-${colorScheme}.png`), fullPage: true });
        shots += 1;
      }
      const over = await page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
      if (over > 0) {
        wide += 1;
        console.log(`${name}: ${over} px wider than a screen of ${width.width} px`);
      }
    }
    for (const fault of faults) console.log(`${name}: ${fault}`);
    await context.close();
  }
} finally {
  await browser.close();
}
console.log(`${shots} pictures in ${folder}${wide > 0 ? `; ${wide} pages scroll sideways` : ''}`);
