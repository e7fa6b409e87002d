import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import { CampaignPage } from '#web/features/steward/components/campaign-page.tsx';
import { CampaignsPage } from '#web/features/steward/components/campaigns-page.tsx';
import { countWords, ended, planWords, standingWords } from '#web/features/steward/campaign-words.ts';
import { curator } from '#tests/support/fixtures/desk-people.ts';
import { campaignListFixture, finishedCampaign, methodsFixture, pausedCampaign, planFixture, runningCampaign } from '#tests/support/fixtures/method-results.ts';
import { answerWith, drawAt, Refusal } from '#tests/web/desk/support.tsx';

const steward = { ...curator, curator: false, steward: true };
const base = { 'GET /api/v1/me': steward, 'GET /api/v1/methods': methodsFixture, 'GET /api/v1/campaigns': campaignListFixture, 'GET /api/v1/campaigns/plan': planFixture };
const at = '/api/v1/campaigns/C-000002';
const drawOne = () => drawAt(<CampaignPage id="C-000002" />, '/steward/campaigns/C-000002');

describe('words of a campaign', () => {
  it('counts add up to the total, and parts of nothing are left out', () => {
    expect(countWords(runningCampaign.counts)).toBe('2 of 24 estimated, 1 failed, 1 running, 20 waiting');
    expect(countWords(finishedCampaign.counts)).toBe('23 of 24 estimated, 1 failed');
    expect(ended(finishedCampaign.counts)).toBe(finishedCampaign.counts.total);
  });

  it('say what a start would do and what it leaves out, with the reason', () => {
    expect(planWords(planFixture)).toEqual([
      '21 versions of entries would be estimated with M2.',
      '3 versions have a result by M2 already and are not estimated again.',
      '1 version under embargo is left out. Once public, a later campaign takes it up.',
      '2 versions withdrawn are left out: the data is no longer used.',
    ]);
    expect(planWords({ ...planFixture, toEstimate: 0, embargoed: 0, withdrawn: 0 })).toEqual(['Nothing to estimate: every public version has a result by M2 already.']);
  });

  it('say why nothing runs', () => {
    expect(standingWords({ ...runningCampaign, held: true })).toMatch(/^Held back\. Estimates and run sheets of contributors come first/);
    expect(standingWords(pausedCampaign)).toMatch(/^Paused\. Nothing is handed out/);
  });
});

describe('methods and campaigns', () => {
  it('lists versions with their standing and campaigns with how far they are', async () => {
    answerWith(base);
    drawAt(<CampaignsPage />, '/steward/campaigns');
    const methods = await screen.findByRole('table', { name: 'Method versions' });
    expect(within(methods).getAllByRole('row').slice(1).map((row) => row.textContent)).toEqual([expect.stringContaining('M1Official8'), expect.stringContaining('M2Draft16')]);
    const list = await screen.findByRole('table', { name: 'Campaigns' });
    expect(within(list).getByRole('link', { name: 'C-000002' }).getAttribute('href')).toBe('/steward/campaigns/C-000002');
  });

  it('starts only after a second word, with what it will do said before, and goes to the campaign', async () => {
    const user = userEvent.setup();
    const asked = answerWith({ ...base, 'POST /api/v1/campaigns': runningCampaign });
    const { router } = drawAt(<CampaignsPage />, '/steward/campaigns');
    expect(await screen.findByText('21 versions of entries would be estimated with M2.')).toBeTruthy();
    await user.click(screen.getByRole('button', { name: 'Start a campaign with M2' }));
    expect(asked.some((call) => call.method === 'POST')).toBe(false);
    await user.click(screen.getByRole('button', { name: 'Yes, start it' }));
    await waitFor(() => expect(router.state.location.pathname).toBe('/steward/campaigns/C-000002'));
    expect(asked.find((call) => call.method === 'POST')?.body).toEqual({ method: 'M2' });
  });

  it('offers no start where nothing is left to estimate, and says what the registry refuses', async () => {
    const user = userEvent.setup();
    answerWith({ ...base, 'POST /api/v1/campaigns': new Refusal(409, 'already-exists', 'A campaign for M2 is open already: C-000002. Let it end, or cancel it.'), 'GET /api/v1/campaigns/plan': (call: { search: string }) => (call.search.includes('M1') ? { ...planFixture, method: 'M1', toEstimate: 0 } : planFixture) });
    drawAt(<CampaignsPage />, '/steward/campaigns');
    await user.click(await screen.findByRole('button', { name: 'Start a campaign with M2' }));
    await user.click(screen.getByRole('button', { name: 'Yes, start it' }));
    expect((await screen.findByRole('alert')).textContent).toContain('A campaign for M2 is open already: C-000002.');
    await user.selectOptions(screen.getByLabelText('Method version'), 'M1');
    expect(await screen.findByText(/^Nothing to estimate/)).toBeTruthy();
    expect(screen.queryByRole('button', { name: /^Start a campaign/ })).toBeNull();
    expect(screen.queryByRole('alert')).toBeNull();
  });

  it('with no campaign says what one is for', async () => {
    answerWith({ ...base, 'GET /api/v1/campaigns': { items: [], nextCursor: null } });
    drawAt(<CampaignsPage />, '/steward/campaigns');
    expect(await screen.findByRole('heading', { name: 'No campaign yet' })).toBeTruthy();
  });
});

describe('a campaign', () => {
  it('shows how far it is, what runs, and what failed with its reason', async () => {
    answerWith({ ...base, [`GET ${at}`]: runningCampaign });
    drawOne();
    expect((await screen.findByRole('progressbar', { name: /^2 of 24 estimated/ })).getAttribute('aria-valuenow')).toBe('13');
    expect(screen.getByRole('table', { name: 'Entries being estimated now' }).textContent).toContain('EVB-000007.1replicates');
    expect(screen.getByRole('table', { name: 'Entries without a result, with the reason' }).textContent).toContain('no memory left');
  });

  it.each([
    ['running', runningCampaign, ['Pause', 'Try the 1 failed one again', 'Cancel this campaign']],
    ['paused', pausedCampaign, ['Go on', 'Cancel this campaign']],
    ['finished', finishedCampaign, ['Try the 1 failed one again']],
    ['cancelled', { ...finishedCampaign, state: 'cancelled' }, []],
  ])('%s offers what may be done then and nothing else', async (_state, view, acts) => {
    answerWith({ ...base, [`GET ${at}`]: view });
    drawOne();
    await screen.findByRole('progressbar', { name: /estimated/ });
    expect(screen.queryAllByRole('button').map((b) => b.textContent)).toEqual(acts);
  });

  it('paused and resumed shows its new state at once', async () => {
    const user = userEvent.setup();
    answerWith({ ...base, [`GET ${at}`]: runningCampaign, [`POST ${at}/pause`]: pausedCampaign, [`POST ${at}/resume`]: runningCampaign });
    drawOne();
    await user.click(await screen.findByRole('button', { name: 'Pause' }));
    expect((await screen.findByRole('status')).textContent).toMatch(/^Paused/);
    await user.click(screen.getByRole('button', { name: 'Go on' }));
    await waitFor(() => expect(screen.getByRole('status').textContent).toMatch(/^Running/));
  });

  it('is cancelled only after a second word', async () => {
    const user = userEvent.setup();
    const asked = answerWith({ ...base, [`GET ${at}`]: pausedCampaign, [`POST ${at}/cancel`]: { ...pausedCampaign, state: 'cancelled' } });
    drawOne();
    await user.click(await screen.findByRole('button', { name: 'Cancel this campaign' }));
    expect(asked.some((call) => call.method === 'POST')).toBe(false);
    await user.click(screen.getByRole('button', { name: 'Yes, cancel it' }));
    await waitFor(() => expect(screen.getByRole('status').textContent).toMatch(/^Cancelled/));
  });

  it('that is not there, or not open to the reader, says so', async () => {
    answerWith(base);
    const gone = drawOne();
    expect(await screen.findByRole('heading', { name: 'There is no such campaign' })).toBeTruthy();
    gone.unmount();
    answerWith({ ...base, [`GET ${at}`]: new Refusal(403, 'not-allowed', 'This is not open to you. It asks for a role that you do not hold.') });
    drawOne();
    expect(await screen.findByRole('heading', { name: 'The campaign is not open to you' })).toBeTruthy();
    vi.unstubAllGlobals();
  });
});
