import { z } from 'zod';
import { timestamp } from './common.ts';

const reason = z.string().trim().min(1, 'A withdrawal needs its reason; it is public.').max(2000);
/** The curator's word that there is no tie to the organisation. */
const noInterest = z.literal(true, { error: 'Declare that you have no tie to the organisation.' });

/** POST /api/v1/entries/{accession}/v/{n}/withdrawal */
export const withdrawalAsked = z.object({ reason, noInterest });
/** POST /api/v1/withdrawals/{id}/answer : another curator confirms; either drops it, with a note. */
export const withdrawalAnswered = z.discriminatedUnion('answer', [
  z.object({ answer: z.literal('confirm'), noInterest }),
  z.object({ answer: z.literal('drop'), note: z.string().trim().min(1, 'Say why it is dropped.').max(2000) }),
]);

export const withdrawal = z.object({
  id: z.string(),
  accession: z.string(),
  version: z.number().int(),
  title: z.string(),
  organisation: z.string(),
  reason: z.string(),
  askedBy: z.string(),
  askedAt: timestamp,
  answer: z.enum(['confirmed', 'dropped']).nullable(),
  answeredBy: z.string().nullable(),
  answeredAt: timestamp.nullable(),
  note: z.string().nullable(),
  may: z.object({ confirm: z.boolean(), drop: z.boolean() }),
});
/** GET /api/v1/withdrawals : those that wait first, then the newest answered. */
export const withdrawalList = z.object({ items: z.array(withdrawal) });

export type Withdrawal = z.infer<typeof withdrawal>;
export type WithdrawalAsked = z.infer<typeof withdrawalAsked>;
export type WithdrawalAnswered = z.infer<typeof withdrawalAnswered>;
