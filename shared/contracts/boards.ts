import { z } from 'zod';
import { deviceRef, figure, gateClassRef, interval, timestamp } from './common.ts';
import { gateClassSummary } from './gate-classes.ts';

/** GET /api/v1/boards : one line a board, for the home page and the list of boards. */
export const boardSummary = z.object({
  gateClass: gateClassRef,
  entries: z.number().int(),
  eligible: z.number().int(),
  lastChange: timestamp.nullable(),
  /** Who may be first, read by retained signal at depth 16: entries whose rank range begins at 1, the worst rank of their ranges, and how many entries are ranked. Null with fewer than two. */
  first: z.object({ entries: z.number().int(), to: z.number().int(), of: z.number().int() }).nullable(),
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
  /** Method version to read the board by; the official one unless told. */
  method: z.string().max(8).optional(),
});

/** The ranks an entry may hold. All ranges of a board hold at once with the probability named in `ranking`. */
export const rankRange = z.object({
  low: z.number().int().min(1),
  high: z.number().int().min(1),
  /** Accessions of the entries it cannot be told apart from. */
  tiedWith: z.array(z.string()),
});

export const boardRow = z.object({
  accession: z.string(),
  version: z.number().int(),
  device: deviceRef,
  register: z.array(z.string()),
  /** The figure the board is read by. */
  figure,
  /** Null for an entry that is not ranked, and on a board with fewer than two. */
  rank: rankRange.nullable(),
  method: z.string(),
  lastCircuitAt: timestamp,
  frozenAt: timestamp,
  demo: z.boolean(),
});

/** GET /api/v1/boards/{class}/{version} : rows sorted by estimate, best first, each with its rank range. */
export const board = z.object({
  gateClass: gateClassSummary,
  figure: boardFigure,
  method: z.string(),
  /** Versions the board may be read by: the official one, and those that entries of it have a result by. Nothing is ranked by a draft. */
  methods: z.array(z.object({ id: z.string(), status: z.enum(['official', 'draft']), results: z.number().int() })),
  readAt: timestamp,
  /** How the ranks were found: joint level, eligible entries compared (those that a filter hides included), replicates of each. Null with fewer than two. */
  ranking: z.object({ level: z.number(), entries: z.number().int(), replicates: z.number().int() }).nullable(),
  rows: z.array(boardRow),
  /** Public and citable, but not taken on equal terms. */
  notListed: z.array(z.object({ row: boardRow, reasons: z.array(z.object({ code: z.string(), sentence: z.string(), remedy: z.string() })) })),
  filters: z.object({ modalities: z.array(z.string()), providers: z.array(z.object({ id: z.string(), name: z.string() })) }),
});

/** GET /api/v1/boards/{class}/{version}/difference : two entries of the board by one figure. */
export const differenceQuery = z.object({
  figure: boardFigure.default('retained-signal-16'),
  /** Accessions of two entries that stand on the board. */
  a: z.string().max(24),
  b: z.string().max(24),
});
const compared = z.object({ accession: z.string(), version: z.number().int(), name: z.string() });
export const boardDifference = z.object({
  a: compared,
  b: compared,
  figure: boardFigure,
  method: z.string(),
  /** a − b, with its own interval. */
  value: z.number(),
  standardError: z.number(),
  intervals: z.array(interval),
  /** Share of the replicates in which a is better. */
  shareBetter: z.number().min(0).max(1),
  replicates: z.number().int(),
});

export type BoardDifference = z.infer<typeof boardDifference>;
export type BoardSummary = z.infer<typeof boardSummary>;
export type BoardFigure = z.infer<typeof boardFigure>;
export type RankRange = z.infer<typeof rankRange>;
export type BoardRow = z.infer<typeof boardRow>;
export type Board = z.infer<typeof board>;
