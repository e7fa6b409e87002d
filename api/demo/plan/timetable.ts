import { createGenerator } from '#api/demo/simulator/generator.ts';
import type { Story } from './story.ts';

/** One run of a sheet and what follows from its file. */
export interface RoundTimes {
  /** First shot. */
  run: Date;
  received: Date;
  recorded: Date;
  sent: Date;
  claimed: Date;
  asked: Date;
  answered: Date;
  replied: Date;
  decided: Date;
}

export interface Timetable {
  registered: Date;
  sheet: Date;
  first: RoundTimes;
  /** After a return. */
  again: RoundTimes;
  lifted: Date | null;
}

const dayMs = 86_400_000;

/** The day, or the Monday after a weekend. */
const workday = (date: Date): Date => {
  const weekday = date.getUTCDay();
  return new Date(date.getTime() + (weekday === 6 ? 2 : weekday === 0 ? 1 : 0) * dayMs);
};

/** So many days later, on a working day, between 8 and 16 UTC and at an even second. */
const later = (from: Date, days: number, hour: number, stream: { next(): number }): Date => {
  const day = workday(new Date(Math.floor(from.getTime() / dayMs) * dayMs + days * dayMs));
  return new Date(day.getTime() + hour * 3_600_000 + Math.floor(stream.next() * 3_000) * 1_000);
};

const soon = (from: Date, minutes: number): Date => new Date(from.getTime() + minutes * 60_000);

/** When each step of a story is taken; drawn from its key, so that it is the same everywhere. */
export const timetableOf = (story: Story, hoursOfRun: number): Timetable => {
  const stream = createGenerator(`times:${story.key}`);
  const within = (low: number, high: number): number => low + Math.floor(stream.next() * (high - low + 1));
  const sheet = later(new Date(`${story.day}T00:00:00Z`), 0, within(8, 10), stream);
  const round = (after: Date): RoundTimes => {
    const run = later(after, within(1, 2), 6, stream);
    const received = later(new Date(run.getTime() + hoursOfRun * 3_600_000), 1, within(9, 11), stream);
    const sent = soon(received, within(50, 150));
    const claimed = later(sent, within(1, 3), within(8, 10), stream);
    const asked = soon(claimed, within(20, 50));
    const answered = later(asked, 1, within(10, 12), stream);
    const replied = soon(answered, within(30, 90));
    return { run, received, recorded: soon(received, within(15, 45)), sent, claimed, asked, answered, replied, decided: later(replied, within(0, 2), 14, stream) };
  };
  const first = round(sheet);
  const again = round(first.decided);
  return { registered: soon(sheet, -within(15, 40)), sheet, first, again, lifted: story.embargoUntil === undefined ? null : new Date(`${story.embargoUntil}T00:07:00Z`) };
};
