import { z } from 'zod';
import { submissionStates } from '#shared/domain/life-cycle.ts';

/** Building blocks of every request and response. Times are ISO 8601 UTC; digests lower-case hex. */
export const timestamp = z.iso.datetime({ offset: true });
export const sha256 = z.string().regex(/^[0-9a-f]{64}$/, 'must be 64 lower-case hexadecimal digits');
export const submissionState = z.enum(submissionStates);
export const modality = z.enum(['superconducting', 'trapped-ion', 'neutral-atom', 'photonic', 'spin', 'simulated', 'other']);

export const interval = z.object({ level: z.number(), low: z.number(), high: z.number() });

/** One figure as in the result file; its method version stands beside it in the response that carries it. */
export const figure = z.object({
  key: z.enum(['retained-signal', 'output-error', 'error-per-gate', 'gate-loss', 'angle-error', 'readout-loss', 'prediction-error']),
  depth: z.number().int().nullable(),
  gate: z.string().nullable(),
  qubits: z.array(z.number().int()),
  value: z.number().nullable(),
  standardError: z.number().nullable(),
  intervals: z.array(interval).nullable(),
  firstOrder: z.number().nullable(),
  determined: z.boolean(),
  reason: z.string().nullable(),
  extrapolated: z.boolean(),
  firstOrderOnly: z.boolean(),
  replicates: z.number().int(),
});

export const sealedCheck = z.object({ value: z.number(), ideal: z.number(), noise: z.number(), z: z.number(), low99: z.number(), high99: z.number(), passed: z.boolean() });

/** One check of a submission, in the order they are made. */
export const check = z.object({
  id: z.string(),
  status: z.enum(['passed', 'note', 'failed', 'running', 'waiting']),
  /** "Counts sum to shots in every circuit" */
  title: z.string(),
  /** "230 of 230" */
  detail: z.string(),
  /** A failed blocking check stops the submission. */
  blocking: z.boolean(),
});

export const providerRef = z.object({ id: z.string(), name: z.string() });
export const deviceRef = z.object({ id: z.string(), name: z.string(), provider: providerRef, modality });
export const personRef = z.object({ name: z.string(), organisation: z.string().nullable() });
export const gateClassRef = z.object({ id: z.string(), title: z.string(), ranked: z.boolean() });

/** Lists by cursor. */
export const pageQuery = z.object({ limit: z.coerce.number().int().min(1).max(200).default(50), cursor: z.string().max(200).optional() });
export const pageOf = <T extends z.ZodType>(item: T) => z.object({ items: z.array(item), nextCursor: z.string().nullable() });

/** RFC 9457 problem details. */
export const problem = z.object({
  type: z.string(),
  title: z.string(),
  status: z.number().int(),
  detail: z.string(),
  instance: z.string().optional(),
  code: z.string(),
  errors: z.array(z.object({ pointer: z.string(), message: z.string() })).optional(),
});

export type Check = z.infer<typeof check>;
export type DeviceRef = z.infer<typeof deviceRef>;
export type Problem = z.infer<typeof problem>;
export type Page<T> = { items: T[]; nextCursor: string | null };
