import { screen, within } from '@testing-library/react';
import { beforeAll, beforeEach, describe, expect, it, vi } from 'vitest';
import { formulas } from '#web/features/method/formulas.ts';
import { outline } from '#web/features/method/outline.ts';
import { openPage } from '../support.tsx';

beforeAll(() => { vi.stubGlobal('scrollTo', () => undefined); });
beforeEach(() => { document.body.innerHTML = ''; });

const openMethod = async (): Promise<HTMLElement> => {
  openPage('/method');
  await screen.findByRole('heading', { level: 1, name: 'One fixed linear inverse' });
  return document.querySelector<HTMLElement>('.p-method')!;
};

describe('the method page', () => {
  it('has every section of its contents, in that order, under the address that the contents name', async () => {
    const page = await openMethod();
    expect([...page.querySelectorAll('h2')].map((h) => h.textContent)).toEqual(outline.map(({ title }) => title));
    const contents = within(screen.getByRole('navigation', { name: 'Contents of this page' }));
    expect(contents.getAllByRole('link').map((a) => [a.textContent, a.getAttribute('href')])).toEqual(outline.map(({ id, title }) => [title, `#${id}`]));
  });

  it('every link inside the page leads to a place on it, and no address is given twice', async () => {
    const page = await openMethod();
    const ids = [...page.querySelectorAll('[id]')].map(({ id }) => id);
    expect(new Set(ids).size).toBe(ids.length);
    const targets = [...page.querySelectorAll('a[href^="#"]')].map((a) => a.getAttribute('href')?.slice(1) ?? '');
    expect(targets.length).toBeGreaterThan(outline.length);
    expect(targets.filter((target) => !ids.includes(target))).toEqual([]);
  });

  it('every figure has an address of its own that pages elsewhere can name', async () => {
    const page = await openMethod();
    for (const key of ['retained-signal', 'output-error', 'error-per-gate', 'gate-loss', 'angle-error', 'readout-loss', 'prediction-error', 'misfit']) expect(page.querySelector(`#${key} h3`), key).not.toBeNull();
  });

  it('numbers its formulas as a reader meets them, and typesets each of them, with MathML for those who listen', async () => {
    const page = await openMethod();
    const shown = [...page.querySelectorAll('.numbered')];
    expect(shown.map((n) => n.querySelector('.formulano')?.textContent)).toEqual(formulas.map(({ number }) => `(${number})`));
    for (const one of shown) expect(one.querySelectorAll('.katex-html').length, one.id).toBe(one.querySelectorAll('math').length);
    expect(shown.every((one) => one.querySelector('math') !== null)).toBe(true);
    expect(page.querySelector('.katex-error')).toBeNull();
  });
});
