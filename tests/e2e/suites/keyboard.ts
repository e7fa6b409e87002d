import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { settled } from '../support/settled.ts';
import type { Open } from '../support/visitors.ts';

interface Focus {
  name: string;
  /** An outline round the element or its label, or the heavier edge of a mark in a drawing: the eye sees where the focus is. */
  visible: boolean;
  inView: boolean;
}

const focusOf = (page: Page): Promise<Focus> =>
  page.evaluate(() => {
    const element = document.activeElement ?? document.body;
    const outlined = (of: Element | null): boolean => of !== null && getComputedStyle(of).outlineStyle !== 'none' && parseFloat(getComputedStyle(of).outlineWidth) > 0;
    const mark = element.querySelector('.dot, .pt');
    const box = element.getBoundingClientRect();
    const label = element instanceof HTMLInputElement ? element.labels?.[0]?.textContent : null;
    return {
      name: (element.getAttribute('aria-label') ?? label ?? element.textContent ?? '').trim(),
      visible: outlined(element) || outlined(element.closest('label')) || (mark !== null && parseFloat(getComputedStyle(mark).strokeWidth) >= 4),
      inView: box.bottom > 0 && box.top < innerHeight,
    };
  });

/** Presses Tab until the focus is on what is named; every stop on the way must be seen and in view. */
const tabTo = async (page: Page, name: string | RegExp, most = 80): Promise<void> => {
  const met: string[] = [];
  for (let i = 0; i < most; i += 1) {
    await page.keyboard.press('Tab');
    const focus = await focusOf(page);
    met.push(focus.name);
    expect(focus, `stop ${i + 1}, after ${met.slice(-4).join(' > ')}`).toMatchObject({ visible: true, inView: true });
    if (typeof name === 'string' ? focus.name === name : name.test(focus.name)) return;
  }
  throw new Error(`${most} times Tab did not reach ${String(name)}; the last stops were ${met.slice(-12).join(' > ')}`);
};

export const keyboard = (open: Open) => describe('with the keyboard alone', () => {
  it('a reader goes from the first page to a board and to an entry, and past the menu to its content', async () => {
    const { page } = await open();
    await page.goto('/');
    await settled(page);
    await tabTo(page, 'Boards');
    await page.keyboard.press('Enter');
    await page.getByRole('heading', { level: 1, name: 'Boards' }).waitFor();
    await settled(page);
    await tabTo(page, /^Quarter turns on one qubit/);
    await page.keyboard.press('Enter');
    await page.getByRole('heading', { level: 1, name: /Quarter turns on one qubit/ }).waitFor();
    await settled(page);
    await tabTo(page, 'Meadow-5');
    await page.keyboard.press('Enter');
    await page.getByRole('heading', { level: 1, name: 'Meadow-5' }).waitFor();
    await settled(page);
    await page.reload();
    await settled(page);
    await tabTo(page, 'Skip to the content', 1);
    await page.keyboard.press('Enter');
    expect(await page.evaluate(() => document.activeElement?.id)).toBe('main');
    await tabTo(page, /^Quarter turns on one qubit/, 2);
  });

  it('the points of a drawing are one stop; arrows go from point to point and each is read out', async () => {
    const { page } = await open();
    await page.goto('/entries/EVB-000001');
    await settled(page);
    await tabTo(page, /^Depth 0: /);
    await page.keyboard.press('ArrowRight');
    const { name } = await focusOf(page);
    expect(name).toMatch(/^Depth 1: 0\.\d+, 95\s% interval 0\.\d+ to \d\.\d+/);
    await page.keyboard.press('End');
    expect((await focusOf(page)).name).toMatch(/^Depth 64/);
  });

  it('a contributor signs in, opens a new submission and chooses a file', async () => {
    const { page } = await open();
    await page.goto('/');
    await settled(page);
    await tabTo(page, 'Sign in');
    await page.keyboard.press('Enter');
    await page.getByRole('heading', { name: 'Choose who to be' }).waitFor();
    await tabTo(page, /^Ida Marsh/);
    await page.keyboard.press('Enter');
    await page.getByRole('banner').getByText('Ida Marsh', { exact: true }).first().waitFor();
    await settled(page);
    await tabTo(page, 'Desk');
    await page.keyboard.press('Enter');
    await page.getByRole('heading', { level: 1, name: 'Desk' }).waitFor();
    await settled(page);
    await tabTo(page, 'Submit a dataset');
    await page.keyboard.press('Enter');
    await page.getByRole('heading', { level: 1, name: 'Submit a dataset' }).waitFor();
    await settled(page);
    // Listened for before the walk: the browser must know that it is listened for when the key is pressed.
    const chosen = page.waitForEvent('filechooser');
    await tabTo(page, 'choose a file');
    await page.keyboard.press('Enter');
    const chooser = await chosen;
    await chooser.setFiles({ name: 'empty.json', mimeType: 'application/json', buffer: Buffer.from('{}') });
    await page.getByText('Nothing was sent. Mend what the table names and choose the file again.').waitFor();
  });

  it('the menu of a phone opens, closes with Escape and gives the focus back', async () => {
    const { page } = await open({ viewport: { width: 390, height: 844 } });
    await page.goto('/boards');
    await settled(page);
    await tabTo(page, 'Menu', 4);
    await page.keyboard.press('Enter');
    await page.getByRole('navigation', { name: 'Main, short' }).getByRole('link', { name: 'Devices' }).waitFor();
    await page.keyboard.press('Escape');
    await page.getByRole('navigation', { name: 'Main, short' }).waitFor({ state: 'hidden' });
    expect((await focusOf(page)).name).toBe('Menu');
  });
});
