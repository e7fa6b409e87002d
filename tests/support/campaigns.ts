import type { CampaignView } from '#shared/contracts/campaigns.ts';
import type { TaskInput, TaskName } from '#api/jobs/thread-tasks.ts';
import type { RunInThread } from '#api/jobs/threads.ts';
import { presentCampaign } from '#api/modules/campaigns/presenter.ts';
import { findCampaign } from '#api/modules/campaigns/store.ts';
import { accepted, withdrawn } from './life.ts';
import { makeSteward } from './people.ts';
import { makeDataset, makeDrawnSheet, type Desk } from './record.ts';
import { signInAs, type Client } from './sign-in.ts';
import type { TestApp } from './test-app.ts';

/** Frozen entries of one desk, each from a run sheet of its own; gives their accessions. */
export const makeEntries = async (app: TestApp, desk: Desk, count: number, more: Parameters<typeof accepted>[3] = {}): Promise<string[]> => {
  const accessions: string[] = [];
  for (let i = 0; i < count; i += 1) accessions.push((await accepted(app, desk, makeDataset(desk, await makeDrawnSheet(app, desk)), more)).accession);
  return accessions;
};

export const makeStewardClient = async (app: TestApp): Promise<Client> => signInAs(app, await makeSteward(app.deps.orm.em.fork()));

export const viewOf = async (app: TestApp, id: string): Promise<CampaignView> => {
  const em = app.deps.orm.em.fork();
  return presentCampaign(em, await findCampaign(em, id));
};

/** The estimates of the entries were made without the queue; their jobs must not hold the campaign back. */
export const clearContributorsJobs = async (app: TestApp): Promise<void> => {
  await app.deps.pool.query("delete from pgboss.job where name in ('estimate', 'draw-sheet')");
};

export const withdraw = (app: TestApp, accession: string): Promise<void> => withdrawn(app, { accession, version: 1 }, 'The wrong qubit was recorded.');

/**
 * The registry's threads, with the estimate made once and handed out from then on: a campaign's life does not depend on what is
 * estimated. `before` may wait, or throw in place of an estimate.
 */
export const cannedEstimates = (app: TestApp, before: (bytes: Uint8Array) => Promise<void> = async () => undefined): RunInThread => {
  const run = async (name: TaskName, input: TaskInput<'estimate-dataset'>): Promise<unknown> => {
    await before(input.bytes);
    canned ??= app.deps.threads.run(name as 'estimate-dataset', input);
    return canned;
  };
  return run as RunInThread;
};
let canned: Promise<unknown> | undefined;
