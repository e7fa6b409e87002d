import type { Dataset, Figure, GateClass, Result, Seal } from '#shared/formats/types.ts';

/** The files of a frozen entry as they were handed out. */
export interface FrozenFiles {
  dataset: Uint8Array;
  result: Uint8Array;
  seal: Uint8Array | null;
  /** With it the seal is held to the commitment that was printed before a shot was taken. */
  runSheet: Uint8Array | null;
  /** Only its digest is needed, until that differs. */
  replicates: Uint8Array | null;
}

/** What the record says of them, lower-case hex. */
export interface RecordedDigests {
  contentId: string;
  bytesSha256: string;
  resultSha256: string;
  replicatesSha256: string;
}

/** One thing held to the record. `left-out` = there is nothing to hold. */
export interface FileCheck {
  id: string;
  title: string;
  outcome: 'agrees' | 'differs' | 'left-out';
  detail: string;
}

/** A frozen entry that can be estimated again. */
export interface Recomputable {
  dataset: Dataset;
  contentId: string;
  gateClass: GateClass | null;
  seal: Seal | null;
  result: Result;
}

/** identical: to the last digit. close: within 1e-9 of max(1, |x|). differs: anything else. */
export type Agreement = 'identical' | 'close' | 'differs';

/** A place in the result at which the two are not identical. */
export interface Difference {
  pointer: string;
  frozen: unknown;
  again: unknown;
  /** |frozen − again| where both are numbers. */
  gap: number | null;
}

/** One line of the comparison: a figure with its intervals, or another part of the result. */
export interface ComparedPart {
  title: string;
  agreement: Agreement;
  differences: Difference[];
}

export interface ComparedFigure extends ComparedPart {
  frozen: Figure;
  again: Figure | null;
}

export interface ComparedBytes {
  agreement: Agreement;
  frozenSha256: string;
  againSha256: string;
  /** Largest gap of two numbers; null where nothing is to be compared number by number. */
  largestGap: number | null;
}

export interface Comparison {
  /** The worst of all that follows. */
  agreement: Agreement;
  figures: ComparedFigure[];
  parts: ComparedPart[];
  /** The result in canonical form. */
  result: ComparedBytes;
  replicates: ComparedBytes;
}
