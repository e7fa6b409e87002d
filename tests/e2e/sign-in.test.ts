import { describe, expect, it } from 'vitest';
import { signInThroughChooser, useBrowser } from '#tests/support/browser.ts';
import { useRegistry } from '#tests/support/registry.ts';

const registry = useRegistry();
const visit = useBrowser();

describe('a visitor', () => {
  it('sees the home page without a blocked script, style or font', async () => {
    const { page } = await visit();
    await page.goto(registry().base);
    await page.getByRole('heading', { level: 1 }).first().waitFor();
    expect(await page.evaluate(() => document.fonts.ready.then((fonts) => [...fonts].filter((font) => font.status === 'error').length))).toBe(0);
  });

  it('signs in as an invented person, is known on the page, and signs out', async () => {
    const { page, context } = await visit();
    await signInThroughChooser(page, registry().base, 'Ida Marsh', '/');
    await page.getByText('Ida Marsh').first().waitFor();
    const cookie = (await context.cookies()).find(({ name }) => name === 'evenbeam');
    expect(cookie).toMatchObject({ httpOnly: true, sameSite: 'Lax' });
    await page.getByRole('button', { name: 'Sign out' }).first().click();
    await page.getByRole('link', { name: /^Sign in/ }).first().waitFor();
  });

  it('finds the chooser plain to read and usable with the keyboard alone', async () => {
    const { page } = await visit();
    await page.goto(`${registry().base}/auth/google`);
    await page.keyboard.press('Tab');
    await page.keyboard.press('Tab');
    const focused = await page.evaluate(() => document.activeElement?.textContent ?? '');
    expect(focused).toContain('Tom Ashdown');
    await page.keyboard.press('Enter');
    await page.getByText('Tom Ashdown').first().waitFor();
  });
});
