import { Device } from '#api/entities/device.ts';
import { deviceOf } from '#api/demo/foresight/orders.ts';
import type { RunOutcome } from '#api/demo/foresight/work.ts';
import type { Story } from '#api/demo/plan/story.ts';
import { contributorFor, recordOf, slugOfProvider } from '#api/demo/plan/who.ts';
import { createDevice, slugOf } from '#api/modules/devices/service.ts';
import { drawRunSheet } from '#api/modules/run-sheets/draw.ts';
import { createRunSheet } from '#api/modules/run-sheets/service.ts';
import { receiveSubmission, replaceDataset } from '#api/modules/submissions/receive.ts';
import { runEstimate } from '#api/modules/submissions/run-estimate.ts';
import { cancelSubmission, changeRecord, findSubmission, sendToReview, writeMessage } from '#api/modules/submissions/service.ts';
import type { Submission } from '#api/entities/submission.ts';
import type { Action } from '#shared/domain/rules.ts';
import type { Work } from '#api/lib/work.ts';
import { asPerson, asRegistry, organisationNamed, type Moment, type Record } from './context.ts';

export const recordIn = (moment: Moment, story: Story): Record => {
  const found = moment.records.get(story.key) ?? {};
  moment.records.set(story.key, found);
  return found;
};

export const submissionIn = async (moment: Moment, story: Story): Promise<Submission> => findSubmission(moment.em, recordIn(moment, story).submission ?? '');

const asContributor = async (moment: Moment, story: Story, action: Action, submission?: Submission): Promise<Work> => {
  const { provider } = deviceOf(story);
  const { id } = await organisationNamed(moment, slugOfProvider(provider));
  return asPerson(moment, contributorFor(provider).subject, action, { owner: id, ...(submission ? { state: submission.state } : {}) });
};

const deviceId = (story: Story): string => `${slugOfProvider(deviceOf(story).provider)}-${slugOf(story.device)}`;

/** Registers the device, where that is not done. */
export const registerDevice = async (moment: Moment, story: Story): Promise<void> => {
  if ((await moment.em.count(Device, { id: deviceId(story) })) > 0) return;
  const { name, modality, provider } = deviceOf(story);
  const work = await asContributor(moment, story, 'device.create');
  const { id } = await organisationNamed(moment, slugOfProvider(provider));
  await createDevice(work, { organisation: id, name, modality });
};

export const drawSheet = async (moment: Moment, story: Story, register: string[]): Promise<void> => {
  const work = await asContributor(moment, story, 'run-sheet.create');
  const { id } = await createRunSheet(work, { device: deviceId(story), gateClass: story.gateClass, register, circuits: story.circuits, shots: story.shots });
  await moment.em.flush();
  await drawRunSheet(asRegistry(moment), id);
  recordIn(moment, story).runSheet = id;
};

const fileNameOf = (story: Story): string => `${slugOf(story.device)}-${story.day}.json`;

/** Sends the file of a run; every check and the estimate follow at once, save where the story rests at "checking". */
export const sendFile = async (moment: Moment, story: Story, run: RunOutcome): Promise<void> => {
  if (new Date(run.endedAt) >= moment.clock.now()) throw new Error(`${story.key} is sent before its last shot.`);
  const record = recordIn(moment, story);
  const file = { bytes: run.bytes, name: fileNameOf(story) };
  if (record.submission === undefined) {
    const work = await asContributor(moment, story, 'submission.create');
    const { id } = await organisationNamed(moment, slugOfProvider(deviceOf(story).provider));
    const correctionOf = story.corrects === undefined ? null : (moment.records.get(story.corrects)?.accession ?? null);
    if (story.corrects !== undefined && correctionOf === null) throw new Error(`${story.key} corrects an entry that is not there yet.`);
    record.submission = (await receiveSubmission(work, { ...file, organisation: id, correctionOf, demo: true })).id;
  } else {
    const submission = await submissionIn(moment, story);
    await replaceDataset(await asContributor(moment, story, 'submission.replace', submission), submission.id, file);
  }
  await moment.em.flush();
};

export const estimate = async (moment: Moment, story: Story): Promise<void> => {
  const { id, round } = await submissionIn(moment, story);
  await runEstimate(asRegistry(moment), id, round);
};

export const fillRecord = async (moment: Moment, story: Story): Promise<void> => {
  const submission = await submissionIn(moment, story);
  const work = await asContributor(moment, story, 'submission.edit', submission);
  await changeRecord(work, submission.id, { ...recordOf(deviceOf(story).provider), notes: story.notes ?? null, embargoUntil: story.embargoUntil ?? null });
};

export const send = async (moment: Moment, story: Story): Promise<void> => {
  const submission = await submissionIn(moment, story);
  await sendToReview(await asContributor(moment, story, 'submission.send', submission), submission.id);
};

export const answer = async (moment: Moment, story: Story, body: string): Promise<void> => {
  const submission = await submissionIn(moment, story);
  await writeMessage(await asContributor(moment, story, 'submission.write-message', submission), submission.id, body);
};

export const cancel = async (moment: Moment, story: Story): Promise<void> => {
  const submission = await submissionIn(moment, story);
  await cancelSubmission(await asContributor(moment, story, 'submission.cancel', submission), submission.id);
};
