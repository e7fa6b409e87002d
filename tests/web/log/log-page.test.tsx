import { screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { answer, openPage } from '#tests/web/support.tsx';
import { madeLog } from './made-log.ts';

const log = madeLog(12);
const open = (change: (path: string, body: unknown) => unknown = (_, body) => body) =>
  openPage('/log', (path, search) => {
    const body = log.answers(path, search);
    return body === null ? null : answer(change(path, structuredClone(body)));
  });
const check = async (): Promise<HTMLElement> => {
  await userEvent.click(await screen.findByRole('button', { name: 'Check the log' }));
  return screen.findByRole('table', { name: 'What was checked in this browser' });
};
const finding = (table: HTMLElement, name: RegExp): string => within(within(table).getByRole('row', { name })).getAllByRole('cell')[0]?.textContent ?? '';

afterEach(() => {
  vi.unstubAllGlobals();
  localStorage.clear();
});

describe('the log page', () => {
  it('shows the newest head whole and the newest leaves with their proofs', async () => {
    open();
    expect(await screen.findByText(log.head.rootHash)).toBeTruthy();
    const leaves = await screen.findByRole('table', { name: 'The newest leaves of the log' });
    expect(within(leaves).getAllByRole('row')).toHaveLength(13);
    expect(within(leaves).getAllByRole('link', { name: 'JSON' })[0]?.getAttribute('href')).toBe('/api/v1/entries/EVB-000012/v/1/proof?event=frozen');
  });

  it('checks root and signature in the browser, and the next time also that the log begins as it was seen', async () => {
    const { unmount } = open();
    const first = await check();
    expect([finding(first, /All leaves/), finding(first, /signed/), finding(first, /saw last/)]).toEqual(['Agrees', 'Agrees', 'Not checked']);
    unmount();
    open();
    expect(finding(await check(), /saw last/)).toBe('Agrees');
  });

  it.each([
    ['a changed leaf', /All leaves/, (path: string, body: unknown) => (path.endsWith('/leaves') ? JSON.parse(JSON.stringify(body).replace('"method":"M1"', '"method":"M2"')) as unknown : body)],
    ['a root that is not signed', /signed/, (path: string, body: unknown) => (path.endsWith('/head') ? { ...(body as object), rootHash: log.rootAt(11) } : body)],
  ])('says that %s does not agree, and remembers nothing of it', async (_, name, change) => {
    open(change);
    expect(finding(await check(), name)).toBe('Does not agree');
    expect((await screen.findByRole('alert')).textContent).toContain('does not agree with its head');
    expect(localStorage.length).toBe(0);
  });

  it('finds out a log that became shorter, and one that was written anew', async () => {
    const seen = { treeSize: 13, rootHash: log.head.rootHash, keyId: log.head.keyId, seenAt: '2026-05-01T00:00:00.000Z' };
    for (const [size, rootHash] of [[13, log.head.rootHash], [7, log.rootAt(6)]] as const) {
      localStorage.setItem('evenbeam.log-head', JSON.stringify({ ...seen, treeSize: size, rootHash }));
      const { unmount } = open();
      expect(finding(await check(), /saw last/), `${size} leaves`).toBe('Does not agree');
      unmount();
    }
  });
});
