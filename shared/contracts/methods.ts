import { z } from 'zod';
import { figure, pageOf, sha256, timestamp } from './common.ts';

/** GET /api/v1/methods : the method versions of this registry, oldest first. */
export const methodView = z.object({
  id: z.string(),
  /** official: entries are frozen with it and boards rank by it. draft: computed to see what a change would do. */
  status: z.enum(['official', 'draft']),
  passes: z.number().int(),
  since: z.iso.date(),
  changes: z.string(),
  /** Public versions of entries that have a result by it. */
  results: z.number().int(),
});
export const methodList = pageOf(methodView);

/** GET /api/v1/entries/{accession}/v/{n}/results : every result of a version, the frozen one first. */
export const versionResult = z.object({
  method: z.string(),
  status: z.enum(['official', 'draft']),
  /** The result that was frozen with the version; the others were added beside it. */
  frozen: z.boolean(),
  madeAt: timestamp,
  replicates: z.number().int(),
  headline: figure.nullable(),
  settled: z.boolean(),
  resultSha256: sha256,
  replicatesSha256: sha256,
  links: z.object({ result: z.string(), replicates: z.string().nullable() }),
});
export const versionResults = pageOf(versionResult);

export type MethodView = z.infer<typeof methodView>;
export type VersionResult = z.infer<typeof versionResult>;
