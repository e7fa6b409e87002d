import type { Part, RegisterCircuit } from '#shared/method/chain/register-program.ts';
import { multiplyHeld } from '#shared/method/chain/register-state.ts';
import { RegisterVectors } from '#shared/method/chain/register-vectors.ts';

/**
 * Outcome probabilities of circuits over the register at one row of its patches' tables after another. Each part of a circuit
 * is a tensor of its own; gates on one qubit are gathered until an entangling gate meets that qubit, or the readout.
 * Cost of a part of m qubits: about 64 multiply-adds a one-qubit gate and (16 + 4 + 4)·4^m an entangling gate.
 */
export class RegisterEvaluator {
  private vectors: RegisterVectors;
  /** Which qubits have gathered maps. */
  private holds: boolean[] = [];
  private readonly plain: boolean;

  /** @param plain without kernels: for the test that both give the same bits */
  constructor(plain = false) {
    this.plain = plain;
    this.vectors = new RegisterVectors(1, plain);
  }

  /** Writes the d probabilities of the circuit to out[at …], unclipped. */
  run(circuit: RegisterCircuit, row: number, out: Float64Array, at: number): void {
    const { d, parts } = circuit;
    out.fill(1, at, at + d);
    for (const part of parts) {
      const found = this.runPart(part, row);
      for (let o = 0; o < d; o++) out[at + o]! *= found[part.outcome[o]!]!;
    }
  }

  private runPart({ locals, steps }: Part, row: number): Float64Array {
    const m = locals.length;
    this.prepare(m);
    for (let i = 0, size = 1; i < m; i++, size *= 4) this.widen(locals[i]!.state, row * 4, size);
    for (const { table, at, first, second } of steps) {
      const g = (row * table.count + at) * table.D * table.D;
      if (second < 0) this.gather(table.gates, g, first);
      else {
        this.release(m, first);
        this.release(m, second);
        this.vectors.applyTwo(m, first, second, table.gates, g);
      }
    }
    for (let i = 0; i < m; i++) this.release(m, i);
    for (let i = 0; i < m; i++) this.readFirst(m, i, locals[i]!.effects, row * 8);
    return this.vectors.vector;
  }

  private prepare(m: number): void {
    if (this.vectors.qubits < m) this.vectors = new RegisterVectors(m, this.plain);
    this.vectors.vector[0] = 1;
    this.holds = new Array<boolean>(m).fill(false);
  }

  /** vector ← vector ⊗ a state of one qubit. */
  private widen(state: Float64Array, at: number, size: number): void {
    const { vector } = this.vectors;
    for (let p = size - 1; p >= 0; p--) {
      const w = vector[p]!;
      for (let a = 3; a >= 0; a--) vector[4 * p + a] = w * state[at + a]!;
    }
  }

  private gather(maps: Float64Array, g: number, qubit: number): void {
    if (this.holds[qubit]) multiplyHeld(maps, g, this.vectors.held, 16 * qubit);
    else this.vectors.held.set(maps.subarray(g, g + 16), 16 * qubit);
    this.holds[qubit] = true;
  }

  private release(m: number, qubit: number): void {
    if (!this.holds[qubit]) return;
    this.vectors.applyHeld(m, qubit);
    this.holds[qubit] = false;
  }

  /** Takes the effects of the qubit that comes first now; its outcome joins the others behind: [a, rest, seen] → [rest, seen, o]. */
  private readFirst(m: number, read: number, effects: Float64Array, at: number): void {
    const rest = 4 ** (m - 1 - read) * 2 ** read;
    const { vector, spare } = this.vectors;
    for (let p = 0; p < rest; p++) {
      for (let o = 0; o < 2; o++) {
        const e = at + 4 * o;
        spare[2 * p + o] = effects[e]! * vector[p]! + effects[e + 1]! * vector[rest + p]! + effects[e + 2]! * vector[2 * rest + p]! + effects[e + 3]! * vector[3 * rest + p]!;
      }
    }
    this.vectors.swap();
  }
}
