import { QueryClientProvider } from '@tanstack/react-query';
import { render, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { createMemoryRouter, RouterProvider } from 'react-router-dom';
import { beforeEach, describe, expect, it } from 'vitest';
import { contributor, larkspur, onlooker, signedOut, tokens, twoOrganisations } from '#tests/support/fixtures/desk-people.ts';
import { ready, sheets, submissions } from '#tests/support/fixtures/desk-submissions.ts';
import { deskRoutes } from '#web/app/desk-routes.tsx';
import { lazyRoute } from '#web/app/lazy-route.ts';
import { createQueryClient } from '#web/app/query-client.ts';
import { answerWith } from './support.tsx';

const nothing = { items: [], nextCursor: null };
const base = { 'GET /api/v1/submissions': submissions, 'GET /api/v1/run-sheets': sheets, 'GET /api/v1/organisations/larkspur-quantics/devices': nothing, 'GET /api/v1/tokens': tokens };
const open = (path: string) => {
  const client = createQueryClient();
  const router = createMemoryRouter([{ hydrateFallbackElement: <></>, children: deskRoutes((load) => lazyRoute(client, load)) }], { initialEntries: [path] });
  render(<QueryClientProvider client={client}><RouterProvider router={router} /></QueryClientProvider>);
  return router;
};
beforeEach(() => localStorage.clear());

describe('the desk', () => {
  it('asks strangers to sign in and brings them back to the same page', async () => {
    answerWith({ ...base, 'GET /api/v1/me': signedOut });
    open('/desk/submissions?x=1');
    expect((await screen.findByRole('link', { name: 'Sign in' })).getAttribute('href')).toBe(`/auth/google?returnTo=${encodeURIComponent('/desk/submissions?x=1')}`);
  });

  it('is closed to people of no contributing organisation, but a submission they may read is not', async () => {
    answerWith({ ...base, 'GET /api/v1/me': onlooker, 'GET /api/v1/submissions/S-000218': ready });
    const router = open('/desk');
    expect(await screen.findByRole('heading', { name: 'The desk is not open to you' })).toBeTruthy();
    await router.navigate('/desk/submissions/S-000218');
    expect(await screen.findByRole('heading', { level: 1, name: 'Spring run, left half' })).toBeTruthy();
    expect(screen.queryByRole('navigation', { name: 'Your work' })).toBeNull();
  });

  it('lists what is there, each with its state and date', async () => {
    answerWith({ ...base, 'GET /api/v1/me': contributor });
    open('/desk');
    expect((await screen.findByRole('link', { name: 'Summer run, right half' })).closest('tr')?.textContent).toContain('Checking, 40\u202f%');
    expect((await screen.findByRole('rowheader', { name: 'RS-000119' })).closest('tr')?.textContent).toContain('Not drawn');
    expect(screen.getByRole('link', { name: 'Add a device' })).toBeTruthy();
  });

  it('says on an empty desk what to do first', async () => {
    answerWith({ 'GET /api/v1/me': contributor, 'GET /api/v1/submissions': nothing, 'GET /api/v1/run-sheets': nothing, 'GET /api/v1/organisations/larkspur-quantics/devices': nothing });
    open('/desk');
    expect(await screen.findByRole('heading', { name: 'First steps' })).toBeTruthy();
    expect(screen.getByRole('link', { name: 'Add a device.' }).getAttribute('href')).toBe('/desk/devices');
  });

  it('on the page of an empty list what to do first is a heading of the second level, right under the title', async () => {
    for (const [path, name] of [['/desk/run-sheets', 'No run sheet yet'], ['/desk/submissions', 'Nothing submitted yet']] as const) {
      answerWith({ 'GET /api/v1/me': contributor, 'GET /api/v1/submissions': nothing, 'GET /api/v1/run-sheets': nothing });
      open(path);
      expect(await screen.findByRole('heading', { level: 2, name })).toBeTruthy();
      document.body.innerHTML = '';
    }
  });

  it('asks for the lists of the organisation chosen, and remembers the choice', async () => {
    const user = userEvent.setup();
    const asked = answerWith({ ...base, 'GET /api/v1/me': twoOrganisations });
    open('/desk/tokens');
    await screen.findByRole('rowheader', { name: /^Cryostat pipeline/ });
    expect(asked.find((call) => call.path === '/api/v1/tokens')?.search).toBe(`?organisation=${larkspur.id}`);
    await user.selectOptions(screen.getByLabelText('For'), 'Northfell Laboratory');
    await waitFor(() => expect(asked.filter((call) => call.path === '/api/v1/tokens').at(-1)?.search).toBe('?organisation=northfell-laboratory'));
    expect(localStorage.getItem('evenbeam.organisation')).toBe('northfell-laboratory');
  });
});
