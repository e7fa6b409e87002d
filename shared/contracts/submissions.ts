import { z } from 'zod';
import { check, deviceRef, figure, gateClassRef, sealedCheck, sha256, submissionState, timestamp } from './common.ts';

export const message = z.object({ id: z.string(), author: z.string(), role: z.enum(['contributor', 'curator', 'registry']), organisation: z.string().nullable(), at: timestamp, body: z.string() });
export const messageCreate = z.object({ body: z.string().trim().min(1, 'Write something first.').max(5000) });

/** The record beside the file. Complete when `access` and `interests` are filled. */
export const submissionRecord = z.object({
  /** How and by whom the device was reached: "own device, laboratory access". */
  access: z.string().max(500).nullable(),
  /** Interests of the contributors in the device's provider; "none" is an answer. */
  interests: z.string().max(1000).nullable(),
  embargoUntil: z.iso.date().nullable(),
  notes: z.string().max(5000).nullable(),
});
/** PATCH /api/v1/submissions/{id} */
export const submissionPatch = submissionRecord.partial();

export const submissionItem = z.object({
  id: z.string(),
  title: z.string(),
  state: submissionState,
  progress: z.number().min(0).max(1),
  device: deviceRef.nullable(),
  gateClass: gateClassRef.nullable(),
  runSheet: z.string().nullable(),
  createdAt: timestamp,
  changedAt: timestamp,
});
export const submissionList = z.object({ items: z.array(submissionItem), nextCursor: z.string().nullable() });

/** GET /api/v1/submissions/{id} */
export const submission = submissionItem.extend({
  organisation: z.object({ id: z.string(), name: z.string() }),
  round: z.number().int(),
  file: z.object({ name: z.string(), bytes: z.number().int(), circuits: z.number().int(), contentId: sha256, bytesSha256: sha256, href: z.string() }),
  register: z.array(z.string()),
  /** The declared gates in words: "rx(π/2)". */
  gates: z.array(z.object({ label: z.string(), words: z.string(), targets: z.array(z.number().int()) })),
  /** Stage of the estimate while checking, in words; null otherwise. */
  stage: z.string().nullable(),
  replicatesDone: z.number().int().nullable(),
  replicates: z.number().int(),
  checks: z.array(check),
  record: submissionRecord,
  recordComplete: z.boolean(),
  result: z.object({
    method: z.string(), replicates: z.number().int(), figures: z.array(figure), sealedCheck: sealedCheck.nullable(), warnings: z.array(z.string()),
    patches: z.array(z.object({ qubits: z.array(z.number().int()), columns: z.number().int(), rank: z.number().int(), conditionRatio: z.number(), complete: z.boolean(), sound: z.boolean(), settled: z.boolean(), misfit: z.object({ residualSum: z.number(), expected: z.number(), sigmas: z.number(), pValue: z.number() }).nullable() })),
  }).nullable(),
  /** Moves made so far, oldest first. */
  history: z.array(z.object({ state: submissionState, at: timestamp, by: z.string().nullable(), reason: z.string().nullable() })),
  messages: z.array(message),
  decision: z.object({ outcome: z.enum(['accepted', 'returned', 'declined']), reason: z.string(), at: timestamp }).nullable(),
  entry: z.object({ accession: z.string(), version: z.number().int() }).nullable(),
  /** Moves this caller may make now. */
  may: z.object({ edit: z.boolean(), replace: z.boolean(), send: z.boolean(), cancel: z.boolean(), message: z.boolean() }),
});

/** POST /api/v1/submissions → 202 with Location. */
export const submissionAccepted = z.object({ id: z.string(), state: submissionState, href: z.string() });

export type Message = z.infer<typeof message>;
export type Submission = z.infer<typeof submission>;
export type SubmissionItem = z.infer<typeof submissionItem>;
export type SubmissionRecord = z.infer<typeof submissionRecord>;
