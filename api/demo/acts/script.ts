import { planRun } from '#api/demo/device-truth.ts';
import { deviceOf, timesOf } from '#api/demo/foresight/orders.ts';
import { exchanges } from '#api/demo/plan/exchanges.ts';
import type { Story } from '#api/demo/plan/story.ts';
import type { RoundTimes } from '#api/demo/plan/timetable.ts';
import type { Moment } from './context.ts';
import * as contributor from './contribute.ts';
import * as curator from './review.ts';

/** Something that somebody does at an instant. */
export interface Act {
  at: Date;
  /** For the message, should it fail. */
  name: string;
  /** What it leaves to the worker waits there, instead of being done here. */
  rests?: boolean;
  run: (moment: Moment) => Promise<void>;
}

/** The demo ends here; what would come later has not happened yet. */
export const lastDay = new Date('2026-11-30T18:00:00Z');

const seconds = (from: Date, count: number): Date => new Date(from.getTime() + count * 1000);

/** A claim lapses after a fortnight; from then on the one claimed case is claimed once more on the day the demo is made. */
const fortnight = 14 * 86_400;

/** Acts of one round, from its file to its decision, as far as the story goes. */
const roundActs = (story: Story, times: RoundTimes, index: 0 | 1): Act[] => {
  const { end } = story;
  const acts: Act[] = [];
  const act = (at: Date, name: string, run: Act['run']): void => void acts.push({ at, name: `${story.key}: ${name}`, run });
  act(times.received, 'file', async (moment) => {
    const run = moment.outcomes.get(story.key)?.runs[index];
    if (!run) throw new Error(`Nothing was measured for ${story.key}.`);
    await contributor.sendFile(moment, story, run);
  });
  if (end.kind === 'checking') return acts.map((a) => ({ ...a, rests: true }));
  act(seconds(times.received, 40), 'estimate', (moment) => contributor.estimate(moment, story));
  if (end.kind === 'blocked') return acts;
  act(times.recorded, 'record', (moment) => contributor.fillRecord(moment, story));
  if (end.kind === 'ready') return acts;
  act(times.sent, 'send', (moment) => contributor.send(moment, story));
  if (end.kind === 'in-review' && !end.claimed) return acts;
  act(times.claimed, 'claim', (moment) => curator.claim(moment, story));
  const exchange = story.exchange === undefined || index === 1 ? undefined : exchanges[story.exchange];
  if (exchange) {
    act(times.asked, 'question', (moment) => curator.ask(moment, story, exchange.question));
    act(times.answered, 'answer', (moment) => contributor.answer(moment, story, exchange.answer));
    const { reply } = exchange;
    if (reply !== undefined) act(times.replied, 'reply', (moment) => curator.ask(moment, story, reply));
  }
  if (end.kind === 'cancelled') {
    act(times.replied, 'last message', (moment) => contributor.answer(moment, story, end.message));
    act(seconds(times.replied, 90), 'cancel', (moment) => contributor.cancel(moment, story));
  } else if (end.kind === 'returned' || (end.kind === 'run-again' && index === 0)) {
    act(times.decided, 'return', (moment) => curator.decide(moment, story, 'return', end.reason));
  } else if (end.kind === 'declined') {
    act(times.decided, 'decline', (moment) => curator.decide(moment, story, 'decline', end.reason));
  } else if (end.kind !== 'in-review') {
    act(times.decided, 'accept', (moment) => curator.decide(moment, story, 'accept'));
  }
  return acts;
};

const actsOf = (story: Story): Act[] => {
  const times = timesOf(story);
  const { register } = planRun(deviceOf(story), story.gateClass, times.first.run);
  const acts: Act[] = [{ at: times.registered, name: `${story.key}: device`, run: (moment) => contributor.registerDevice(moment, story) }];
  if (!story.ownDesign) acts.push({ at: times.sheet, name: `${story.key}: run sheet`, run: (moment) => contributor.drawSheet(moment, story, register) });
  acts.push(...roundActs(story, times.first, 0));
  if (story.end.kind === 'run-again') acts.push(...roundActs(story, times.again, 1));
  if (times.lifted && times.lifted < lastDay) acts.push({ at: times.lifted, name: `${story.key}: end of embargo`, run: (moment) => curator.lift(moment, story) });
  return acts;
};

/** Claims that would have lapsed by now, claimed anew: a demo that is made later still shows a case in a curator's hands. */
const renewals = (stories: readonly Story[], now: Date): Act[] => {
  const claimed = stories.filter(({ end }) => end.kind === 'in-review' && end.claimed);
  const lapsed = claimed.filter((story) => seconds(timesOf(story).first.claimed, fortnight) <= now);
  return lapsed.map((story, i) => ({ at: seconds(now, i), name: `${story.key}: claim again`, run: (moment) => curator.claim(moment, story) }));
};

/** Everything that happens, in the order of time; `now` is when the demo is made. */
export const scriptOf = (stories: readonly Story[], now: Date): Act[] => {
  const acts = stories.flatMap(actsOf).sort((a, b) => a.at.getTime() - b.at.getTime());
  const last = acts.at(-1);
  if (last && last.at > lastDay) throw new Error(`${last.name} would come after the last day of the demo.`);
  return [...acts, ...renewals(stories, now)];
};
