import { z } from 'zod';
import { deviceRef, figure, gateClassRef, timestamp } from './common.ts';
import { gateClassSummary } from './gate-classes.ts';

/** GET /api/v1/boards : one line a board, for the home page and the list of boards. */
export const boardSummary = z.object({
  gateClass: gateClassRef,
  entries: z.number().int(),
  eligible: z.number().int(),
  lastChange: timestamp.nullable(),
});
export const boardList = z.object({ items: z.array(boardSummary), nextCursor: z.string().nullable() });

/** Figures a board can be read by. */
export const boardFigure = z.enum(['retained-signal-16', 'retained-signal-4', 'retained-signal-64', 'error-per-gate', 'output-error-16', 'readout-loss']);
export const boardQuery = z.object({
  figure: boardFigure.default('retained-signal-16'),
  modality: z.string().max(40).optional(),
  provider: z.string().max(80).optional(),
  /** Last circuit run within so many days of `readAt`. */
  within: z.coerce.number().int().min(1).max(36_500).optional(),
});

export const boardRow = z.object({
  accession: z.string(),
  version: z.number().int(),
  device: deviceRef,
  register: z.array(z.string()),
  /** The figure the board is read by. */
  figure,
  method: z.string(),
  lastCircuitAt: timestamp,
  frozenAt: timestamp,
  demo: z.boolean(),
});

/** GET /api/v1/boards/{class}/{version} : rows sorted by estimate, best first; no ranks. */
export const board = z.object({
  gateClass: gateClassSummary,
  figure: boardFigure,
  method: z.string(),
  readAt: timestamp,
  rows: z.array(boardRow),
  /** Public and citable, but not taken on equal terms. */
  notListed: z.array(z.object({ row: boardRow, reasons: z.array(z.object({ code: z.string(), sentence: z.string(), remedy: z.string() })) })),
  filters: z.object({ modalities: z.array(z.string()), providers: z.array(z.object({ id: z.string(), name: z.string() })) }),
});

export type BoardSummary = z.infer<typeof boardSummary>;
export type BoardFigure = z.infer<typeof boardFigure>;
export type BoardRow = z.infer<typeof boardRow>;
export type Board = z.infer<typeof board>;
