import { apiUrl, type CitationRecord } from '#shared/citation/record.ts';

/** A file of an entry, as a landing page names it. */
export interface LandingFile {
  name: string;
  description: string;
  url: string;
  mediaType: string;
  /** Bytes; null where the file is put together on request. */
  size: number | null;
  sha256: string | null;
}

/** One figure of the whole register or of a gate: the estimate and its 95 % interval. */
export interface LandingFigure {
  name: string;
  value: number;
  low: number | null;
  high: number | null;
}

/** What a version's page tells machines. */
export interface Landing {
  record: CitationRecord;
  /** None once the version was withdrawn. */
  files: readonly LandingFile[];
  figures: readonly LandingFigure[];
}

export const linksetUrl = (record: CitationRecord): string => `${apiUrl(record)}/linkset`;
export const schemaOrgUrl = (record: CitationRecord): string => `${apiUrl(record)}/schema-org`;
export const citationUrl = (record: CitationRecord, format: string): string => `${apiUrl(record)}/citation?format=${format}`;
export const proofUrl = (record: CitationRecord): string => `${apiUrl(record)}/proof`;
