import { z } from 'zod';
import { deviceRef, figure, gateClassRef, timestamp } from './common.ts';
import { submission } from './submissions.ts';

/** GET /api/v1/reviews : submissions in review that this curator may decide on, oldest first. */
export const reviewItem = z.object({
  id: z.string(),
  title: z.string(),
  device: deviceRef.nullable(),
  gateClass: gateClassRef.nullable(),
  organisation: z.string(),
  round: z.number().int(),
  sentAt: timestamp,
  passed: z.number().int(),
  notes: z.number().int(),
  claimedBy: z.string().nullable(),
  claimedByMe: z.boolean(),
});
export const reviewQueue = z.object({
  items: z.array(reviewItem),
  nextCursor: z.string().nullable(),
  /** Kept from this curator because of an interest: numbers and organisations only. */
  kept: z.array(z.object({ id: z.string(), organisation: z.string() })),
});

/** GET /api/v1/reviews/{id} */
export const review = z.object({
  submission,
  claimedBy: z.string().nullable(),
  claimedByMe: z.boolean(),
  /** Misfit of each block, in order of time, for the drift drawing. */
  drift: z.array(z.object({ block: z.number().int(), sigmas: z.number(), circuits: z.number().int() })),
  /** Public entries of the same device, register and class, oldest first, each with its headline figure. */
  earlier: z.array(z.object({ accession: z.string(), version: z.number().int(), frozenAt: timestamp, headline: figure.nullable() })),
  may: z.object({ claim: z.boolean(), decide: z.boolean() }),
});

/** POST /api/v1/reviews/{id}/decision */
export const reviewDecision = z.object({
  outcome: z.enum(['accept', 'return', 'decline']),
  reason: z.string().trim().min(1, 'A decision needs its reason.').max(5000),
  /** The curator's word that there is no tie to the organisation. */
  noInterest: z.literal(true, { error: 'Declare that you have no tie to the organisation.' }),
});
export const reviewDecided = z.object({ submission: z.string(), state: z.string(), entry: z.object({ accession: z.string(), version: z.number().int() }).nullable() });

export type ReviewItem = z.infer<typeof reviewItem>;
export type ReviewQueue = z.infer<typeof reviewQueue>;
export type Review = z.infer<typeof review>;
export type ReviewDecision = z.infer<typeof reviewDecision>;
