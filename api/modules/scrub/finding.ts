import type { EntityManager } from '@mikro-orm/postgresql';

/** One place where the record is not what it was. */
export interface Finding {
  /** "EVB-000012.1", "leaf 4", "RS-000003" */
  where: string;
  sentence: string;
}

export interface Scrubbed {
  /** How many things were looked at, for the report. */
  looked: number;
  findings: Finding[];
}

export interface ScrubContext {
  em: EntityManager;
  /** SHA-256 of the public keys that may have signed; a signature by another key is a finding. */
  trustedKeys: readonly string[];
}

export type ScrubCheck = (context: ScrubContext) => Promise<Scrubbed>;
