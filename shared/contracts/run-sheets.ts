import { z } from 'zod';
import { sheetKinds } from '#shared/domain/sheet-kinds.ts';
import { deviceRef, gateClassRef, sha256, timestamp } from './common.ts';

/** POST /api/v1/run-sheets : the registry draws; a job with progress. */
export const runSheetCreate = z.object({
  device: z.string().max(120),
  gateClass: z.string().max(80),
  /** Names of the qubits, in the order of the register. */
  register: z.array(z.string().trim().min(1).max(40)).min(1).max(8),
  /** random: gate by gate, as ranked entries need it. structured: preparation sequence, repeated block, readout sequence. */
  kind: z.enum(sheetKinds).default('random'),
  /** Circuits to estimate from; the sealed ones come on top. */
  circuits: z.number().int().min(1).max(20_000),
  shots: z.number().int().min(1).max(10_000_000),
});

export const runSheetView = z.object({
  id: z.string(),
  state: z.enum(['waiting', 'drawing', 'drawn', 'failed']),
  progress: z.number().min(0).max(1),
  /** In words, while drawing or after a failure. */
  message: z.string().nullable(),
  device: deviceRef,
  gateClass: gateClassRef,
  register: z.array(z.string()),
  kind: z.enum(sheetKinds),
  circuitsAsked: z.number().int(),
  /** More than asked where no sheet of that many circuits was sound. */
  circuits: z.number().int().nullable(),
  sealed: z.number().int().nullable(),
  shots: z.number().int(),
  totalShots: z.number().int().nullable(),
  rank: z.number().int().nullable(),
  conditionRatio: z.number().nullable(),
  draws: z.number().int().nullable(),
  sheetSha256: sha256.nullable(),
  sealSha256: sha256.nullable(),
  createdBy: z.string(),
  createdAt: timestamp,
  drawnAt: timestamp.nullable(),
  /** Address of the sheet file, once drawn. */
  file: z.string().nullable(),
  /** Submission that used it, if any. */
  submission: z.string().nullable(),
});
export const runSheetList = z.object({ items: z.array(runSheetView), nextCursor: z.string().nullable() });

export type RunSheetView = z.infer<typeof runSheetView>;
export type RunSheetCreate = z.input<typeof runSheetCreate>;
