import { sha256 } from '@noble/hashes/sha2.js';
import { utf8ToBytes } from '@noble/hashes/utils.js';
import { gateClasses } from '#shared/domain/gate-classes.ts';
import { Xoshiro256 } from '#shared/random/xoshiro256.ts';

/** One cell of the study: a class, and what its made devices and datasets are like. */
export interface Cell {
  gateClass: string;
  /** Entanglement infidelity of each made device's worst gate. */
  noise: number;
  /** Share of the infidelity that is a wrong rotation; the rest is flips and damping. */
  coherent: number;
  shots: number;
  /** Trials aimed at. */
  trials: number;
  /** Trials of one device and one sheet of circuits. */
  chunk: number;
  replicates: number;
}

export const cellId = (c: Cell): string => `${c.gateClass} noise=${c.noise} coherent=${c.coherent} shots=${c.shots}`;

/**
 * Every random number of a chunk comes from the stream of this text, so that a chunk is the same whenever, wherever and in
 * whatever order it is run. Written down and committed before the first run.
 */
export const SEED_RULE = 'xoshiro256** from SHA-256 of the UTF-8 text "coverage study 1: <class> noise=<noise> coherent=<share> shots=<shots>, chunk <number from 0>"';

export const seedText = (cell: Cell, chunk: number): string => `coverage study 1: ${cellId(cell)}, chunk ${chunk}`;

export const chunkStream = (cell: Cell, chunk: number): Xoshiro256 => new Xoshiro256(sha256(utf8ToBytes(seedText(cell, chunk))));

interface Grid {
  gateClass: string;
  noise: readonly number[];
  coherent: readonly number[];
  shots: readonly number[];
}

const cellsOf = ({ gateClass, noise, coherent, shots }: Grid, size: Pick<Cell, 'trials' | 'chunk' | 'replicates'>): Cell[] =>
  noise.flatMap((n) => coherent.flatMap((c) => shots.map((s): Cell => ({ gateClass, noise: n, coherent: c, shots: s, ...size }))));

const ONE = { trials: 2000, chunk: 50, replicates: 200 };
const PAIR = { trials: 100, chunk: 10, replicates: 200 };

const PAIR_CELLS: readonly Cell[] = [
  ...cellsOf({ gateClass: 'quarter-turn-cz-2q/1', noise: [3e-3, 2e-2], coherent: [0.5], shots: [1000] }, PAIR),
  ...cellsOf({ gateClass: 'quarter-turn-cz-2q/1', noise: [1e-2], coherent: [1], shots: [1000] }, PAIR),
  ...cellsOf({ gateClass: 'chained-cz-2q/1', noise: [1e-2], coherent: [1], shots: [1000] }, PAIR),
  ...cellsOf({ gateClass: 'chained-cz-2q/1', noise: [2e-2], coherent: [0.5], shots: [1000] }, PAIR),
  ...cellsOf({ gateClass: 'chained-cz-3q/1', noise: [1e-2], coherent: [0.5], shots: [1000] }, PAIR),
];

/**
 * The grid. Every class over its noise at the least number of shots, without and with nothing but coherent error; four times the
 * shots with coherent error, where a remaining bias would show. Each step is finished before the next is gone on with: those that
 * decide the domains of most entries come first, and of pairs as many as say anything.
 */
export const steps: readonly (readonly Cell[])[] = [
  PAIR_CELLS.map((cell) => ({ ...cell, trials: 30 })),
  [
    ...cellsOf({ gateClass: 'quarter-turn-1q/1', noise: [1e-3, 3e-3, 6e-3], coherent: [1], shots: [500] }, ONE),
    ...cellsOf({ gateClass: 'quarter-turn-1q/1', noise: [3e-3], coherent: [0], shots: [500] }, ONE),
    ...cellsOf({ gateClass: 'quarter-turn-1q/1', noise: [3e-3], coherent: [1], shots: [2000] }, ONE),
    ...cellsOf({ gateClass: 'clifford-t-1q/1', noise: [1e-3], coherent: [1], shots: [500] }, ONE),
  ],
  [
    ...cellsOf({ gateClass: 'quarter-turn-1q/1', noise: [1e-4], coherent: [1], shots: [500] }, ONE),
    ...cellsOf({ gateClass: 'quarter-turn-1q/1', noise: [1e-3, 6e-3], coherent: [0], shots: [500] }, ONE),
    ...cellsOf({ gateClass: 'quarter-turn-1q/1', noise: [6e-3], coherent: [1], shots: [2000] }, ONE),
    ...cellsOf({ gateClass: 'clifford-t-1q/1', noise: [3e-3], coherent: [0, 1], shots: [500] }, ONE),
  ],
  PAIR_CELLS,
  [
    ...cellsOf({ gateClass: 'quarter-turn-1q/1', noise: [1e-2], coherent: [0, 1], shots: [500] }, ONE),
    ...cellsOf({ gateClass: 'quarter-turn-1q/1', noise: [1e-4, 1e-3, 1e-2], coherent: [1], shots: [2000] }, ONE),
    ...cellsOf({ gateClass: 'clifford-t-1q/1', noise: [6e-3], coherent: [0, 1], shots: [500] }, ONE),
    ...cellsOf({ gateClass: 'clifford-t-1q/1', noise: [1e-3, 3e-3], coherent: [1], shots: [2000] }, ONE),
    ...cellsOf({ gateClass: 'half-turn-1q/1', noise: [1e-3], coherent: [0, 1], shots: [1000] }, ONE),
  ],
  [
    ...cellsOf({ gateClass: 'quarter-turn-1q/1', noise: [1e-4], coherent: [0, 0.5], shots: [500] }, ONE),
    ...cellsOf({ gateClass: 'quarter-turn-1q/1', noise: [1e-3, 3e-3, 6e-3, 1e-2], coherent: [0.5], shots: [500] }, ONE),
    ...cellsOf({ gateClass: 'clifford-t-1q/1', noise: [6e-3], coherent: [1], shots: [2000] }, ONE),
    ...cellsOf({ gateClass: 'clifford-t-1q/1', noise: [1e-4, 1e-2], coherent: [0, 1], shots: [500] }, ONE),
  ],
];

const place = (cell: Cell): string => [gateClasses.findIndex((c) => c.id === cell.gateClass), cell.shots.toString().padStart(6, '0'), cell.noise.toFixed(6), cell.coherent].join(' ');

/** All cells, each with all its trials, in the order of the tables: by class, shots, noise, coherent share. */
export const cells: readonly Cell[] = [...new Map(steps.flat().map((cell) => [cellId(cell), cell])).values()].sort((a, b) => (place(a) < place(b) ? -1 : 1));
