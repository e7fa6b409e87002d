import { zeros, type Matrix } from '#api/demo/simulator/complex-matrix.ts';

/** A tensor space of two- and three-level systems, the first slowest. */
export interface Space {
  levels: number[];
  size: number;
  strides: number[];
}

export function makeSpace(levels: readonly number[]): Space {
  const strides = levels.map((_, i) => levels.slice(i + 1).reduce((a, b) => a * b, 1));
  return { levels: [...levels], size: levels.reduce((a, b) => a * b, 1), strides };
}

/** Where the targets' own states lie: offsets within a block, and the first index of each block. */
export interface Placement {
  offsets: Int32Array;
  bases: Int32Array;
}

export function place(space: Space, targets: readonly number[]): Placement {
  const run = (systems: readonly number[]): Int32Array => {
    let indices = [0];
    for (const q of systems) indices = indices.flatMap((i) => Array.from({ length: space.levels[q]! }, (_, level) => i + level * space.strides[q]!));
    return Int32Array.from(indices);
  };
  return { offsets: run(targets), bases: run(space.levels.map((_, q) => q).filter((q) => !targets.includes(q))) };
}

/**
 * ρ ← Σ K ρ K† in place, K acting on the placed systems. Works block by block: each pair of bases selects
 * an m × m block of ρ (m = states of the targets). Cost: N² · 2m · operators complex multiplications.
 */
export function applyKraus(rho: Matrix, at: Placement, operators: readonly Matrix[]): void {
  const m = at.offsets.length;
  const block = zeros(m);
  const half = zeros(m);
  const sum = zeros(m);
  for (const row of at.bases) {
    for (const column of at.bases) {
      for (let i = 0; i < m; i += 1) {
        const line = (row + at.offsets[i]!) * rho.columns + column;
        for (let j = 0; j < m; j += 1) {
          block.re[i * m + j] = rho.re[line + at.offsets[j]!]!;
          block.im[i * m + j] = rho.im[line + at.offsets[j]!]!;
        }
      }
      sum.re.fill(0);
      sum.im.fill(0);
      for (const k of operators) addConjugation(sum, k, block, half, m);
      for (let i = 0; i < m; i += 1) {
        const line = (row + at.offsets[i]!) * rho.columns + column;
        for (let j = 0; j < m; j += 1) {
          rho.re[line + at.offsets[j]!] = sum.re[i * m + j]!;
          rho.im[line + at.offsets[j]!] = sum.im[i * m + j]!;
        }
      }
    }
  }
}

/** sum += K B K†. */
function addConjugation(sum: Matrix, k: Matrix, block: Matrix, half: Matrix, m: number): void {
  for (let i = 0; i < m; i += 1) {
    for (let j = 0; j < m; j += 1) {
      let re = 0;
      let im = 0;
      for (let l = 0; l < m; l += 1) {
        const a = i * m + l;
        const b = l * m + j;
        re += k.re[a]! * block.re[b]! - k.im[a]! * block.im[b]!;
        im += k.re[a]! * block.im[b]! + k.im[a]! * block.re[b]!;
      }
      half.re[i * m + j] = re;
      half.im[i * m + j] = im;
    }
  }
  for (let i = 0; i < m; i += 1) {
    for (let j = 0; j < m; j += 1) {
      let re = 0;
      let im = 0;
      for (let l = 0; l < m; l += 1) {
        const a = i * m + l;
        const b = j * m + l;
        re += half.re[a]! * k.re[b]! + half.im[a]! * k.im[b]!;
        im += half.im[a]! * k.re[b]! - half.re[a]! * k.im[b]!;
      }
      sum.re[i * m + j] = sum.re[i * m + j]! + re;
      sum.im[i * m + j] = sum.im[i * m + j]! + im;
    }
  }
}
