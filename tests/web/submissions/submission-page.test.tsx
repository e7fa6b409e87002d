import { screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { contributor } from '#tests/support/fixtures/desk-people.ts';
import { blocked, checking, frozen, inReview, ready } from '#tests/support/fixtures/desk-submissions.ts';
import { answerWith, drawAt, Refusal } from '#tests/web/desk/support.tsx';
import { SubmissionPage } from '#web/features/submissions/components/submission-page.tsx';

const address = '/api/v1/submissions/S-000218';
const page = <SubmissionPage id="S-000218" />;

describe('a submission', () => {
  it('is sent to review only when it is ready and its record complete', async () => {
    const user = userEvent.setup();
    const asked = answerWith({ 'GET /api/v1/me': contributor, [`GET ${address}`]: ready, [`POST ${address}/submit`]: inReview });
    drawAt(page);
    await user.click(await screen.findByRole('button', { name: 'Send to review' }));
    expect(await screen.findByText('In review')).toBeTruthy();
    await waitFor(() => expect(screen.queryByRole('button', { name: 'Send to review' })).toBeNull());
    expect(asked.filter((call) => call.method === 'POST').map((call) => call.path)).toEqual([`${address}/submit`]);
  });

  it('keeps the button closed with its reason while checks are to come, and follows the estimate by itself', async () => {
    let reads = 0;
    answerWith({ 'GET /api/v1/me': contributor, [`GET ${address}`]: () => { reads += 1; return reads < 3 ? checking : ready; } });
    drawAt(page);
    const send = await screen.findByRole('button', { name: 'Send to review' });
    expect((send as HTMLButtonElement).disabled).toBe(true);
    expect(document.getElementById(send.getAttribute('aria-describedby') ?? '')?.textContent).toBe('Three checks are still to come.');
    expect(screen.getByRole('progressbar').getAttribute('aria-valuenow')).toBe('62');
    expect(screen.getByText('Bootstrap, half done.')).toBeTruthy();
    await waitFor(() => expect(screen.queryByRole('progressbar')).toBeNull(), { timeout: 6000 });
    expect((screen.getByRole('button', { name: 'Send to review' }) as HTMLButtonElement).disabled).toBe(false);
  });

  it('saves the record, refuses a date out of bounds by name, and keeps what was typed when the registry refuses', async () => {
    const user = userEvent.setup();
    const asked = answerWith({ 'GET /api/v1/me': contributor, [`GET ${address}`]: ready, [`PATCH ${address}`]: new Refusal(409, 'changed-meanwhile', 'The record was changed after you had read it.') });
    drawAt(page);
    const embargo = await screen.findByLabelText('Embargo until');
    await user.type(embargo, '2020-01-01');
    await user.click(screen.getByRole('button', { name: 'Save the record' }));
    expect(await screen.findByText('2020-01-01 is not ahead; an embargo ends on a later day than today.')).toBeTruthy();
    expect(asked.some((call) => call.method === 'PATCH')).toBe(false);
    await user.clear(embargo);
    await user.type(screen.getByLabelText('Notes'), 'Restart at 08:32');
    await user.click(screen.getByRole('button', { name: 'Save the record' }));
    expect(await screen.findByText('The record was changed after you had read it.')).toBeTruthy();
    expect((screen.getByLabelText('Notes') as HTMLTextAreaElement).value).toBe('Restart at 08:32');
    expect(asked.find((call) => call.method === 'PATCH')?.body).toEqual({ ...ready.record, notes: 'Restart at 08:32' });
  });

  it('cancels only after the question, and names a failed check', async () => {
    const user = userEvent.setup();
    const asked = answerWith({ 'GET /api/v1/me': contributor, [`GET ${address}`]: blocked, [`POST ${address}/cancel`]: { ...blocked, state: 'cancelled', history: [...blocked.history, { state: 'cancelled', at: '2026-05-05T08:00:00Z', by: 'A. Example', reason: null }], may: { edit: false, replace: false, send: false, cancel: false, message: false } } });
    drawAt(page);
    expect(await screen.findByText('One check failed: Circuits match run sheet RS-000123. Send a new file.')).toBeTruthy();
    await user.click(screen.getByRole('button', { name: 'Cancel this submission' }));
    expect(asked.some((call) => call.method === 'POST')).toBe(false);
    await user.click(screen.getByRole('button', { name: 'Yes, cancel it' }));
    expect(await screen.findByText(/^Cancelled by A\. Example/)).toBeTruthy();
    expect(screen.queryByRole('button', { name: 'Send to review' })).toBeNull();
  });

  it('links to its entry once frozen and has nothing left to change', async () => {
    answerWith({ 'GET /api/v1/me': contributor, [`GET ${address}`]: frozen });
    drawAt(page);
    expect((await screen.findByRole('link', { name: 'EVB-000042.1' })).getAttribute('href')).toBe('/entries/EVB-000042/v/1');
    expect(screen.queryByRole('button', { name: /Save|Replace|Cancel|Send/ })).toBeNull();
  });

  it('is a closed door to others, in the registry’s words', async () => {
    answerWith({ 'GET /api/v1/me': contributor, [`GET ${address}`]: new Refusal(403, 'not-allowed', 'It belongs to another organisation.') });
    drawAt(page);
    expect(await screen.findByRole('heading', { name: 'This submission is not open to you' })).toBeTruthy();
    expect(screen.getByText('It belongs to another organisation.')).toBeTruthy();
  });

  it('says plainly that a figure is not determined, with the reason', async () => {
    answerWith({ 'GET /api/v1/me': contributor, [`GET ${address}`]: ready });
    drawAt(page);
    expect((await screen.findByText('The ideal identity turns nothing, so no angle can be read from it.')).closest('tr')?.textContent).toContain('Not determined by this gate set.');
  });
});
