import { gateClassById } from '#shared/domain/gate-classes.ts';
import type { FigureTally } from '#tests/studies/coverage/tally.ts';
import { cellId, chunkStream, type Cell } from '#tests/studies/coverage/cells.ts';
import { runChainedChunk } from '#tests/studies/coverage/chained-chunk.ts';
import { runJointChunk } from '#tests/studies/coverage/joint-chunk.ts';

/** What one chunk found: one line of the study's work file. */
export interface ChunkResult {
  cell: string;
  chunk: number;
  trials: number;
  settled: number;
  stopped: number;
  /** Sealed checks that passed. */
  passed: number;
  /** Greatest true gate loss of the chunk's device. */
  loss: number;
  seconds: number;
  figures: FigureTally[];
}

export type Found = Omit<ChunkResult, 'cell' | 'chunk' | 'seconds'>;

/** Runs chunk number `chunk` of a cell: one made device, one sheet of circuits, `cell.chunk` datasets. Pure but for the clock. */
export function runChunk(cell: Cell, chunk: number): ChunkResult {
  const started = performance.now();
  const gateClass = gateClassById(cell.gateClass);
  if (!gateClass) throw new RangeError(`no gate class "${cell.gateClass}"`);
  const run = gateClass.kind === 'joint' ? runJointChunk : runChainedChunk;
  const found = run(cell, gateClass, chunkStream(cell, chunk), chunk);
  return { cell: cellId(cell), chunk, ...found, seconds: Math.round(performance.now() - started) / 1000 };
}
