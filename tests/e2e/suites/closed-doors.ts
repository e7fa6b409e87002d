import { describe, expect, it } from 'vitest';
import { curator } from '../support/found.ts';
import type { Open } from '../support/visitors.ts';

/** A curator who is a member of the laboratory whose dataset waits in the queue. */
const tied = 'Hale Brook';
const laboratory = 'Withy Lane Laboratory';

const broken = {
  format: 'evenbeam.dataset', formatVersion: '1.0.0', title: 'Broken', gateClass: 'quarter-turn-1q/1', device: { provider: 'Larkspur Quantics', name: 'Meadow-5', modality: 'superconducting' }, register: ['q3'],
  gates: [{ label: 'a', targets: [0], ideal: { gate: 'rx', params: [1.5707963267948966] } }, { label: 'i', targets: [0], ideal: { gate: 'id' } }, { label: 'b', targets: [0], ideal: { gate: 'ry', params: [1.5707963267948966] } }],
  patches: [{ qubits: [0], circuits: [{ id: 'c1', gates: ['a', 'i', 'b', 'x'], shots: 1000, counts: { 0: 31, 1: 968 } }] }],
  acquisition: { startedAt: '2026-05-04T08:00:00Z', endedAt: '2026-05-04T07:00:00Z', software: 'in-house' }, contributors: [{ name: 'A. Example' }], licence: 'CC-BY-4.0',
};

export const closedDoors = (open: Open) => describe('what is not open', () => {
  it('a broken file is told by pointers, and nothing of it is sent', async () => {
    const { page } = await open({ as: 'Ida Marsh' });
    await page.goto('/desk/submissions/new');
    const sent: string[] = [];
    page.on('request', (request) => {
      if (request.method() !== 'GET') sent.push(`${request.method()} ${request.url()}`);
    });
    await page.locator('input[type=file]').setInputFiles({ name: 'broken.json', mimeType: 'application/json', buffer: Buffer.from(JSON.stringify(broken)) });
    await page.getByText('Nothing was sent. Mend what the table names and choose the file again.').waitFor();
    const table = page.getByRole('table').filter({ hasText: 'broken.json' });
    const places = await table.locator('td:first-child').allInnerTexts();
    expect(places).toContain('/patches/0/circuits/0/gates/3');
    expect(places).toContain('/patches/0/circuits/0/counts');
    expect(await table.innerText()).toMatch(/999/);
    expect(await page.getByRole('button', { name: 'Submit this dataset' }).count()).toBe(0);
    expect(sent).toEqual([]);
  });

  it('a file that breaks off is told in words', async () => {
    const { page } = await open({ as: 'Ida Marsh' });
    await page.goto('/desk/submissions/new');
    await page.locator('input[type=file]').setInputFiles({ name: 'half.json', mimeType: 'application/json', buffer: Buffer.from(JSON.stringify(broken).slice(0, 400)) });
    await page.getByText('Nothing was sent. Mend what the table names and choose the file again.').waitFor();
    await page.getByRole('table').filter({ hasText: 'half.json' }).getByRole('cell', { name: /line|end/i }).first().waitFor();
  });

  it('a curator with an interest sees that a case is kept from them, and neither reads nor decides it', async () => {
    const other = await open({ as: curator });
    await other.page.goto('/review');
    const queue = other.page.getByRole('complementary', { name: 'Review queue' });
    const row = queue.getByRole('link').filter({ hasText: laboratory });
    await row.waitFor();
    const id = new URL((await row.getAttribute('href')) ?? '', other.page.url()).pathname.split('/').at(-1) ?? '';
    expect(id).toMatch(/^S-\d{6}$/);

    const { page, context } = await open({ refusals: true, as: tied });
    await page.goto('/review');
    await page.getByText(/kept from you, because you belong, or belonged in the last 12 months, to/).waitFor();
    await page.getByText('Which', { exact: true }).click();
    await page.getByText(`${id}, ${laboratory}`).waitFor();
    expect(await page.getByRole('complementary', { name: 'Review queue' }).getByRole('link').filter({ hasText: id }).count()).toBe(0);
    await page.goto(`/review/${id}`);
    await page.getByText('You belong, or belonged in the last 12 months, to the organisation it comes from.').waitFor();
    expect(await page.getByRole('button', { name: 'Claim this case' }).count()).toBe(0);

    const { csrfToken } = (await (await context.request.get('/api/v1/me')).json()) as { csrfToken: string };
    const headers = { 'x-csrf-token': csrfToken, origin: new URL(page.url()).origin };
    for (const [path, data] of [[`/api/v1/reviews/${id}/claim`, undefined], [`/api/v1/reviews/${id}/decision`, { outcome: 'accept', reason: 'It is ours.', noInterest: true }]] as const) {
      const answer = await context.request.post(path, { headers, ...(data ? { data } : {}) });
      expect(answer.status(), path).toBe(403);
      expect(await answer.json()).toMatchObject({ status: 403, detail: expect.stringContaining('belonged in the last 12 months') as unknown });
    }
  });

  it('the pages of a role are closed to those who do not hold it, and say so', async () => {
    const { page } = await open({ as: 'Kit Wren' });
    await page.goto('/desk/submissions');
    await page.getByRole('heading', { name: 'The desk is not open to you' }).waitFor();
    await page.goto('/review');
    await page.getByRole('heading', { name: 'The review queue is not open to you' }).waitFor();
    await page.getByText('You are signed in as Kit Wren, who is none.').waitFor();
  });

  it('a submission of another organisation is not shown, nor that it exists under which title', async () => {
    const { page } = await open({ refusals: true, as: 'Tom Ashdown' });
    await page.goto('/desk/submissions/S-000001');
    await page.getByRole('heading', { name: 'This submission is not open to you' }).waitFor();
    expect(await page.locator('main').innerText()).not.toContain('First run on the left half');
  });

  it('a stranger is asked to sign in and comes back to the page asked for', async () => {
    const { page } = await open();
    await page.goto('/desk/run-sheets');
    await page.locator('main').getByRole('link', { name: 'Sign in' }).click();
    await page.getByRole('button', { name: 'Ida Marsh' }).click();
    await page.getByRole('heading', { level: 1, name: 'Run sheets' }).waitFor();
    expect(new URL(page.url()).pathname).toBe('/desk/run-sheets');
  });

  it('a tab left open when its session ended is told so, and nothing is lost', async () => {
    const { page, context } = await open({ refusals: true, as: 'Per Alder' });
    await page.goto('/desk/tokens');
    await page.getByLabel('What will use it').fill('Night run');
    await context.clearCookies();
    await page.getByRole('button', { name: 'Make a token' }).click();
    await page.getByRole('alert').first().waitFor();
    expect(await page.getByLabel('What will use it').inputValue()).toBe('Night run');
  });
});
