import { effectGradient, pullWeights, readEffects, type QubitEffects } from '#shared/method/chain/read-effects.ts';
import { applyPlaced, contractPlaced, placePaulis, productVector, type PauliPlace } from '#shared/method/chain/register-space.ts';
import type { GateSet } from '#shared/method/gate-set.ts';
import type { Layout } from '#shared/method/parameters.ts';

/** One patch of a chained register at its ideal gates. */
export interface IdealPatch {
  qubits: readonly number[];
  set: GateSet;
  layout: Layout;
}

/** Locals by qubit, pairs by "a,b" in the order of the patch; gates are known by their labels. */
export interface IdealRegister {
  locals: readonly IdealPatch[];
  pairs: readonly IdealPatch[];
}

interface GateHome {
  patch: IdealPatch;
  gate: number;
}

/** Gradients over the columns of every patch: locals by qubit, then pairs, as they stand in the register. */
export interface PatchGradients {
  locals: Float64Array[];
  pairs: Float64Array[];
}

export function emptyGradients({ locals, pairs }: IdealRegister): PatchGradients {
  return { locals: locals.map((p) => new Float64Array(p.layout.columns)), pairs: pairs.map((p) => new Float64Array(p.layout.columns)) };
}

/**
 * Derivatives of F = Σ over circuits and outcomes of w·p by the parameters of every patch of a chained register, at the ideal
 * gates. Each circuit is over the same `qubits`; one pass forward and one backward a circuit, since Σ_o w_o M_o is one vector.
 * For gate G at step j, ∂F/∂E_xy = Σ over the other qubits of b_j[x, rest]·f_j[y, rest].
 * Cost: circuits × length × 4ⁿ⁺².
 */
export class FunctionalGradient {
  private readonly homes = new Map<string, GateHome & { at: PauliPlace }>();
  private readonly single: PauliPlace[];
  private readonly start: Float64Array;
  private readonly effects: readonly QubitEffects[];
  private readonly register: IdealRegister;
  private readonly qubits: readonly number[];

  constructor(register: IdealRegister, qubits: readonly number[]) {
    this.register = register;
    this.qubits = qubits;
    const n = qubits.length;
    for (const patch of [...register.locals, ...register.pairs]) {
      if (!patch.qubits.every((q) => qubits.includes(q))) continue;
      const at = placePaulis(n, patch.qubits.map((q) => qubits.indexOf(q)));
      patch.set.labels.forEach((label, gate) => { if (patch.layout.gateAt[gate]! >= 0) this.homes.set(label, { patch, gate, at }); });
    }
    this.single = qubits.map((_, axis) => placePaulis(n, [axis]));
    this.effects = qubits.map((q) => register.locals[q]!.set.effects);
    this.start = productVector(qubits.map((q) => this.register.locals[q]!.set.state));
  }

  /** Ideal probabilities of a circuit, all outcomes. */
  probabilities(gates: readonly string[]): Float64Array {
    return readEffects(this.forward(gates).at(-1)!, this.effects);
  }

  /** Adds the derivatives of Σ_o weights[o]·p(o | circuit). */
  add(gates: readonly string[], weights: Float64Array, out: PatchGradients): void {
    const states = this.forward(gates);
    this.qubits.forEach((q, axis) => {
      const { layout } = this.register.locals[q]!;
      effectGradient(states[gates.length]!, weights, this.effects, axis).forEach((v, a) => { out.locals[q]![layout.effectAt + a]! += v; });
    });
    let b = pullWeights(weights, this.effects);
    let spare: Float64Array = new Float64Array(b.length);
    for (let j = gates.length; j >= 1; j--) {
      const { patch, gate, at } = this.home(gates[j - 1]!);
      contractPlaced(at, b, states[j]!, this.gradientOf(patch, out), patch.layout.gateAt[gate]!);
      applyPlaced(patch.set.gates[gate]!, at, b, spare, true);
      [b, spare] = [spare, b];
    }
    this.addStates(b, out);
  }

  private forward(gates: readonly string[]): Float64Array[] {
    const states = [this.start];
    for (const label of gates) {
      const { patch, gate, at } = this.home(label);
      const next = new Float64Array(this.start.length);
      applyPlaced(patch.set.gates[gate]!, at, states.at(-1)!, next, false);
      states.push(next);
    }
    return states;
  }

  private home(label: string): GateHome & { at: PauliPlace } {
    const found = this.homes.get(label);
    if (!found) throw new RangeError(`gate "${label}" does not lie on these qubits`);
    return found;
  }

  private gradientOf(patch: IdealPatch, out: PatchGradients): Float64Array {
    const local = this.register.locals.indexOf(patch);
    return local >= 0 ? out.locals[local]! : out.pairs[this.register.pairs.indexOf(patch)]!;
  }

  private addStates(b: Float64Array, out: PatchGradients): void {
    this.qubits.forEach((q, axis) => {
      const { layout } = this.register.locals[q]!;
      const { offsets } = this.single[axis]!;
      const rest = productVector(this.qubits.map((other, i) => (i === axis ? Float64Array.of(1, 0, 0, 0) : this.register.locals[other]!.set.state)));
      for (let a = 1; a < 4; a++) {
        let s = 0;
        for (const base of this.single[axis]!.bases) s += b[base + offsets[a]!]! * rest[base + offsets[0]!]!;
        out.locals[q]![layout.stateAt + a - 1]! += s;
      }
    });
  }
}
