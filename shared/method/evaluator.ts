import { advanceVectors } from '#shared/linalg/advance.ts';
import { pairDots } from '#shared/linalg/dots.ts';
import { openArena, type Arena } from '#shared/linalg/wasm/arena.ts';
import type { NoisyMaps } from '#shared/method/parameters.ts';
import { compileCircuits, type Program } from '#shared/method/program.ts';

/**
 * Outcome probabilities of a fixed set of circuits for one set of maps after another: the full product of noisy maps.
 * All memory is allocated once. Cost about D² multiply-adds a node of the program.
 */
export class Evaluator {
  readonly rows: number;
  private readonly D: number;
  private readonly program: Program;
  private readonly gates: number;
  private readonly arena: Arena;
  /** Words as their columns, then the states of the nodes: all vectors of length D, each the image of its parent. */
  private readonly vectors: Float64Array;
  private readonly parent: Int32Array;
  private readonly firstState: number;
  private readonly effects: Float64Array;
  private readonly found: Float64Array;
  /** Byte addresses in the arena. */
  private readonly at: { parent: number; pulled: number; found: number; pulls: number; reads: number };
  private readonly pullCount: number;

  /** @param outcomes d − 1: the last probability is what is left of one */
  constructor(circuits: readonly Int32Array[], gates: number, D: number, outcomes: number, plain = false) {
    this.D = D;
    this.gates = gates;
    this.rows = circuits.length * outcomes;
    this.program = compileCircuits(circuits, gates, D, outcomes);
    const { prefix, nodes, endings } = this.program;
    this.firstState = prefix.length * D;
    const count = this.firstState + nodes;
    const effectsAt = count * D * 8;
    const pulled = effectsAt + outcomes * D * 8;
    this.pullCount = endings.length * outcomes * D;
    const found = pulled + this.pullCount * 8;
    const pulls = found + this.rows * 8;
    const reads = pulls + this.pullCount * 8;
    const parent = reads + this.rows * 8;
    this.at = { parent, pulled, found, pulls, reads };
    this.arena = openArena(parent + count * 4 + 8, plain);
    const { buffer } = this.arena;
    this.vectors = new Float64Array(buffer, 0, count * D);
    this.effects = new Float64Array(buffer, effectsAt, outcomes * D);
    this.found = new Float64Array(buffer, found, this.rows);
    this.parent = new Int32Array(buffer, parent, count);
    this.layParents();
    this.layPairs(outcomes, effectsAt);
  }

  private layParents(): void {
    const { D, parent, program, firstState } = this;
    program.prefix.forEach((word, w) => {
      for (let c = 0; c < D; c++) parent[w * D + c] = word * D + c;
    });
    for (let node = 0; node < program.nodes; node++) parent[firstState + node] = firstState + program.parent[node]!;
  }

  /** Which vectors are multiplied: effects with the columns of each last word, then what that gives with the states. */
  private layPairs(outcomes: number, effectsAt: number): void {
    const { D, program, arena, at, firstState } = this;
    const pulls = new Int32Array(arena.buffer, at.pulls, 2 * this.pullCount);
    const reads = new Int32Array(arena.buffer, at.reads, 2 * this.rows);
    const size = 8 * D;
    let place = 0;
    for (const word of program.endings) {
      for (let o = 0; o < outcomes; o++) {
        for (let j = 0; j < D; j++) {
          pulls[place++] = effectsAt + o * size;
          pulls[place++] = (word * D + j) * size;
        }
      }
    }
    place = 0;
    program.ending.forEach((ending, c) => {
      for (let o = 0; o < outcomes; o++) {
        reads[place++] = ending < 0 ? effectsAt + o * size : at.pulled + (ending * outcomes + o) * size;
        reads[place++] = (firstState + program.endNode[c]!) * size;
      }
    });
  }

  /** Writes the probability of row i (circuit-major, outcomes ascending) to out[at + stride·i]. */
  run(maps: NoisyMaps, out: Float64Array, at = 0, stride = 1): void {
    const { D, program, vectors, firstState, arena, found } = this;
    this.takeGates(maps.gates);
    for (let w = this.gates; w < program.prefix.length; w++) this.advance(program.lastGate[w]!, w * D, (w + 1) * D);
    vectors.set(maps.state, firstState * D);
    for (const run of program.runs) this.advance(run.word, firstState + run.from, firstState + run.to);
    this.effects.set(maps.effects);
    pairDots(arena, this.at.pulls, this.pullCount, this.at.pulled, D);
    pairDots(arena, this.at.reads, this.rows, this.at.found, D);
    for (let i = 0, place = at; i < this.rows; i++, place += stride) out[place] = found[i]!;
  }

  private takeGates(gates: Float64Array): void {
    const { D, vectors } = this;
    for (let k = 0; k < this.gates; k++) {
      const at = k * D * D;
      for (let i = 0; i < D; i++) for (let j = 0; j < D; j++) vectors[at + j * D + i] = gates[at + i * D + j]!;
    }
  }

  private advance(word: number, from: number, to: number): void {
    const { D, arena, vectors, parent } = this;
    const g = word * D * D;
    if (arena.kernels && D === 16) arena.kernels.advance16(g * 8, 0, this.at.parent, from, to);
    else if (arena.kernels && D === 4) arena.kernels.advance4(g * 8, 0, this.at.parent, from, to);
    else advanceVectors(vectors, g, D, vectors, parent, from, to);
  }
}
