import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { contributor, larkspur, tokens } from '#tests/support/fixtures/desk-people.ts';
import { TokensPage } from '#web/features/tokens/components/tokens-page.tsx';
import { answerWith, drawAt } from './support.tsx';

const made = { id: 'tk-9', name: 'Night run', organisation: larkspur.id, createdBy: 'A. Example', createdAt: '2026-05-20T08:00:00Z', lastUsedAt: null, hint: 'evb_77aa…', secret: 'evb_77aa0b6e0c1f4b7d' };

describe('the tokens of an organisation', () => {
  it('shows a new secret once, with the focus on it, and not in the list', async () => {
    const user = userEvent.setup();
    const asked = answerWith({ 'GET /api/v1/me': contributor, 'GET /api/v1/tokens': tokens, 'POST /api/v1/tokens': made });
    drawAt(<TokensPage organisation={larkspur} />);
    await screen.findByRole('rowheader', { name: /^Cryostat pipeline/ });
    await user.click(screen.getByRole('button', { name: 'Make a token' }));
    expect(await screen.findByText('Name the token after what will use it.')).toBeTruthy();
    await user.type(screen.getByLabelText('What will use it'), 'Night run{Enter}');
    const secret = await screen.findByLabelText('Secret');
    expect((secret as HTMLInputElement).value).toBe(made.secret);
    expect(document.activeElement).toBe(secret);
    expect(asked.find((call) => call.method === 'POST')?.body).toEqual({ name: 'Night run', organisation: larkspur.id });
    expect(asked.find((call) => call.method === 'POST')?.headers.get('x-csrf-token')).toBe('csrf-1');
    await user.click(screen.getByRole('button', { name: 'I have it' }));
    expect(screen.queryByDisplayValue(made.secret)).toBeNull();
  });

  it('revokes only after a second word, and Escape leaves the question', async () => {
    const user = userEvent.setup();
    const asked = answerWith({ 'GET /api/v1/me': contributor, 'GET /api/v1/tokens': tokens, 'DELETE /api/v1/tokens/tk-1': null });
    drawAt(<TokensPage organisation={larkspur} />);
    await user.click(await screen.findByRole('button', { name: 'Revoke Cryostat pipeline' }));
    await user.keyboard('{Escape}');
    expect(document.activeElement).toBe(screen.getByRole('button', { name: 'Revoke Cryostat pipeline' }));
    expect(asked.some((call) => call.method === 'DELETE')).toBe(false);
    await user.click(screen.getByRole('button', { name: 'Revoke Cryostat pipeline' }));
    await user.click(within(screen.getByRole('group', { name: 'Revoke Cryostat pipeline' })).getByRole('button', { name: 'Yes, revoke it' }));
    await waitFor(() => expect(asked.filter((call) => call.method === 'DELETE').map((call) => call.path)).toEqual(['/api/v1/tokens/tk-1']));
    await waitFor(() => expect(asked.filter((call) => call.method === 'GET' && call.path === '/api/v1/tokens')).toHaveLength(2));
  });
});
