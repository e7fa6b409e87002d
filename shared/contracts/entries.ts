import { z } from 'zod';
import { deviceRef, figure, gateClassRef, pageQuery, sealedCheck, sha256, timestamp } from './common.ts';

export const entryState = z.enum(['frozen', 'superseded', 'withdrawn']);

/** GET /api/v1/entries : newest first. */
export const entryItem = z.object({
  accession: z.string(),
  version: z.number().int(),
  state: entryState,
  title: z.string(),
  gateClass: z.string(),
  gateClassTitle: z.string(),
  device: deviceRef,
  frozenAt: timestamp,
  demo: z.boolean(),
});
export const entryListQuery = pageQuery.extend({
  gateClass: z.string().max(80).optional(),
  device: z.string().max(120).optional(),
  provider: z.string().max(120).optional(),
  /** Free text over device, provider and accession. */
  q: z.string().trim().max(80).optional(),
});
export const entryList = z.object({ items: z.array(entryItem), nextCursor: z.string().nullable() });

/** One sealed circuit, predicted and observed, for the drawing. */
export const sealedPoint = z.object({
  id: z.string(),
  length: z.number().int(),
  shots: z.number().int(),
  outcome: z.string(),
  predicted: z.number(),
  observed: z.number(),
});

/** GET /api/v1/entries/{accession} and …/v/{n}. The result file itself lies at `links.result`. */
export const entry = entryItem.extend({
  gateClass: z.string(),
  class: gateClassRef,
  register: z.array(z.string()),
  gates: z.array(z.object({ label: z.string(), words: z.string(), targets: z.array(z.number().int()) })),
  headline: figure.nullable(),
  method: z.string(),
  replicates: z.number().int(),
  figures: z.array(figure),
  warnings: z.array(z.string()),
  patches: z.array(z.object({
    qubits: z.array(z.number().int()), columns: z.number().int(), gaugeDimension: z.number().int(), rank: z.number().int(), conditionRatio: z.number(),
    rankAmbiguous: z.boolean(), complete: z.boolean(), sound: z.boolean(), settled: z.boolean(),
    misfit: z.object({ residualSum: z.number(), expected: z.number(), sigmas: z.number(), pValue: z.number() }).nullable(),
  })),
  /** Longest circuit estimated from; figures beyond twice this depth are extrapolated. */
  longestCircuit: z.number().int(),
  circuits: z.object({ estimated: z.number().int(), sealed: z.number().int(), shots: z.number().int(), minLength: z.number().int(), maxLength: z.number().int(), minShots: z.number().int(), maxShots: z.number().int() }),
  sealedCheck: sealedCheck.nullable(),
  sealedPoints: z.array(sealedPoint),
  provenance: z.object({
    contributors: z.array(z.object({ name: z.string(), orcid: z.string().nullable() })),
    organisation: z.string(),
    firmware: z.string().nullable(),
    runSheet: z.string().nullable(),
    startedAt: timestamp, endedAt: timestamp, software: z.string(), notes: z.string().nullable(), licence: z.string(),
    fileName: z.string(), bytes: z.number().int(),
    contentId: sha256, bytesSha256: sha256, resultSha256: sha256, replicatesSha256: sha256,
    reviewedAt: timestamp, reviewNote: z.string(),
  }),
  eligibility: z.array(z.object({ code: z.string(), sentence: z.string(), remedy: z.string() })),
  /** Why and by whom a withdrawn version was withdrawn; null for all others. */
  withdrawal: z.object({ reason: z.string(), at: timestamp, decidedBy: z.array(z.string()) }).nullable(),
  versions: z.array(z.object({ version: z.number().int(), frozenAt: timestamp, method: z.string(), state: entryState, headline: figure.nullable() })),
  links: z.object({ dataset: z.string(), result: z.string(), replicates: z.string(), seal: z.string().nullable(), runSheet: z.string().nullable(), archive: z.string(), page: z.string() }),
});

export type EntryItem = z.infer<typeof entryItem>;
export type Entry = z.infer<typeof entry>;
export type SealedPoint = z.infer<typeof sealedPoint>;
