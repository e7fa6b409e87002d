import { z } from 'zod';
import { timestamp } from './common.ts';

/** GET /api/v1/me : who is asking. Also open without sign-in. */
export const me = z.object({
  user: z.object({ id: z.string(), name: z.string(), email: z.string() }).nullable(),
  curator: z.boolean(),
  steward: z.boolean(),
  organisations: z.array(z.object({ id: z.string(), name: z.string(), kind: z.enum(['provider', 'laboratory', 'buyer', 'registry']), role: z.enum(['contributor', 'viewer', 'editor', 'member']) })),
  /** Send back in `x-csrf-token` with every request that changes something. */
  csrfToken: z.string(),
});

/** GET/POST /api/v1/tokens, DELETE /api/v1/tokens/{id} : API tokens of an organisation. */
export const tokenView = z.object({ id: z.string(), name: z.string(), organisation: z.string(), createdBy: z.string(), createdAt: timestamp, lastUsedAt: timestamp.nullable(), hint: z.string() });
export const tokenList = z.object({ items: z.array(tokenView), nextCursor: z.string().nullable() });
export const tokenCreate = z.object({ name: z.string().trim().min(1).max(80), organisation: z.string().max(64) });
/** The secret is shown once and never again. */
export const tokenCreated = tokenView.extend({ secret: z.string() });

export type Me = z.infer<typeof me>;
export type TokenView = z.infer<typeof tokenView>;
export type TokenCreated = z.infer<typeof tokenCreated>;
