import { z } from 'zod';
import { gateClassRef } from './common.ts';

/** GET /api/v1/gate-classes : what a class asks for; the whole class with its bench circuits lies at `href`. */
export const gateClassSummary = gateClassRef.extend({
  registerSize: z.number().int(),
  kind: z.enum(['joint', 'chained']),
  expectedRank: z.number().int(),
  /** Ideal gates in words: "identity", "rx(π/2)". */
  gates: z.array(z.object({ label: z.string(), words: z.string(), targets: z.array(z.number().int()) })),
  lengths: z.array(z.number().int()),
  floor: z.object({ circuits: z.number().int(), shots: z.number().int() }),
  href: z.string(),
});
export const gateClassList = z.object({ items: z.array(gateClassSummary), nextCursor: z.string().nullable() });

export type GateClassSummary = z.infer<typeof gateClassSummary>;
