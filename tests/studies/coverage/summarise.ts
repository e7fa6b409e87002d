import { DEFAULT_REPLICATES, METHOD } from '#shared/method/constants.ts';
import type { CoverageCell, CoverageFigure, CoverageStudy } from '#shared/studies/coverage-study.ts';
import { cellId, SEED_RULE, type Cell } from '#tests/studies/coverage/cells.ts';
import type { ChunkResult } from '#tests/studies/coverage/chunk.ts';
import type { FigureTally } from '#tests/studies/coverage/tally.ts';

const NOTES = [
  'Every chunk of trials has a made device and a sheet of circuits of its own, of the least size its class allows; the truth of each figure is read from the exact maps, which no gauge can change.',
  'Intervals are read from fewer replicates than are published, at places chosen so that a further replicate falls outside as often as it does with the published number.',
  'Prediction error: the truth is the mean total variation distance between the exact probabilities and what was counted on the sealed circuits of the same trial.',
  'Predictions: the probability of the first outcome of one further random circuit of each length; not counted for chained registers.',
  'Half-turn class: predictions and figures to first order; trials whose misfit withholds the intervals are left out, as they are in a result.',
];

/** The committed study from the finished chunks: counts added up, cells in the order of the grid; cells without trials left out. */
export function summarise(results: readonly ChunkResult[], cells: readonly Cell[], date: string): CoverageStudy {
  return {
    format: 'evenbeam.study.coverage', method: METHOD, date, command: 'npm run study:coverage && npm run study:coverage -- --summarise',
    seedRule: SEED_RULE, publishedReplicates: DEFAULT_REPLICATES, notes: NOTES,
    cells: cells.flatMap((cell) => {
      const own = results.filter((r) => r.cell === cellId(cell)).sort((a, b) => a.chunk - b.chunk);
      return own.length > 0 ? [sumCell(cell, own)] : [];
    }),
  };
}

const sum = (results: readonly ChunkResult[], of: (r: ChunkResult) => number): number => results.reduce((n, r) => n + of(r), 0);

function sumCell(cell: Cell, results: readonly ChunkResult[]): CoverageCell {
  const figures = new Map<string, FigureTally>();
  for (const result of results) {
    for (const f of result.figures) {
      const id = JSON.stringify([f.key, f.depth, f.gate, f.qubits]);
      const before = figures.get(id);
      figures.set(id, before ? added(before, f) : f);
    }
  }
  return {
    gateClass: cell.gateClass, noise: cell.noise, coherent: cell.coherent, shots: cell.shots, trials: sum(results, (r) => r.trials), devices: results.length,
    replicates: cell.replicates, settled: sum(results, (r) => r.settled), stopped: sum(results, (r) => r.stopped), sealedPassed: sum(results, (r) => r.passed),
    greatestLoss: rounded(sum(results, (r) => r.loss) / results.length), figures: [...figures.values()].map(written),
  };
}

const pairSum = <T extends number[]>(a: T, b: T): T => a.map((v, i) => v + b[i]!) as T;

function added(a: FigureTally, b: FigureTally): FigureTally {
  return {
    ...a, trials: a.trials + b.trials, inside: pairSum(a.inside, b.inside), below: a.below + b.below, above: a.above + b.above,
    z: a.z + b.z, zz: a.zz + b.zz, settled: pairSum(a.settled, b.settled),
  };
}

const rounded = (v: number): number => Number(v.toPrecision(4));

function written({ key, depth, gate, qubits, trials, inside, below, above, z, zz, settled }: FigureTally): CoverageFigure {
  const mean = trials > 0 ? z / trials : 0;
  const spread = trials > 1 ? Math.sqrt(Math.max(0, zz - trials * mean * mean) / (trials - 1)) : 0;
  return { key, depth, gate, qubits, trials, inside, below, above, z: [rounded(mean), rounded(spread)], settled };
}

/** One line a figure, so that a change of the study can be read as a difference. */
export function writeStudy(study: CoverageStudy): string {
  const { cells, ...head } = study;
  const lines = cells.map(({ figures, ...cell }) => `    ${JSON.stringify(cell).slice(0, -1)},"figures":[\n${figures.map((f) => `      ${JSON.stringify(f)}`).join(',\n')}\n    ]}`);
  return `${JSON.stringify(head, null, 2).slice(0, -2)},\n  "cells": [\n${lines.join(',\n')}\n  ]\n}\n`;
}
