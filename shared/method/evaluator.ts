import { advanceNodes } from '#shared/linalg/advance.ts';
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
  private readonly gates: number;
  private readonly words: Float64Array;
  private readonly states: Float64Array;
  private readonly pulled: Float64Array;
  private readonly product: Float64Array;

  /** @param outcomes d − 1: the last probability is what is left of one */
  constructor(circuits: readonly Int32Array[], gates: number, D: number, outcomes: number) {
    this.D = D;
    this.outcomes = outcomes;
    this.gates = gates;
    this.rows = circuits.length * outcomes;
    this.program = compileCircuits(circuits, gates, D, outcomes);
    this.words = new Float64Array(this.program.prefix.length * D * D);
    this.states = new Float64Array(this.program.nodes * D);
    this.pulled = new Float64Array(this.program.endings.length * outcomes * D);
    this.product = new Float64Array(D * D);
  }

  /** Writes the probability of row i (circuit-major, outcomes ascending) to out[at + stride·i]. */
  run(maps: NoisyMaps, out: Float64Array, at = 0, stride = 1): void {
    this.formWords(maps.gates);
    const { D, program, states } = this;
    states.set(maps.state);
    for (const run of program.runs) advanceNodes(this.words, run.word * D * D, D, states, program.parent, run.from, run.to);
    this.pullEffects(maps.effects);
    this.readOut(maps.effects, out, at, stride);
  }

  private formWords(gates: Float64Array): void {
    const { D, program, words, product } = this;
    words.set(gates);
    for (let w = this.gates; w < program.prefix.length; w++) {
      const g = program.lastGate[w]! * D * D;
      const p = program.prefix[w]! * D * D;
      const o = w * D * D;
      multiplySquare(words, g, words, p, product, D);
      words.set(product, o);
    }
  }

  /** M_o·W for every word that ends a circuit. */
  private pullEffects(effects: Float64Array): void {
    const { D, outcomes, program, pulled, words } = this;
    pulled.fill(0);
    for (let e = 0; e < program.endings.length; e++) {
      const w = program.endings[e]! * D * D;
      for (let o = 0; o < outcomes; o++) {
        const at = (e * outcomes + o) * D;
        for (let i = 0; i < D; i++) {
          const m = effects[o * D + i]!;
          for (let j = 0; j < D; j++) pulled[at + j]! += m * words[w + i * D + j]!;
        }
      }
    }
  }

  private readOut(effects: Float64Array, out: Float64Array, at: number, stride: number): void {
    const { D, outcomes, program, pulled, states } = this;
    let row = at;
    for (let c = 0; c < program.endNode.length; c++) {
      const v = program.endNode[c]! * D;
      const ending = program.ending[c]!;
      for (let o = 0; o < outcomes; o++) {
        const source = ending < 0 ? effects : pulled;
        const b = ending < 0 ? o * D : (ending * outcomes + o) * D;
        let s = 0;
        for (let j = 0; j < D; j++) s += source[b + j]! * states[v + j]!;
        out[row] = s;
        row += stride;
      }
    }
  }
}

/** out = A·B for D×D matrices within larger arrays. */
function multiplySquare(a: Float64Array, aAt: number, b: Float64Array, bAt: number, out: Float64Array, D: number): void {
  for (let i = 0; i < D; i++) {
    for (let j = 0; j < D; j += 4) {
      let s0 = 0, s1 = 0, s2 = 0, s3 = 0;
      for (let k = 0; k < D; k++) {
        const w = a[aAt + i * D + k]!;
        const p = bAt + k * D + j;
        s0 += w * b[p]!;
        s1 += w * b[p + 1]!;
        s2 += w * b[p + 2]!;
        s3 += w * b[p + 3]!;
      }
      const q = i * D + j;
      out[q] = s0;
      out[q + 1] = s1;
      out[q + 2] = s2;
      out[q + 3] = s3;
    }
  }
}
