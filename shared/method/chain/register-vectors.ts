import { openArena, type Arena } from '#shared/linalg/wasm/arena.ts';
import { applyToOne, applyToTwo, restOf } from '#shared/method/chain/register-state.ts';

/** From this number of qubits on a map on two of them meets enough of the vector to be worth copying beside it. */
const LEAST = 3;
const SCRATCH = 64;

/** A vector over the Paulis of up to `qubits` qubits, a spare one, and maps on one qubit gathered for each, in memory that kernels reach. */
export class RegisterVectors {
  readonly qubits: number;
  vector: Float64Array;
  spare: Float64Array;
  /** 16 elements a qubit. */
  readonly held: Float64Array;
  private readonly arena: Arena;
  private readonly map: Float64Array;
  private readonly scratch: number;
  /** Where the places are written down at which two digits are zero, by qubits of the part and pair. */
  private readonly rest = new Map<number, number>();
  private free: number;

  constructor(qubits: number, plain: boolean) {
    this.qubits = qubits;
    const size = 4 ** qubits;
    // Parts of every smaller size have pairs of their own; together they need less than half of the largest again.
    const places = qubits < LEAST ? 0 : 2 * qubits * qubits * 4 ** (qubits - 2);
    const heldAt = 16 * size;
    const mapAt = heldAt + 128 * qubits;
    this.scratch = mapAt + 2048;
    this.free = this.scratch + 8 * SCRATCH;
    this.arena = openArena(this.free + 4 * places, plain);
    const { buffer } = this.arena;
    this.vector = new Float64Array(buffer, 0, size);
    this.spare = new Float64Array(buffer, 8 * size, size);
    this.held = new Float64Array(buffer, heldAt, 16 * qubits);
    this.map = new Float64Array(buffer, mapAt, 256);
  }

  swap(): void {
    [this.vector, this.spare] = [this.spare, this.vector];
  }

  /** The map gathered for a qubit of m, in place. */
  applyHeld(m: number, qubit: number): void {
    const { kernels } = this.arena;
    // The digit of the last qubit lies in neighbouring elements, which a kernel that takes two at a time cannot part.
    if (kernels && qubit < m - 1) kernels.applyOne(this.vector.byteOffset, 8 * 4 ** m, 8 * 4 ** (m - 1 - qubit), this.held.byteOffset + 128 * qubit);
    else applyToOne(this.vector, m, qubit, this.held, 16 * qubit);
  }

  /** The 16×16 map at `g` of `maps` on two qubits of m, in place. */
  applyTwo(m: number, first: number, second: number, maps: Float64Array, g: number): void {
    const { kernels } = this.arena;
    if (!kernels || m < LEAST) {
      applyToTwo(this.vector, m, first, second, maps, g);
      return;
    }
    this.map.set(maps.subarray(g, g + 256));
    kernels.applyTwo(this.vector.byteOffset, this.restAt(m, first, second), 4 ** (m - 2), 8 * 4 ** (m - 1 - first), 8 * 4 ** (m - 1 - second), this.map.byteOffset, this.scratch);
  }

  /** Byte address of the byte offsets at which both digits are zero. */
  private restAt(m: number, i: number, j: number): number {
    const key = (m * 16 + Math.min(i, j)) * 16 + Math.max(i, j);
    let at = this.rest.get(key);
    if (at === undefined) {
      const rest = restOf(m, i, j);
      at = this.free;
      new Int32Array(this.arena.buffer, at, rest.length).set(rest.map((p) => 8 * p));
      this.free += 4 * rest.length;
      this.rest.set(key, at);
    }
    return at;
  }
}
