import { screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import type { Withdrawal } from '#shared/contracts/withdrawals.ts';
import { curator } from '#tests/support/fixtures/desk-people.ts';
import { answerWith, drawAt, type Asked } from '#tests/web/desk/support.tsx';
import { WithdrawalsPage } from '#web/features/withdrawals/components/withdrawals-page.tsx';

const waiting: Withdrawal = {
  id: 'w1', accession: 'EVB-000042', version: 1, title: 'Spring run', organisation: 'Larkspur Quantics', reason: 'The wrong qubit was recorded.', askedBy: 'M. Ashby', askedAt: '2026-05-04T08:00:00.000Z',
  answer: null, answeredBy: null, answeredAt: null, note: null, may: { confirm: true, drop: true },
};
const own: Withdrawal = { ...waiting, id: 'w2', accession: 'EVB-000043', may: { confirm: false, drop: true } };
const answered: Withdrawal = { ...waiting, id: 'w3', accession: 'EVB-000044', answer: 'dropped', answeredBy: 'R. Holm', answeredAt: '2026-05-05T08:00:00.000Z', note: 'The register is right.', may: { confirm: false, drop: false } };

let asked: Asked[] = [];
const open = (at = '/review/withdrawals') => {
  asked = answerWith({
    'GET /api/v1/me': curator, 'GET /api/v1/withdrawals': { items: [waiting, own, answered] },
    'POST /api/v1/withdrawals/w1/answer': { ...waiting, answer: 'confirmed' }, 'POST /api/v1/withdrawals/w2/answer': { ...own, answer: 'dropped' },
  });
  return drawAt(<WithdrawalsPage />, at, '/review/withdrawals');
};
const sent = () => asked.filter((call) => call.method === 'POST').map(({ path, body }) => ({ path, body }));
describe('the withdrawals page', () => {
  it('lets another curator confirm only after the declaration, and tells that it cannot be taken back', async () => {
    open();
    const one = within(await screen.findByRole('article', { name: 'Withdrawal of EVB-000042.1' }));
    expect(one.getByText(/cannot be taken back/)).toBeTruthy();
    await userEvent.click(one.getByRole('button', { name: 'Withdraw EVB-000042.1' }));
    expect(one.getByText('Declare that you have no tie to the organisation.')).toBeTruthy();
    expect(sent()).toEqual([]);
    await userEvent.click(one.getByRole('checkbox'));
    await userEvent.click(one.getByRole('button', { name: 'Withdraw EVB-000042.1' }));
    expect(sent()).toEqual([{ path: '/api/v1/withdrawals/w1/answer', body: { answer: 'confirm', noInterest: true } }]);
  });

  it('gives the one who asked no confirmation, and a way to drop it with a note', async () => {
    open();
    const one = within(await screen.findByRole('article', { name: 'Withdrawal of EVB-000043.1' }));
    expect(one.queryByRole('button', { name: /^Withdraw/ })).toBeNull();
    await userEvent.click(one.getByText('Drop it instead'));
    await userEvent.click(one.getByRole('button', { name: 'Drop the request' }));
    expect(one.getByText('Say why it is dropped.')).toBeTruthy();
    await userEvent.type(one.getByRole('textbox', { name: 'Why it is dropped' }), 'It is right.');
    await userEvent.click(one.getByRole('button', { name: 'Drop the request' }));
    expect(sent()).toEqual([{ path: '/api/v1/withdrawals/w2/answer', body: { answer: 'drop', note: 'It is right.' } }]);
  });

  it('takes the version from the address, and names what is no version', async () => {
    open('/review/withdrawals?entry=EVB-000007.2');
    const field = await screen.findByRole('textbox', { name: 'Version' });
    expect((field as HTMLInputElement).value).toBe('EVB-000007.2');
    await userEvent.clear(field);
    await userEvent.type(field, 'EVB-7');
    await userEvent.type(screen.getByRole('textbox', { name: 'Reason' }), 'Wrong qubit.');
    await userEvent.click(screen.getByRole('button', { name: 'Ask for the withdrawal' }));
    expect(await screen.findByText('"EVB-7" is not a version of an entry, such as EVB-000042.1.')).toBeTruthy();
    expect(sent()).toEqual([]);
  });
});
