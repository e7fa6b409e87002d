import { act, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import type { UseQueryResult } from '@tanstack/react-query';
import { MemoryRouter } from 'react-router-dom';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { LoadingFrame } from '#web/components/loading-frame.tsx';
import { Read } from '#web/components/read.tsx';
import { ApiError, timeoutError } from '#web/lib/api-error.ts';

const refetch = vi.fn(() => Promise.resolve());
const query = (state: { data?: string; error?: Error }): UseQueryResult<string> => ({ data: state.data, error: state.error ?? null, isPending: state.data === undefined && !state.error, refetch }) as unknown as UseQueryResult<string>;
const refused = (status: number, detail: string) => new ApiError({ fault: 'problem', status, code: 'x', title: 't', detail, reference: '7f3a-19c2' });
const show = (state: { data?: string; error?: Error }) => render(<MemoryRouter initialEntries={['/a?b=1']}><Read query={query(state)} what="The board" loading="Loading the board" missing={<p>Nothing there</p>}>{(data) => <p>{data}</p>}</Read></MemoryRouter>);

afterEach(() => { vi.useRealTimers(); });

describe('a read and its states', () => {
  it('shows the frame of what is coming only after 400 ms', () => {
    vi.useFakeTimers();
    render(<LoadingFrame label="Loading the board" rows={2} />);
    act(() => { vi.advanceTimersByTime(399); });
    expect(screen.queryByText('Loading the board')).toBeNull();
    act(() => { vi.advanceTimersByTime(1); });
    expect(screen.getByRole('status').textContent).toContain('Loading the board');
    expect(document.querySelectorAll('.ghost > div')).toHaveLength(2);
  });

  it('gives the content as soon as there is some', () => {
    show({ data: 'Twelve rows' });
    expect(screen.getByText('Twelve rows')).toBeTruthy();
  });

  it('a fault says what could not be read and why, and can be tried again', async () => {
    show({ error: timeoutError('ten') });
    expect(screen.getByRole('alert').textContent).toContain('The board could not be readThe registry did not answer within ten seconds. Nothing of yours is lost.');
    await userEvent.click(screen.getByRole('button', { name: 'Try again' }));
    expect(refetch).toHaveBeenCalledOnce();
  });

  it('a fault with a reference names it', () => {
    show({ error: refused(500, 'The fault is ours.') });
    expect(screen.getByText('Reference 7f3a-19c2')).toBeTruthy();
  });

  it('a closed door says whose it is and offers another sign-in that comes back here', () => {
    show({ error: refused(403, 'It belongs to another organisation.') });
    expect(screen.getByRole('heading', { name: 'The board is not open to you' })).toBeTruthy();
    expect(screen.getByText('It belongs to another organisation.')).toBeTruthy();
    expect(screen.getByRole('link').getAttribute('href')).toBe('/auth/google?returnTo=%2Fa%3Fb%3D1');
  });

  it('asks for sign-in where that is what is missing, and has its own words for what is not there', () => {
    const { unmount } = show({ error: refused(401, 'Sign in first.') });
    expect(screen.getByRole('link', { name: 'Sign in' })).toBeTruthy();
    unmount();
    show({ error: refused(404, 'None.') });
    expect(screen.getByText('Nothing there')).toBeTruthy();
  });
});
