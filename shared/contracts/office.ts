import { z } from 'zod';
import { timestamp } from './common.ts';

/** GET /api/v1/jobs : the steward's look at the job queue. */
export const jobsOverview = z.object({
  queues: z.array(z.object({
    name: z.string(),
    /** Due now. */
    waiting: z.number().int(),
    /** Put off: a later attempt, or a later time. */
    later: z.number().int(),
    running: z.number().int(),
    failed: z.number().int(),
  })),
  running: z.array(z.object({ id: z.string(), queue: z.string(), subject: z.string().nullable(), attempt: z.number().int(), stage: z.string().nullable(), fraction: z.number(), startedAt: timestamp })),
  /** Newest first, at most a hundred. */
  failed: z.array(z.object({
    id: z.string(), queue: z.string(), subject: z.string().nullable(), attempts: z.number().int(), reason: z.string(), at: timestamp,
    /** False where the failure was noted elsewhere and is answered there: a submission, a run sheet, a campaign. */
    retriable: z.boolean(),
  })),
});

/** POST /api/v1/jobs/{queue}/{id}/retry. */
export const jobParams = z.object({ queue: z.string().max(40), id: z.uuid() });

/** GET /api/v1/mail : messages owed, oldest first, then the last ones sent. */
export const mailOverview = z.object({
  waiting: z.number().int(),
  /** Messages that were tried and are not sent. */
  failing: z.number().int(),
  sent: z.number().int(),
  items: z.array(z.object({
    id: z.string(), recipient: z.string(), subject: z.string(), topic: z.string(), topicId: z.string(), queuedAt: timestamp, sentAt: timestamp.nullable(),
    attempts: z.number().int(), lastError: z.string().nullable(),
  })),
});

/** GET /api/v1/people : people and organisations as they stand now. */
export const peopleOverview = z.object({
  people: z.array(z.object({
    id: z.string(), name: z.string(), email: z.string(), roles: z.array(z.enum(['curator', 'steward'])),
    memberships: z.array(z.object({ organisation: z.string(), role: z.enum(['contributor', 'editor', 'viewer', 'member']) })),
    lastSignInAt: timestamp.nullable(), disabled: z.boolean(),
  })),
  organisations: z.array(z.object({ id: z.string(), name: z.string(), kind: z.enum(['provider', 'laboratory', 'buyer', 'registry']), members: z.number().int(), entries: z.number().int() })),
});

export type JobsOverview = z.infer<typeof jobsOverview>;
export type MailOverview = z.infer<typeof mailOverview>;
export type PeopleOverview = z.infer<typeof peopleOverview>;
