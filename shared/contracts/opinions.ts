import { z } from 'zod';
import { opinionMethods } from '#shared/opinions/types.ts';
import { figure, timestamp } from './common.ts';

/** One figure by another route, beside the official one. */
export const opinionFigure = figure.pick({ key: true, depth: true, gate: true, qubits: true, value: true, reason: true }).extend({
  official: z.number().nullable(),
  officialError: z.number().nullable(),
  /** (value − official) in standard errors of the official figure. */
  distance: z.number().nullable(),
});

/** One route to the same figures from the same counts. Not the registry's figures, and never on boards. */
export const timedOpinion = z.object({
  method: z.enum(opinionMethods),
  /** Why this route is not offered for the dataset, or null. */
  reason: z.string().nullable(),
  scope: z.enum(['register', 'one-qubit-patches']),
  figures: z.array(opinionFigure),
  /** Mean total variation distance on the sealed circuits. */
  prediction: z.object({ value: z.number(), official: z.number(), ideal: z.number(), circuits: z.number().int() }).nullable(),
  convergence: z.object({ converged: z.boolean(), iterations: z.number().int(), limit: z.number().int(), gain: z.number(), remaining: z.number().nullable() }).nullable(),
  notes: z.array(z.string()),
  /** Seconds on the registry's machine, from the dataset to the maps; null where it is not offered. */
  seconds: z.number().nullable(),
});

/** GET /api/v1/submissions/{id}/opinions and /api/v1/entries/{accession}/v/{n}/opinions */
export const opinions = z.object({
  /** none: no estimate yet, or one made before opinions were. */
  state: z.enum(['none', 'waiting', 'computing', 'done', 'failed']),
  /** Share done, while they are being computed. */
  fraction: z.number().min(0).max(1),
  reason: z.string().nullable(),
  /** Method version of the official figures. */
  method: z.string(),
  /** Seconds that the official estimate takes on the same machine, without its replicates. */
  officialSeconds: z.number().nullable(),
  madeAt: timestamp.nullable(),
  opinions: z.array(timedOpinion),
});

export type TimedOpinion = z.infer<typeof timedOpinion>;
export type OpinionFigureView = z.infer<typeof opinionFigure>;
export type Opinions = z.infer<typeof opinions>;
