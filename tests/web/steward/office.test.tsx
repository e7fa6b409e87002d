import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { jobsOverview, mailOverview, peopleOverview } from '#shared/contracts/office.ts';
import { JobsPage } from '#web/features/steward/components/jobs-page.tsx';
import { MailPage } from '#web/features/steward/components/mail-page.tsx';
import { PeoplePage } from '#web/features/steward/components/people-page.tsx';
import { queueName, queueWords } from '#web/features/steward/campaign-words.ts';
import { queueNames } from '#api/jobs/queue-names.ts';
import { curator } from '#tests/support/fixtures/desk-people.ts';
import { draftResultsFixture } from '#tests/support/fixtures/method-results.ts';
import { boardFixture } from '#tests/support/fixtures/boards.ts';
import { answerWith, drawAt } from '#tests/web/desk/support.tsx';
import { answer, openPage } from '#tests/web/support.tsx';

beforeEach(() => { localStorage.clear(); vi.stubGlobal('scrollTo', () => undefined); });
afterEach(() => { vi.unstubAllGlobals(); });

const steward = { ...curator, curator: false, steward: true };
const id = '11111111-1111-4111-8111-111111111111';
const jobs = jobsOverview.parse({
  queues: queueNames.map((name) => ({ name, waiting: 0, later: 1, running: 0, failed: name === 'deliver-mail' ? 1 : 0 })), running: [],
  failed: [
    { id, queue: 'deliver-mail', subject: null, attempts: 13, reason: 'the server is away', at: '2026-12-01T09:00:00Z', retriable: true },
    { id: id.replaceAll('1', '2'), queue: 'estimate', subject: 'submission:S-000007', attempts: 4, reason: 'A worker thread could not start: no memory', at: '2026-12-01T08:00:00Z', retriable: false },
  ],
});

describe('the job queue', () => {
  it('names queues in words; one without words by its name', () => {
    expect(new Set(Object.values(queueWords)).size).toBe(Object.keys(queueWords).length);
    expect(queueName('re-estimate')).toBe('Campaign estimates');
    expect(queueName('another')).toBe('another');
  });

  it('tells what failed with its reason, and tries again only what another attempt can help', async () => {
    const user = userEvent.setup();
    const asked = answerWith({ 'GET /api/v1/me': steward, 'GET /api/v1/jobs': jobs, [`POST /api/v1/jobs/deliver-mail/${id}/retry`]: null });
    drawAt(<JobsPage />);
    const failed = await screen.findByRole('table', { name: 'Jobs whose last attempt failed' });
    expect(within(failed).getAllByRole('row').slice(1).map((row) => row.textContent)).toEqual([expect.stringContaining('the server is away'), expect.stringContaining('Answered where it belongs')]);
    await user.click(within(failed).getByRole('button', { name: 'Try again Mail' }));
    await waitFor(() => expect(asked.filter((call) => call.method === 'POST')).toHaveLength(1));
    await waitFor(() => expect(asked.filter((call) => call.path === '/api/v1/jobs').length).toBeGreaterThan(1));
  });

  it('says so where nothing runs and nothing has failed', async () => {
    answerWith({ 'GET /api/v1/me': steward, 'GET /api/v1/jobs': { ...jobs, failed: [] } });
    drawAt(<JobsPage />);
    expect(await screen.findByText('Nothing runs.')).toBeTruthy();
    expect(screen.getByRole('heading', { name: 'No job has failed' })).toBeTruthy();
  });
});

describe('mail and people', () => {
  it('a message that could not be sent stands with the fault of its last attempt', async () => {
    answerWith({
      'GET /api/v1/mail': mailOverview.parse({ waiting: 1, failing: 1, sent: 0, items: [{ id, recipient: 'ida@larkspur.example', subject: 'Your submission S-000007', topic: 'submission', topicId: 'S-000007', queuedAt: '2026-12-01T09:00:00Z', sentAt: null, attempts: 2, lastError: 'connect ECONNREFUSED' }] }),
    });
    drawAt(<MailPage />);
    expect(await screen.findByText('Not yet, after 2 attempts: connect ECONNREFUSED')).toBeTruthy();
    expect(screen.getByText(/^1 message was tried and could not be sent\./)).toBeTruthy();
  });

  it('people stand with their offices and organisations', async () => {
    answerWith({
      'GET /api/v1/people': peopleOverview.parse({
        people: [{ id, name: 'Ida Marsh', email: 'ida@larkspur.example', roles: ['curator'], memberships: [{ organisation: 'Larkspur Quantics', role: 'member' }], lastSignInAt: null, disabled: false }],
        organisations: [{ id: 'larkspur-quantics', name: 'Larkspur Quantics', kind: 'provider', members: 1, entries: 4 }],
      }),
    });
    drawAt(<PeoplePage />);
    expect((await screen.findByRole('row', { name: /Ida Marsh/ })).textContent).toContain('Larkspur Quantics (member)CuratorNever');
    expect(screen.getByRole('row', { name: /Provider/ }).textContent).toContain('14');
  });
});

describe('the office', () => {
  it('is offered to stewards, and opens with campaigns', async () => {
    openPage('/steward', (path) => (path === '/api/v1/me' ? answer(steward) : null));
    expect(await screen.findByRole('heading', { level: 1, name: 'Methods and campaigns' })).toBeTruthy();
    expect(screen.getAllByRole('link', { name: 'Office' }).length).toBeGreaterThan(0);
  });

  it('is closed to everyone else, who are told who they are', async () => {
    openPage('/steward/jobs', (path) => (path === '/api/v1/me' ? answer(curator) : null));
    expect(await screen.findByRole('heading', { name: 'The steward’s office is not open to you' })).toBeTruthy();
    expect(screen.queryByRole('link', { name: 'Office' })).toBeNull();
  });
});

describe('method versions for readers', () => {
  it('an entry shows results by other versions with their difference, and is silent where there are none', async () => {
    const page = openPage('/entries/EVB-000042', (path) => (path.endsWith('/results') ? answer(draftResultsFixture) : null));
    const table = await screen.findByRole('table', { name: 'Retained signal at depth 16 by method version' });
    expect(within(table).getAllByRole('row')[2]?.textContent).toBe('M2Draft, added later0.969520.96582 to 0.97322+0.00002, 0.01 standard errorsYesJSON');
    page.unmount();
    openPage('/entries/EVB-000042');
    await screen.findByRole('table', { name: 'Versions of this entry' });
    expect(screen.queryByRole('heading', { name: 'Other method versions' })).toBeNull();
  });

  it('a board offers a choice of versions only where there are several, keeps it in the address, and says what a draft is', async () => {
    const user = userEvent.setup();
    const two = { ...boardFixture, methods: [...boardFixture.methods, { id: 'M2', status: 'draft' as const, results: 3 }] };
    const { router, unmount } = openPage('/boards/quarter-turn-1q/1', (path, search) => (path === '/api/v1/boards/quarter-turn-1q/1' ? answer({ ...two, method: search.get('method') ?? 'M1' }) : null));
    const choice = await screen.findByLabelText('Method version');
    expect(screen.queryByText(/nothing is ranked by it/)).toBeNull();
    await user.selectOptions(choice, 'M2');
    expect(router.state.location.search).toBe('?method=M2');
    expect(await screen.findByText(/^Draft version, not the registry’s figures; nothing is ranked by it\./)).toBeTruthy();
    await user.selectOptions(screen.getByLabelText('Method version'), 'M1');
    await waitFor(() => expect(router.state.location.search).toBe(''));
    unmount();
    openPage('/boards/quarter-turn-1q/1');
    await screen.findByRole('table', { name: /Retained signal at depth 16/ });
    expect(screen.queryByLabelText('Method version')).toBeNull();
  });
});
