import { z } from 'zod';
import { pageQuery, sha256, timestamp } from './common.ts';

/** What a leaf of the log says. Its data are the RFC 8785 bytes of exactly these members. */
export const logLeaf = z.object({
  event: z.enum(['frozen', 'withdrawn']),
  accession: z.string(),
  version: z.number().int(),
  contentId: sha256,
  bytesSha256: sha256,
  resultSha256: sha256,
  replicatesSha256: sha256,
  method: z.string(),
  at: timestamp,
});

/** GET /api/v1/log/head : signed over the RFC 8785 bytes of the first three members. */
export const logHead = z.object({
  treeSize: z.number().int(),
  rootHash: sha256,
  at: timestamp,
  signature: z.string(),
  keyId: sha256,
  publicKey: z.string(),
});
export const logHeadQuery = z.object({
  /** Number of leaves of an earlier head; absent = the newest head. */
  size: z.coerce.number().int().min(1).max(2_147_483_647).optional(),
});

/** GET /api/v1/entries/{accession}/v/{n}/proof */
export const logProof = z.object({
  leaf: logLeaf,
  leafIndex: z.number().int(),
  treeSize: z.number().int(),
  rootHash: sha256,
  path: z.array(sha256),
  head: logHead,
});
export const logProofQuery = z.object({ event: z.enum(['frozen', 'withdrawn']).default('frozen') });

/** GET /api/v1/log/consistency?first=&second= */
export const logConsistency = z.object({ first: z.number().int(), second: z.number().int(), path: z.array(sha256) });
const size = z.coerce.number().int().min(1).max(2_147_483_647);
export const logConsistencyQuery = z.object({ first: size, second: size });

/** GET /api/v1/log/leaves : from the first leaf on, so that anyone can build the whole tree. */
export const logLeafItem = z.object({ index: z.number().int(), hash: sha256, leaf: logLeaf });
export const logLeafQuery = pageQuery.extend({ order: z.enum(['oldest', 'newest']).default('oldest') });
export const logLeafList = z.object({ items: z.array(logLeafItem), nextCursor: z.string().nullable() });

/** GET /api/v1/log/growth : leaves of each month, and the size of the log at its end. */
export const logGrowth = z.object({ months: z.array(z.object({ month: z.string(), leaves: z.number().int(), size: z.number().int() })) });

export type LogLeaf = z.infer<typeof logLeaf>;
export type LogHead = z.infer<typeof logHead>;
export type LogProof = z.infer<typeof logProof>;
export type LogConsistency = z.infer<typeof logConsistency>;
export type LogGrowth = z.infer<typeof logGrowth>;
export type LogLeafList = z.infer<typeof logLeafList>;
export type LogLeafItem = z.infer<typeof logLeafItem>;
