import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useParams } from 'react-router-dom';
import { describe, expect, it } from 'vitest';
import { curator } from '#tests/support/fixtures/desk-people.ts';
import { claimed, claimedByAnother, emptyQueue, queue, unclaimed } from '#tests/support/fixtures/desk-reviews.ts';
import { computingOpinions, opinionsFixture } from '#tests/support/fixtures/opinions.ts';
import { answerWith, drawAt, Refusal } from '#tests/web/desk/support.tsx';
import { ReviewDesk } from '#web/features/reviews/components/review-desk.tsx';

const at = '/api/v1/reviews/S-000218';
const base = { 'GET /api/v1/me': curator, 'GET /api/v1/reviews': queue, 'GET /api/v1/submissions/S-000218/opinions': opinionsFixture, 'GET /api/v1/submissions/S-000209/opinions': computingOpinions };
function Desk() {
  const { id } = useParams();
  return <ReviewDesk id={id ?? null} />;
}
const draw = (path: string) => drawAt(<Desk />, path, '/review/:id?');

describe('the curator’s desk', () => {
  it('marks the reader’s place in the queue and names what is kept from them', async () => {
    answerWith({ ...base, [`GET ${at}`]: claimed });
    draw('/review/S-000218');
    const list = await screen.findByRole('complementary', { name: 'Review queue' });
    expect(within(list).getByRole('link', { current: 'page' }).textContent).toContain('Meadow-5');
    expect(within(list).getByText(/^Three more are kept from you/)).toBeTruthy();
    expect(within(list).getByText('S-000212, Tolland Vale Photonics')).toBeTruthy();
  });

  it('asks to claim before deciding', async () => {
    const user = userEvent.setup();
    const asked = answerWith({ ...base, [`GET ${at}`]: unclaimed, [`POST ${at}/claim`]: claimed });
    draw('/review/S-000218');
    expect(await screen.findByRole('heading', { name: 'Decision' })).toBeTruthy();
    expect(screen.queryByRole('radio')).toBeNull();
    await user.click(screen.getByRole('button', { name: 'Claim this case' }));
    expect(await screen.findAllByRole('radio')).toHaveLength(3);
    expect(asked.filter((call) => call.method === 'POST').map((call) => call.path)).toEqual([`${at}/claim`]);
  });

  it('is closed while another curator reads', async () => {
    answerWith({ ...base, [`GET ${at}`]: claimedByAnother });
    draw('/review/S-000218');
    expect(await screen.findByText(/^D\. Someone has claimed this case\./)).toBeTruthy();
    expect(screen.queryByRole('button', { name: /Claim|Accept|Decide/ })).toBeNull();
  });

  it('sends nothing without outcome, reason and the curator’s word; then decides and goes on to the next case', async () => {
    const user = userEvent.setup();
    const next = { ...unclaimed, submission: { ...unclaimed.submission, id: 'S-000209', title: 'Weir-11, spring run' } };
    const asked = answerWith({ ...base, [`GET ${at}`]: claimed, 'GET /api/v1/reviews/S-000209': next, [`POST ${at}/decision`]: { submission: 'S-000218', state: 'frozen', entry: { accession: 'EVB-000042', version: 1 } } });
    const { router } = draw('/review/S-000218');
    await user.click(await screen.findByRole('button', { name: 'Decide' }));
    expect(await screen.findByText('Choose what you decide.')).toBeTruthy();
    expect(screen.getByText('A decision needs its reason.')).toBeTruthy();
    expect(screen.getByText('Declare that you have no tie to the organisation.')).toBeTruthy();
    expect(asked.some((call) => call.method === 'POST')).toBe(false);
    await user.click(screen.getByRole('radio', { name: /^Accept/ }));
    await user.type(screen.getByLabelText('Reason'), 'Sound.');
    await user.click(screen.getByRole('checkbox', { name: /^I have no tie to Larkspur Quantics/ }));
    await user.click(screen.getByRole('button', { name: 'Accept and freeze' }));
    await waitFor(() => expect(router.state.location.pathname).toBe('/review/S-000209'));
    expect(asked.find((call) => call.path.endsWith('/decision'))?.body).toEqual({ outcome: 'accept', reason: 'Sound.', noInterest: true });
    expect(await screen.findByRole('heading', { level: 1, name: 'Weir-11, spring run' })).toBeTruthy();
    expect(screen.getByRole('link', { name: 'EVB-000042.1' })).toBeTruthy();
  });

  it('says so when nothing waits', async () => {
    answerWith({ ...base, 'GET /api/v1/reviews': emptyQueue });
    draw('/review');
    expect(await screen.findByRole('heading', { name: 'Nothing waits for you' })).toBeTruthy();
  });

  it('shows the notes first and the other checks when asked', async () => {
    const user = userEvent.setup();
    answerWith({ ...base, [`GET ${at}`]: claimed });
    draw('/review/S-000218');
    expect(await screen.findByText('Two circuits ran twice')).toBeTruthy();
    expect(screen.queryByText('Estimate settled')).toBeNull();
    await user.click(screen.getByRole('button', { name: 'Show all' }));
    expect(screen.getByText('Estimate settled')).toBeTruthy();
  });

  it('keeps the words of a refused decision', async () => {
    const user = userEvent.setup();
    answerWith({ ...base, [`GET ${at}`]: claimed, [`POST ${at}/decision`]: new Refusal(409, 'wrong-state', 'S-000218 is cancelled; it cannot be decided.') });
    draw('/review/S-000218');
    await user.click(await screen.findByRole('radio', { name: /^Return/ }));
    await user.type(screen.getByLabelText('Reason'), 'Name the restart.');
    await user.click(screen.getByRole('checkbox', { name: /^I have no tie/ }));
    await user.click(screen.getByRole('button', { name: 'Return to the contributor' }));
    expect(await screen.findByText('S-000218 is cancelled; it cannot be decided.')).toBeTruthy();
    expect((screen.getByLabelText('Reason') as HTMLTextAreaElement).value).toBe('Name the restart.');
  });
});
