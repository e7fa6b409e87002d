import { luFactor } from '#shared/linalg/lu.ts';
import type { GateSet } from '#shared/method/gate-set.ts';
import { addTimesTranspose, blocksOf, hasSingleFixedPoint, type Blocks } from '#shared/method/twirl.ts';

/** The Rayleigh quotient has settled when it moves by less than this: a few units in the last place of a number near 1. */
const STILL = 1e-15;
/** Power steps before the shifted inverse iteration takes over, and the shift it uses: just off the ideal eigenvalue. */
const POWER_STEPS = 500;
const SHIFT = 1 + 1e-6;
const INVERSE_STEPS = 50;

/**
 * Error per gate r = (1 − λ)(D − 1)/D of random circuits over all gates: λ the eigenvalue continued from 1 of
 * X ↦ mean_k G̃′_k X G′_k⁻¹ on the (D − 1)×(D − 1) blocks (ideal blocks are orthogonal, so the inverse is the transpose).
 * Power iteration; after 500 steps inverse iteration at shift 1 + 1e-6. Not defined where the ideal map has more than
 * one eigenvalue of modulus above 1 − 1e-6. Cost K·(D − 1)³ a step.
 */
export class ErrorPerGate {
  readonly defined: boolean;
  private readonly D: number;
  private readonly blocks: Blocks;
  private readonly noisy: Float64Array;
  private readonly x: Float64Array;
  private readonly y: Float64Array;
  private readonly z: Float64Array;
  private readonly start: Float64Array;

  constructor(set: GateSet) {
    this.D = set.D;
    this.blocks = blocksOf(set.gates, set.D);
    this.defined = hasSingleFixedPoint(this.blocks);
    const m = this.blocks.m;
    this.noisy = new Float64Array(set.gates.length * m * m);
    this.x = new Float64Array(m * m);
    this.y = new Float64Array(m * m);
    this.z = new Float64Array(m * m);
    this.start = new Float64Array(m * m);
    for (let i = 0; i < m; i++) this.start[i * m + i] = 1;
  }

  /** Value for the noisy maps (K·D·D, one after another). With `keep` the vector found is where later calls start. */
  measure(maps: Float64Array, keep = false): number {
    this.takeBlocks(maps);
    this.x.set(this.start);
    normalise(this.x);
    let lambda = 0;
    let settled = false;
    for (let step = 0; step < POWER_STEPS && !settled; step++) {
      this.advance();
      const next = dot(this.x, this.z);
      settled = Math.abs(next - lambda) < STILL;
      lambda = next;
      this.x.set(this.z);
      if (!normalise(this.x)) return NaN;
    }
    if (!settled) lambda = this.inverseIteration();
    if (keep) this.start.set(this.x);
    return ((1 - lambda) * (this.D - 1)) / this.D;
  }

  private takeBlocks(maps: Float64Array): void {
    const m = this.blocks.m;
    for (let k = 0; k < this.blocks.gates.length; k++) {
      for (let i = 0; i < m; i++) for (let j = 0; j < m; j++) this.noisy[(k * m + i) * m + j] = maps[k * this.D * this.D + (i + 1) * this.D + j + 1]!;
    }
  }

  /** z = mean_k G̃′_k x G′_kᵀ. */
  private advance(): void {
    const { blocks, noisy, x, y, z } = this;
    const m = blocks.m;
    z.fill(0);
    for (let k = 0; k < blocks.gates.length; k++) {
      multiply(noisy, k * m * m, x, y, m);
      addTimesTranspose(blocks.gates[k]!, y, z, m);
    }
    for (let i = 0; i < z.length; i++) z[i]! /= blocks.gates.length;
  }

  private inverseIteration(): number {
    const { blocks, noisy, x } = this;
    const m = blocks.m;
    const size = m * m;
    const shifted = new Float64Array(size * size);
    blocks.gates.forEach((g, k) => {
      for (let i = 0; i < m; i++) {
        for (let a = 0; a < m; a++) {
          const w = noisy[(k * m + i) * m + a]! / blocks.gates.length;
          for (let e = 0; e < g.value.length; e++) shifted[(i * m + g.row[e]!) * size + a * m + g.column[e]!]! += w * g.value[e]!;
        }
      }
    });
    for (let i = 0; i < size; i++) shifted[i * size + i]! -= SHIFT;
    const lu = luFactor(shifted, size);
    let lambda = 0;
    for (let step = 0; step < INVERSE_STEPS; step++) {
      lu.solve(x);
      if (!normalise(x)) return NaN;
      this.advance();
      const next = dot(x, this.z);
      if (Math.abs(next - lambda) < STILL) return next;
      lambda = next;
    }
    return lambda;
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

/** y = A·x for m×m matrices, m a multiple of three, A at `at` of `a`; tiles of 3×3. */
function multiply(a: Float64Array, at: number, x: Float64Array, y: Float64Array, m: number): void {
  for (let i = 0; i < m; i += 3) {
    const r0 = at + i * m, r1 = r0 + m, r2 = r1 + m;
    for (let j = 0; j < m; j += 3) {
      let a0 = 0, a1 = 0, a2 = 0, b0 = 0, b1 = 0, b2 = 0, c0 = 0, c1 = 0, c2 = 0;
      for (let k = 0; k < m; k++) {
        const u = a[r0 + k]!, v = a[r1 + k]!, w = a[r2 + k]!;
        const p = k * m + j;
        const x0 = x[p]!, x1 = x[p + 1]!, x2 = x[p + 2]!;
        a0 += u * x0; a1 += u * x1; a2 += u * x2;
        b0 += v * x0; b1 += v * x1; b2 += v * x2;
        c0 += w * x0; c1 += w * x1; c2 += w * x2;
      }
      const o = i * m + j;
      y[o] = a0; y[o + 1] = a1; y[o + 2] = a2;
      y[o + m] = b0; y[o + m + 1] = b1; y[o + m + 2] = b2;
      y[o + 2 * m] = c0; y[o + 2 * m + 1] = c1; y[o + 2 * m + 2] = c2;
    }
  }
}
