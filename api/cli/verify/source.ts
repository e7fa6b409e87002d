import { z } from 'zod';
import { sha256 } from '#shared/contracts/common.ts';
import { entryState } from '#shared/contracts/entries.ts';
import { accessionPattern } from '#shared/domain/ids.ts';
import type { FileCheck, RecordedDigests } from '#shared/recompute/types.ts';

/** What cannot be read at all: exit status 2. */
export class Unreadable extends Error {}

/** The facts of an entry that a check needs, from its address or from its archive. */
export const facts = z.object({
  accession: z.string().regex(accessionPattern),
  version: z.number().int().positive(),
  method: z.string(),
  contentId: sha256, bytesSha256: sha256, resultSha256: sha256, replicatesSha256: sha256,
});
export type EntryFacts = z.infer<typeof facts>;
export const publicState = entryState;

export interface EntrySource {
  facts: EntryFacts;
  /** The data is no longer handed out. */
  withdrawn: boolean;
  dataset: Uint8Array | null;
  result: Uint8Array;
  replicates: Uint8Array | null;
  seal: Uint8Array | null;
  runSheet: Uint8Array | null;
  /** The proof as it was published; null where there is none. */
  proof: unknown;
  /** The proof of the withdrawal, of a withdrawn entry. */
  withdrawal: unknown;
  /** Checks that belong to where the entry came from. */
  checks: FileCheck[];
}

export const recordedOf = ({ contentId, bytesSha256, resultSha256, replicatesSha256 }: EntryFacts): RecordedDigests => ({ contentId, bytesSha256, resultSha256, replicatesSha256 });

const mebi = 2 ** 20;
/** Most bytes of each file that are read. */
export const mostBytes = { entry: 16 * mebi, dataset: 64 * mebi, result: 64 * mebi, replicates: 512 * mebi, seal: 16 * mebi, runSheet: 64 * mebi, proof: mebi, archive: 768 * mebi } as const;

export const inMebi = (bytes: number): string => `${Math.round(bytes / mebi)} MiB`;

/** A file as JSON; a fault names the file. */
export function parseJson(bytes: Uint8Array, name: string): unknown {
  try {
    return JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(bytes));
  } catch {
    throw new Unreadable(`${name} is not readable JSON.`);
  }
}
