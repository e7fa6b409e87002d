import type { GateSet } from '#shared/method/gate-set.ts';
import type { MapTable } from '#shared/method/chain/map-table.ts';
import type { NoisyMaps } from '#shared/method/parameters.ts';
import { embedTransferMatrix } from '#shared/quantum/transfer-matrix.ts';

/** Where a one-qubit gate of a pair comes from. */
export interface LocalGate {
  /** Gate of the pair's set. */
  gate: number;
  /** 0 = the patch's first qubit. */
  side: 0 | 1;
  /** Gate of that qubit's own set. */
  source: number;
}

/** What a pair stands on: the maps of its two one-qubit patches, in the order of the pair's qubits. */
export class LocalBase {
  private readonly set: GateSet;
  private readonly locals: readonly [MapTable, MapTable];
  private readonly gates: readonly LocalGate[];

  /** @param set the pair's ideal set */
  constructor(set: GateSet, locals: readonly [MapTable, MapTable], gates: readonly LocalGate[]) {
    this.set = set;
    this.locals = locals;
    this.gates = gates;
  }

  /** Writes local gates, preparation and the first three effects of a row of the locals' tables; other gates are left alone. */
  write(row: number, out: NoisyMaps): void {
    for (const { gate, side, source } of this.gates) {
      const table = this.locals[side];
      const at = (row * table.count + table.place[source]!) * 16;
      out.gates.set(embedTransferMatrix(table.gates.subarray(at, at + 16), [side], 2), gate * 256);
    }
    const [a, b] = this.locals;
    product(a.state, row * 4, b.state, row * 4, out.state, 0);
    for (let o = 0; o < 3; o++) product(a.effects, row * 8 + 4 * (o >> 1), b.effects, row * 8 + 4 * (o & 1), out.effects, o * 16);
  }

  /** The pair's set at a row of the locals' tables, entangling gates at their ideal. */
  setAt(row: number): GateSet {
    const gates = new Float64Array(this.set.gates.length * 256);
    this.set.gates.forEach((g, k) => gates.set(g, k * 256));
    const maps: NoisyMaps = { gates, state: new Float64Array(16), effects: new Float64Array(48) };
    this.write(row, maps);
    const effects = [0, 1, 2].map((o) => maps.effects.slice(o * 16, (o + 1) * 16));
    // Both last effects are complements, so that the fourth of the pair is what the others leave of the identity, √4.
    effects.push(Float64Array.from({ length: 16 }, (_, a) => (a === 0 ? 2 : 0) - effects[0]![a]! - effects[1]![a]! - effects[2]![a]!));
    return { ...this.set, gates: this.set.gates.map((_, k) => gates.slice(k * 256, (k + 1) * 256)), state: maps.state, effects };
  }
}

/** out = a ⊗ b for vectors over I, X, Y, Z. */
function product(a: Float64Array, aAt: number, b: Float64Array, bAt: number, out: Float64Array, at: number): void {
  for (let i = 0; i < 4; i++) for (let j = 0; j < 4; j++) out[at + 4 * i + j] = a[aAt + i]! * b[bAt + j]!;
}
