import { luFactor } from '#shared/linalg/lu.ts';
import type { GateSet } from '#shared/method/gate-set.ts';
import { addTimesTranspose, blocksOf, hasSingleFixedPoint, multiplyBlock, transposed, type Blocks } from '#shared/method/twirl.ts';
import { Resolvent } from '#shared/method/resolvent.ts';

/** The Rayleigh quotient has settled when it moves by less than this: a few units in the last place of a number near 1. */
const STILL = 1e-15;
/** Power steps before the shifted inverse iteration takes over, and the shift it uses: just off the ideal eigenvalue. */
const POWER_STEPS = 500;
const SHIFT = 1 + 1e-6;
const INVERSE_STEPS = 50;

/**
 * Error per gate r = (1 − λ)(D − 1)/D of random circuits over all gates: λ the eigenvalue continued from 1 of
 * X ↦ mean_k G̃′_k X G′_k⁻¹ on the (D − 1)×(D − 1) blocks (ideal blocks are orthogonal, so the inverse is the transpose).
 * The estimate: power iteration from the identity; after 500 steps inverse iteration at shift 1 + 1e-6. Replicates: the same
 * eigenvalue, found from the estimate's vectors by its resolvent in about eight steps instead of hundreds, and by power
 * iteration where that does not settle. Not defined where the ideal map has more than one eigenvalue of modulus above 1 − 1e-6.
 * Cost K·(D − 1)³ a step.
 */
export class ErrorPerGate {
  readonly defined: boolean;
  private readonly D: number;
  private readonly m: number;
  private readonly blocks: Blocks;
  private readonly noisy: Float64Array;
  private readonly y: Float64Array;
  private readonly z: Float64Array;
  private resolvent: Resolvent | null = null;

  constructor(set: GateSet) {
    this.D = set.D;
    this.m = set.D - 1;
    this.blocks = blocksOf(set.gates, set.D);
    this.defined = hasSingleFixedPoint(this.blocks);
    this.noisy = new Float64Array(set.gates.length * this.m * this.m);
    this.y = new Float64Array(this.m * this.m);
    this.z = new Float64Array(this.m * this.m);
  }

  /** Value for the noisy maps (K·D·D, one after another). The first call is the estimate, which later calls start from. */
  measure(maps: Float64Array): number {
    this.takeBlocks(maps);
    let lambda = this.resolvent?.solve(this.z, (x) => this.advance(x)) ?? NaN;
    if (Number.isNaN(lambda)) {
      const x = this.identity();
      lambda = this.iterate(x);
      if (!this.resolvent && Number.isFinite(lambda)) this.resolvent = this.prepare(x, lambda);
    }
    return ((1 - lambda) * (this.D - 1)) / this.D;
  }

  private identity(): Float64Array {
    const x = new Float64Array(this.m * this.m);
    for (let i = 0; i < this.m; i++) x[i * this.m + i] = 1;
    normalise(x);
    return x;
  }

  private takeBlocks(maps: Float64Array): void {
    const { m, D } = this;
    for (let k = 0; k < this.blocks.gates.length; k++) {
      for (let i = 0; i < m; i++) for (let j = 0; j < m; j++) this.noisy[(k * m + i) * m + j] = maps[k * D * D + (i + 1) * D + j + 1]!;
    }
  }

  /** z = mean_k G̃′_k x G′_kᵀ. */
  private advance(x: Float64Array): void {
    const { blocks, noisy, y, z, m } = this;
    z.fill(0);
    for (let k = 0; k < blocks.gates.length; k++) {
      multiplyBlock(noisy, k * m * m, x, y, m);
      addTimesTranspose(blocks.gates[k]!, y, z, m);
    }
    for (let i = 0; i < z.length; i++) z[i]! /= blocks.gates.length;
  }

  /** Power iteration on x, then inverse iteration if need be; x becomes the eigenvector. */
  private iterate(x: Float64Array): number {
    let lambda = 0;
    for (let step = 0; step < POWER_STEPS; step++) {
      this.advance(x);
      const next = dot(x, this.z);
      const settled = Math.abs(next - lambda) < STILL;
      lambda = next;
      x.set(this.z);
      if (!normalise(x)) return NaN;
      if (settled) return lambda;
    }
    const size = x.length;
    const shifted = this.matrix();
    for (let i = 0; i < size; i++) shifted[i * size + i]! -= SHIFT;
    const lu = luFactor(shifted, size);
    for (let step = 0; step < INVERSE_STEPS; step++) {
      lu.solve(x);
      if (!normalise(x)) return NaN;
      this.advance(x);
      const next = dot(x, this.z);
      if (Math.abs(next - lambda) < STILL) return next;
      lambda = next;
    }
    return lambda;
  }

  /** The map as a matrix of order (D − 1)². */
  private matrix(): Float64Array {
    const { blocks, noisy, m } = this;
    const size = m * m;
    const out = new Float64Array(size * size);
    blocks.gates.forEach((g, k) => {
      for (let i = 0; i < m; i++) {
        for (let a = 0; a < m; a++) {
          const w = noisy[(k * m + i) * m + a]! / blocks.gates.length;
          for (let e = 0; e < g.value.length; e++) out[(i * m + g.row[e]!) * size + a * m + g.column[e]!]! += w * g.value[e]!;
        }
      }
    });
    return out;
  }

  private prepare(x: Float64Array, lambda: number): Resolvent | null {
    const map = this.matrix();
    return Resolvent.of(map, transposed(map, x.length), x, lambda);
  }
}

function dot(a: Float64Array, b: Float64Array): number {
  let s = 0;
  for (let i = 0; i < a.length; i++) s += a[i]! * b[i]!;
  return s;
}

/** Scales to unit length; false when there is no such thing. */
function normalise(x: Float64Array): boolean {
  const size = Math.sqrt(dot(x, x));
  if (!(size > 0) || !Number.isFinite(size)) return false;
  for (let i = 0; i < x.length; i++) x[i]! /= size;
  return true;
}
