import { readFile } from 'node:fs/promises';
import { beforeAll, describe, expect } from 'vitest';
import { measureSheet, type Measured } from '../support/measured.ts';
import { useSteps } from '../support/steps.ts';
import type { Visitor } from '../support/visitor.ts';
import type { Open } from '../support/visitors.ts';

const title = 'End-to-end run on q3';
const question = 'Was q2 idle while the sheet was run?';
const reason = 'Every check passed and the question was answered.';

/** The steps follow one another: each begins where the one before it ended. */
export const wholeStory = (open: Open) => describe('a dataset on its way from a run sheet to the board', () => {
  const step = useSteps();
  let contributor: Visitor;
  let curator: Visitor;
  let sheetBytes: Buffer;
  let measured: Measured;
  let submission = '';
  let accession = '';

  beforeAll(async () => {
    contributor = await open({ lasting: true });
    curator = await open({ lasting: true });
  });

  step('a contributor signs in through the chooser and is back as herself', async () => {
    const { page, signIn } = contributor;
    await page.goto('/');
    await signIn('Ida Marsh');
    await page.getByRole('banner').getByRole('link', { name: 'Desk' }).click();
    await page.getByRole('heading', { level: 1, name: 'Desk' }).waitFor();
  });

  step('she plans a run sheet for one qubit, and the registry draws it', async () => {
    const { page } = contributor;
    await page.getByRole('link', { name: 'Plan a run sheet' }).click();
    await page.getByLabel('Device', { exact: true }).selectOption({ label: 'Meadow-5' });
    await page.getByLabel('Gate class').selectOption('quarter-turn-1q/1');
    await page.getByLabel('Qubit', { exact: true }).fill('q3');
    await page.getByLabel('Circuits').fill('200');
    await page.getByLabel('Shots each').fill('600');
    await page.getByRole('button', { name: 'Draw this run sheet' }).click();
    await page.getByRole('heading', { level: 1, name: /^Run sheet RS-\d{6}$/ }).waitFor();
    await page.getByRole('link', { name: 'Download the sheet, JSON' }).waitFor();
  });

  step('she downloads the sheet, which names its device, its seal and every circuit', async () => {
    const { page } = contributor;
    const [download] = await Promise.all([page.waitForEvent('download'), page.getByRole('link', { name: 'Download the sheet, JSON' }).click()]);
    sheetBytes = await readFile(await download.path());
    measured = measureSheet(sheetBytes, title);
    expect(measured.dataset.patches[0]?.circuits).toHaveLength(250);
    expect(measured.dataset.register).toEqual(['q3']);
  });

  step('she drops the file of counts, it is read in her browser, and nothing is sent before she says so', async () => {
    const { page } = contributor;
    const sent: string[] = [];
    page.on('request', (request) => {
      if (request.method() === 'POST') sent.push(request.url());
    });
    await page.getByRole('link', { name: 'Submit its counts' }).click();
    await page.locator('input[type=file]').setInputFiles({ name: 'meadow-5-q3.json', mimeType: 'application/json', buffer: measured.bytes });
    await page.getByText('follows the format. Nothing has been sent yet.').waitFor();
    expect(sent).toEqual([]);
    await page.getByRole('button', { name: 'Submit this dataset' }).click();
    await page.getByRole('heading', { level: 1, name: title }).waitFor();
    submission = new URL(page.url()).pathname.split('/').at(-1) ?? '';
    expect(submission).toMatch(/^S-\d{6}$/);
    expect(sent).toHaveLength(1);
  });

  step('she watches the registry check and estimate it, without doing anything', async () => {
    const { page } = contributor;
    await page.getByText('Bootstrap', { exact: true }).first().waitFor();
    await page.getByText(/^2\s000 replicates, 22 of 23 figures with intervals$/).waitFor();
    await page.getByRole('button', { name: 'Send to review' }).waitFor();
    expect(await page.getByRole('progressbar', { name: 'Checks and estimate' }).count()).toBe(0);
  });

  step('she fills in the record; only then can she send it to review', async () => {
    const { page } = contributor;
    expect(await page.getByRole('button', { name: 'Send to review' }).isDisabled()).toBe(true);
    await page.getByLabel('How the device was reached').fill('Our own device, in our own laboratory.');
    await page.getByLabel('Interests').fill('The contributor is employed by the provider.');
    await page.getByRole('button', { name: 'Save the record' }).click();
    await page.getByText('Saved.', { exact: true }).waitFor();
    await page.getByRole('button', { name: 'Send to review' }).click();
    await page.getByRole('button', { name: 'Send to review' }).waitFor({ state: 'detached' });
    await page.getByRole('list', { name: 'Life of this submission' }).getByText('In review').waitFor();
  });

  step('a curator of another organisation finds it in the queue and claims it', async () => {
    const { page, signIn } = curator;
    await page.goto('/');
    await signIn('Ruth Holloway');
    await page.getByRole('banner').getByRole('link', { name: 'Review' }).click();
    await page.getByRole('complementary', { name: 'Review queue' }).getByRole('link').filter({ hasText: submission }).click();
    await page.getByRole('heading', { level: 1, name: title }).waitFor();
    await page.getByRole('button', { name: 'Claim this case' }).click();
    await page.getByRole('group', { name: 'What do you decide?' }).waitFor();
  });

  step('the curator asks in the thread, and the contributor answers', async () => {
    await curator.page.getByLabel('Write to the thread').fill(question);
    await curator.page.getByRole('button', { name: 'Add', exact: true }).click();
    await curator.page.getByText(question, { exact: true }).waitFor();
    await contributor.page.reload();
    await contributor.page.getByText(question).waitFor();
    await contributor.page.getByLabel('Write to the thread').fill('Yes, in |0⟩.');
    await contributor.page.getByRole('button', { name: 'Add', exact: true }).click();
    await contributor.page.getByRole('list').getByText('Yes, in |0⟩.').waitFor();
  });

  step('the curator cannot decide without a choice, a reason and a declaration, then accepts', async () => {
    const { page } = curator;
    const form = page.getByRole('form', { name: 'Decision' });
    await form.getByRole('button', { name: /^Decide|^Accept|^Choose/ }).first().click();
    await form.getByText('A decision needs its reason.').waitFor();
    await form.getByText('Declare that you have no tie to the organisation.').waitFor();
    await form.getByRole('radio', { name: /^Accept/ }).check();
    await form.getByRole('textbox', { name: 'Reason' }).fill(reason);
    await form.getByRole('checkbox', { name: /^I have no tie to Larkspur Quantics/ }).check();
    await form.locator('button[type=submit]').click();
    const done = page.getByText(`${submission} is decided; its state is “frozen”.`);
    await done.waitFor();
    accession = (await done.getByRole('link').innerText()).replace(/\.1$/, '');
    expect(accession).toMatch(/^EVB-\d{6}$/);
  });

  step('the contributor reads the decision and its reason, and the way to the entry', async () => {
    const { page } = contributor;
    await page.reload();
    await page.getByText(reason).first().waitFor();
    await page.getByRole('link', { name: `${accession}.1` }).waitFor();
  });

  step('an anonymous reader finds it on the board with its interval, the same as the API says', async () => {
    const { page } = await open();
    await page.goto('/');
    await page.getByRole('banner').getByRole('link', { name: 'Boards' }).click();
    await page.getByRole('link', { name: 'Quarter turns on one qubit' }).first().click();
    const row = page.getByRole('row').filter({ hasText: accession });
    await row.waitFor();
    const answer = (await (await page.request.get(`/api/v1/entries/${accession}`)).json()) as { headline: { value: number; intervals: { level: number; low: number; high: number }[] } };
    const wide = answer.headline.intervals.find(({ level }) => level === 0.95);
    const text = (await row.innerText()).replace(/\s+/g, ' ');
    const shown = [...text.matchAll(/\d\.\d{3,4}/g)].map(([number]) => Number(number));
    for (const value of [answer.headline.value, wide?.low, wide?.high]) expect(shown.some((number) => Math.abs(number - (value ?? NaN)) <= 0.0006), `${value} in "${text}"`).toBe(true);
    await row.getByRole('link', { name: 'Meadow-5' }).click();
    await page.getByRole('heading', { level: 1, name: 'Meadow-5' }).waitFor();
    await page.getByText('Frozen. This version will not change.').waitFor();
  });

  step('the reader downloads the dataset and gets exactly the bytes that were sent', async () => {
    const { page } = await open();
    await page.goto(`/entries/${accession}`);
    const [download] = await Promise.all([page.waitForEvent('download'), page.getByRole('link', { name: 'meadow-5-q3.json' }).click()]);
    expect((await readFile(await download.path())).equals(measured.bytes)).toBe(true);
    expect(download.suggestedFilename()).toBe('meadow-5-q3.json');
    await page.getByText(reason).waitFor();
  });
});
