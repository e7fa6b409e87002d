import { advanceVectors } from '#shared/linalg/advance.ts';
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
  private readonly outcomes: number;
  private readonly program: Program;
  private readonly arena: Arena;
  private readonly parentAt: number;
  /** Words as their columns, then the states of the nodes: all vectors of length D, each the image of its parent. */
  private readonly vectors: Float64Array;
  private readonly parent: Int32Array;
  private readonly firstState: number;
  private readonly gates: number;
  private readonly pulled: Float64Array;

  /** @param outcomes d − 1: the last probability is what is left of one */
  constructor(circuits: readonly Int32Array[], gates: number, D: number, outcomes: number, plain = false) {
    this.D = D;
    this.outcomes = outcomes;
    this.gates = gates;
    this.rows = circuits.length * outcomes;
    this.program = compileCircuits(circuits, gates, D, outcomes);
    const { prefix, nodes, parent } = this.program;
    this.firstState = prefix.length * D;
    const count = this.firstState + nodes;
    this.parentAt = count * D * 8;
    this.arena = openArena(this.parentAt + count * 4, plain);
    this.vectors = new Float64Array(this.arena.buffer, 0, count * D);
    this.parent = new Int32Array(this.arena.buffer, this.parentAt, count);
    prefix.forEach((word, w) => {
      for (let c = 0; c < D; c++) this.parent[w * D + c] = word * D + c;
    });
    for (let node = 0; node < nodes; node++) this.parent[this.firstState + node] = this.firstState + parent[node]!;
    this.pulled = new Float64Array((this.program.endings.length + 1) * outcomes * D);
  }

  /** Writes the probability of row i (circuit-major, outcomes ascending) to out[at + stride·i]. */
  run(maps: NoisyMaps, out: Float64Array, at = 0, stride = 1): void {
    const { D, program, vectors, firstState } = this;
    this.takeGates(maps.gates);
    for (let w = this.gates; w < program.prefix.length; w++) this.advance(program.lastGate[w]!, w * D, (w + 1) * D);
    vectors.set(maps.state, firstState * D);
    for (const run of program.runs) this.advance(run.word, firstState + run.from, firstState + run.to);
    this.pullEffects(maps.effects);
    this.readOut(out, at, stride);
  }

  private takeGates(gates: Float64Array): void {
    const { D, vectors } = this;
    for (let k = 0; k < this.gates; k++) {
      const at = k * D * D;
      for (let i = 0; i < D; i++) for (let j = 0; j < D; j++) vectors[at + j * D + i] = gates[at + i * D + j]!;
    }
  }

  private advance(word: number, from: number, to: number): void {
    const { D, arena, vectors, parent, parentAt } = this;
    const g = word * D * D;
    if (arena.kernels && D === 16) arena.kernels.advance16(g * 8, 0, parentAt, from, to);
    else if (arena.kernels && D === 4) arena.kernels.advance4(g * 8, 0, parentAt, from, to);
    else advanceVectors(vectors, g, D, vectors, parent, from, to);
  }

  /** M_o·W for every word that ends a circuit; last M_o itself, for the empty circuit. */
  private pullEffects(effects: Float64Array): void {
    const { D, outcomes, program, pulled, vectors } = this;
    for (let e = 0; e < program.endings.length; e++) {
      const w = program.endings[e]! * D * D;
      for (let o = 0; o < outcomes; o++) {
        const at = (e * outcomes + o) * D;
        for (let j = 0; j < D; j++) {
          let s = 0;
          for (let i = 0; i < D; i++) s += effects[o * D + i]! * vectors[w + j * D + i]!;
          pulled[at + j] = s;
        }
      }
    }
    pulled.set(effects, program.endings.length * outcomes * D);
  }

  private readOut(out: Float64Array, at: number, stride: number): void {
    const { D, outcomes, program, pulled, vectors, firstState } = this;
    const { endNode, ending, endings } = program;
    let row = at;
    for (let c = 0; c < endNode.length; c++) {
      const v = (firstState + endNode[c]!) * D;
      const e = ending[c]!;
      let b = (e < 0 ? endings.length : e) * outcomes * D;
      for (let o = 0; o < outcomes; o++) {
        // Four sums side by side: one alone would wait for each addition.
        let s0 = 0, s1 = 0, s2 = 0, s3 = 0;
        for (let j = 0; j < D; j += 4) {
          s0 += pulled[b + j]! * vectors[v + j]!;
          s1 += pulled[b + j + 1]! * vectors[v + j + 1]!;
          s2 += pulled[b + j + 2]! * vectors[v + j + 2]!;
          s3 += pulled[b + j + 3]! * vectors[v + j + 3]!;
        }
        out[row] = s0 + s1 + (s2 + s3);
        row += stride;
        b += D;
      }
    }
  }
}
