import type { Submission } from '#api/entities/submission.ts';
import { decide } from '#api/modules/reviews/service.ts';
import { receiveSubmission, type ReceiveInput } from '#api/modules/submissions/receive.ts';
import { runEstimate } from '#api/modules/submissions/run-estimate.ts';
import { changeRecord, findSubmission, sendToReview } from '#api/modules/submissions/service.ts';
import { answerWithdrawal, askWithdrawal } from '#api/modules/withdrawals/service.ts';
import type { Dataset } from '#shared/formats/types.ts';
import { bytesOf, workFor, type Desk } from './record.ts';
import { makeCurator } from './people.ts';
import type { TestApp } from './test-app.ts';

export const fewReplicates = 20;

type More = Partial<Pick<ReceiveInput, 'correctionOf' | 'demo' | 'replicates'>>;

/** Walks a dataset along its life through the services, as far as named, and gives the submission as it stands then. */
export const receive = async (app: TestApp, desk: Desk, dataset: Dataset, more: More = {}): Promise<string> =>
  (await receiveSubmission(await workFor(app, desk.contributor), { organisation: desk.organisation.id, bytes: bytesOf(dataset), name: 'spring.json', replicates: fewReplicates, ...more })).id;

export const estimated = async (app: TestApp, desk: Desk, dataset: Dataset, more: More = {}): Promise<string> => {
  const id = await receive(app, desk, dataset, more);
  await runEstimate(await workFor(app, null), id, 1);
  return id;
};

export const inReview = async (app: TestApp, desk: Desk, dataset: Dataset, more: More & { embargoUntil?: string | null } = {}): Promise<string> => {
  const { embargoUntil = null, ...rest } = more;
  const id = await estimated(app, desk, dataset, rest);
  const work = await workFor(app, desk.contributor);
  await changeRecord(work, id, { access: 'own device', interests: 'none', embargoUntil });
  await sendToReview(work, id);
  return id;
};

export const accepted = async (app: TestApp, desk: Desk, dataset: Dataset, more: Parameters<typeof inReview>[3] = {}): Promise<{ id: string; accession: string; version: number }> => {
  const id = await inReview(app, desk, dataset, more);
  const { entry } = await decide(await workFor(app, desk.curator), id, { outcome: 'accept', reason: 'Sound throughout.', noInterest: true });
  if (!entry) throw new Error(`${id} was not frozen`);
  return { id, ...entry };
};

export const stateOf = async (app: TestApp, id: string): Promise<Submission['state']> => (await findSubmission(app.deps.orm.em.fork(), id)).state;

/** A public version that one curator asked to withdraw and another confirmed. */
export const withdrawn = async (app: TestApp, { accession, version }: { accession: string; version: number }, reason: string): Promise<void> => {
  const [asks, confirms] = [await makeCurator(app.deps.orm.em.fork()), await makeCurator(app.deps.orm.em.fork())];
  const id = await askWithdrawal(await workFor(app, asks), { accession, version }, { reason, noInterest: true });
  await answerWithdrawal(await workFor(app, confirms), id, { answer: 'confirm', noInterest: true });
};
