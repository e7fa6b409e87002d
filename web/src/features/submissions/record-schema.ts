import { z } from 'zod';
import type { SubmissionRecord } from '#shared/contracts/submissions.ts';
import { submissionRecord } from '#shared/contracts/submissions.ts';

/** The longest an accepted entry may stay closed. */
export const embargoDays = 180;

const dayMs = 86_400_000;

/** The last day an embargo may name, counted from `now` in UTC: "2026-10-31". */
export const lastEmbargoDay = (now: Date): string => new Date(now.getTime() + embargoDays * dayMs).toISOString().slice(0, 10);

const emptyIsNull = (text: string): string | null => (text.trim() === '' ? null : text.trim());
const limits = submissionRecord.shape;

/** The record's form: text as typed; an empty field is "not filled". */
export const recordSchema = (now: Date) =>
  z.object({
    access: z.string().transform(emptyIsNull).pipe(limits.access),
    interests: z.string().transform(emptyIsNull).pipe(limits.interests),
    notes: z.string().transform(emptyIsNull).pipe(limits.notes),
    embargoUntil: z.string().transform(emptyIsNull).superRefine((day, context) => {
      const fault = embargoFault(day, now);
      if (fault) context.addIssue({ code: 'custom', message: fault });
    }),
  });

/** What is wrong with an embargo date, or null. Dates are compared as days in UTC. */
export const embargoFault = (day: string | null, now: Date): string | null => {
  if (day === null) return null;
  if (!limits.embargoUntil.safeParse(day).success) return `Give the date as year-month-day, such as 2026-05-04; ${day} is not one.`;
  if (day <= now.toISOString().slice(0, 10)) return `${day} is not ahead; an embargo ends on a later day than today.`;
  const last = lastEmbargoDay(now);
  return day > last ? `${day} is more than ${embargoDays} days ahead; the last day allowed is ${last}.` : null;
};

export type RecordFields = z.input<ReturnType<typeof recordSchema>>;

export const recordFields = (record: SubmissionRecord): RecordFields =>
  ({ access: record.access ?? '', interests: record.interests ?? '', notes: record.notes ?? '', embargoUntil: record.embargoUntil ?? '' });
