import { screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import { citationFixture } from '#tests/support/fixtures/citations.ts';
import { answer, openPage } from '../support.tsx';

const lineOf = (text: string) => (_content: string, element: Element | null): boolean => element?.tagName === 'P' && element.textContent === text;
const section = async (): Promise<HTMLElement> => {
  const found = await screen.findByRole('region', { name: 'Cite' });
  await within(found).findByText(lineOf(citationFixture.styles[0]!.text));
  return found;
};

describe('the section Cite', () => {
  it('shows three styles, every format as a download, and marks a DOI of the stand-in as one', async () => {
    openPage('/entries/EVB-000042/v/2');
    const cite = await section();
    for (const { label, text } of citationFixture.styles) {
      expect(within(cite).getByRole('heading', { name: label })).toBeDefined();
      expect(within(cite).getByText(lineOf(text))).toBeDefined();
    }
    expect(within(cite).getAllByRole('link').map((link) => [link.textContent, link.getAttribute('href')])).toEqual(citationFixture.formats.map(({ label, href }) => [label, href]));
    expect(cite.textContent).toContain('local stand-in: does not resolve');
  });

  it('copies one style and says so; where that is refused it selects the text and says that', async () => {
    const user = userEvent.setup();
    openPage('/entries/EVB-000042/v/2');
    const cite = await section();
    await user.click(within(cite).getByRole('button', { name: 'Copy in Harvard style' }));
    await within(cite).findByText('Copied in Harvard style.');
    expect(await navigator.clipboard.readText()).toBe(citationFixture.styles[1]!.text);
    vi.spyOn(navigator.clipboard, 'writeText').mockRejectedValue(new Error('refused'));
    await user.click(within(cite).getByRole('button', { name: 'Copy in Vancouver style' }));
    await within(cite).findByText(/The text is selected; copy it by keyboard/);
    expect(window.getSelection()?.toString()).toBe(citationFixture.styles[2]!.text);
  });

  it('says when the citation cannot be read, and leaves the rest of the page as it is', async () => {
    openPage('/entries/EVB-000042/v/2', (path) => (path.endsWith('/citation') ? answer({ type: '/problems/internal', title: 'A fault of ours', status: 500, detail: 'Noted under 1.', code: 'internal' }, 500) : null));
    const cite = await screen.findByRole('region', { name: 'Cite' });
    await within(cite).findByText(/Noted under 1/);
    expect(screen.getByRole('heading', { name: 'Versions' })).toBeDefined();
  });
});
