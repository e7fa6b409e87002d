import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { boardFixture, emptyBoardFixture } from '#tests/support/fixtures/boards.ts';
import { entryFixture } from '#tests/support/fixtures/entries.ts';
import { contributorFixture } from '#tests/support/fixtures/session.ts';
import { answer, openPage } from '../support.tsx';

beforeEach(() => { localStorage.clear(); vi.stubGlobal('scrollTo', () => undefined); });
afterEach(() => { vi.unstubAllGlobals(); });

describe('pages', () => {
  it('home: title, find box, boards, newest entries, and the lesson on the newest entry’s real figure', async () => {
    openPage('/');
    expect(await screen.findByRole('heading', { level: 1, name: /measured one way/ })).toBeTruthy();
    expect(await screen.findByText('the estimate, 0.9695')).toBeTruthy();
    expect(await screen.findByRole('link', { name: 'Quarter turns on one qubit' })).toBeTruthy();
    expect(document.title).toBe('An open registry of gate quality | Evenbeam');
    expect(screen.getAllByText(/Demonstration data: invented device and date/).length).toBeGreaterThan(0);
  });

  it('finding leads to the results page with the words in its address', async () => {
    const { router } = openPage('/');
    await userEvent.type(await screen.findByRole('searchbox'), 'Meadow{Enter}');
    expect(await screen.findByRole('heading', { level: 1, name: 'Find' })).toBeTruthy();
    expect(router.state.location.search).toBe('?q=Meadow');
    expect(await screen.findByText('4 entries found.')).toBeTruthy();
  });

  it('a board: rows in the order of the answer with their rank ranges, cut where devices can be told apart, and what is left off with reason and remedy', async () => {
    openPage('/boards/quarter-turn-1q/1');
    const table = await screen.findByRole('table', { name: /Retained signal at depth 16/ });
    expect(within(table).getAllByRole('rowheader').flatMap((c) => within(c).queryAllByRole('link').map((a) => a.textContent))).toEqual(boardFixture.rows.map((r) => r.device.name));
    expect(within(table).getAllByRole('rowheader').filter((c) => within(c).queryByRole('link') === null).map((c) => c.textContent)).toEqual([
      'Ranks 1 to 3 Three entries that cannot be told apart.', 'Rank 4 Told apart from every other entry on this board.',
      'Ranks 5 to 7 A chain. Each bracket joins entries that cannot be told apart; Lantern-2 belongs to both.', 'Rank 8 Told apart from every other entry on this board.',
    ]);
    expect([...table.querySelectorAll('.rank')].map((c) => c.textContent)).toEqual(['1 to 3', '1 to 3', '1 to 3', '4th', '5 to 6', '5 to 7', '6 to 7', '8th']);
    expect(within(table).getByText('Cannot be told apart from Marl-4 and Thistle-6')).toBeTruthy();
    expect(screen.getByText(/^Eight entries are ranked\. Three entries share ranks 1 to 3 and cannot be told apart\. Two places are certain: the 4th and the 8th\.$/)).toBeTruthy();
    expect(screen.getByText('The circuits are the contributor’s own design, not a run sheet.')).toBeTruthy();
    expect(screen.getByText('A run sheet drawn by the registry')).toBeTruthy();
  });

  it('a board keeps its view in the address', async () => {
    const { router } = openPage('/boards/quarter-turn-1q/1');
    await userEvent.click(await screen.findByRole('radio', { name: 'Table' }));
    await userEvent.selectOptions(screen.getByLabelText('Figure'), 'error-per-gate');
    expect(router.state.location.search).toBe('?view=table&figure=error-per-gate');
    expect(await screen.findByRole('button', { name: 'Estimate' })).toBeTruthy();
  });

  it('an empty board says why, and what would fill it', async () => {
    openPage('/boards/quarter-turn-1q/1', (path) => (path.startsWith('/api/v1/boards/') ? answer(emptyBoardFixture) : null));
    expect(await screen.findByRole('heading', { name: 'No entry in this gate class yet' })).toBeTruthy();
  });

  it('marking an entry as one’s own keeps it, shows the tray, and can be cleared', async () => {
    openPage('/boards/quarter-turn-1q/1');
    await userEvent.click(await screen.findByRole('checkbox', { name: 'Mark Meadow-5 as yours' }));
    const tray = screen.getByRole('region', { name: 'Your selection' });
    expect(tray.textContent).toContain('Meadow-5');
    expect(localStorage.getItem('evenbeam.own')).toContain('EVB-000042');
    await userEvent.click(within(tray).getByRole('button', { name: 'Clear' }));
    expect(localStorage.getItem('evenbeam.own')).toBeNull();
  });

  it('two ranked entries marked as one’s own are compared by their difference', async () => {
    openPage('/boards/quarter-turn-1q/1');
    for (const name of ['Meadow-5', 'Quill-7']) await userEvent.click(await screen.findByRole('checkbox', { name: `Mark ${name} as yours` }));
    expect(await screen.findByText(/^Meadow-5 is better than Quill-7 by 0\.0175/)).toBeTruthy();
    await userEvent.click(screen.getByRole('checkbox', { name: 'Mark Tarn-1 as yours' }));
    expect(screen.queryByText(/is better than/)).toBeNull();
  });

  it('an entry: headline, all sections, exact files, digests and the command that makes it again', async () => {
    openPage('/entries/EVB-000042');
    expect(await screen.findByRole('heading', { level: 1, name: 'Meadow-5' })).toBeTruthy();
    for (const name of ['Retained signal', 'Gates and readout', 'Sealed circuits', 'All figures', 'Provenance', 'Recompute', 'Versions', 'Caution']) expect(screen.getByRole('heading', { level: 2, name }), name).toBeTruthy();
    expect(screen.getByRole('link', { name: 'meadow-5-spring.json' }).getAttribute('href')).toBe('/api/v1/entries/EVB-000042/v/2/dataset');
    expect(screen.getByText(entryFixture.provenance.contentId)).toBeTruthy();
    expect(screen.getByText(/npm run --silent estimate -- \\ meadow-5-spring\.json --seal seal\.json/)).toBeTruthy();
    expect(screen.getByText(/npm run --silent verify -- \\ http:\/\/localhost:?\d*\/entries\/EVB-000042\/v\/2/)).toBeTruthy();
    expect(screen.getByRole('button', { name: 'Recompute here' })).toBeTruthy();
    expect(screen.getByText('Demonstration data: invented device and date.')).toBeTruthy();
    expect(screen.getByText('Not determined by this gate set.')).toBeTruthy();
  });

  it('an older version points to the newer one; a withdrawn one hands out no file', async () => {
    openPage('/entries/EVB-000042/v/1', (path) => (path.startsWith('/api/v1/entries/') ? answer({ ...entryFixture, version: 1, state: 'withdrawn' }) : null));
    expect(await screen.findByText(/This entry has a newer version/)).toBeTruthy();
    expect(screen.getByText('Withdrawn', { selector: '.kind' })).toBeTruthy();
    expect(screen.queryByRole('link', { name: 'meadow-5-spring.json' })).toBeNull();
  });

  it('an entry that is not there says so and offers the search', async () => {
    openPage('/entries/EVB-999999');
    expect(await screen.findByRole('heading', { name: 'There is no such entry' })).toBeTruthy();
  });

  it('a device shows its figures in order of time', async () => {
    openPage('/devices/meadow-5');
    const table = await screen.findByRole('table', { name: /Retained signal/ });
    expect(within(table).getAllByRole('rowheader').map((c) => c.textContent)).toEqual(['Meadow-5, 2025-04-26q3', 'Meadow-5, 2025-11-08q3', 'Meadow-5, 2026-05-04q3']);
  });

  it('an address that does not exist is named', async () => {
    openPage('/no/such');
    expect(await screen.findByText('/no/such')).toBeTruthy();
  });

  it('every problem code has its help page', async () => {
    openPage('/problems/unusable-file');
    expect(await screen.findByRole('heading', { level: 1, name: 'The file breaks the format' })).toBeTruthy();
  });

  it('the header offers sign-in with the way back, and to a contributor the desk', async () => {
    openPage('/devices?cursor=a');
    expect((await screen.findAllByRole('link', { name: 'Sign in' }))[0]?.getAttribute('href')).toBe('/auth/google?returnTo=%2Fdevices%3Fcursor%3Da');
    expect(screen.queryByRole('link', { name: 'Desk' })).toBeNull();
    document.body.innerHTML = '';
    openPage('/devices', (path) => (path === '/api/v1/me' ? answer(contributorFixture) : null));
    await waitFor(() => expect(screen.getAllByRole('link', { name: 'Desk' }).length).toBeGreaterThan(0));
    expect(screen.queryByRole('link', { name: 'Review' })).toBeNull();
  });

  it('the chosen theme is applied, kept, and given back to the system', async () => {
    openPage('/method');
    await userEvent.click(await screen.findByRole('radio', { name: 'Dark' }));
    expect([document.documentElement.dataset.theme, localStorage.getItem('evenbeam.theme')]).toEqual(['dark', 'dark']);
    await userEvent.click(screen.getByRole('radio', { name: 'As the system' }));
    expect([document.documentElement.dataset.theme, localStorage.getItem('evenbeam.theme')]).toEqual([undefined, null]);
  });
});
