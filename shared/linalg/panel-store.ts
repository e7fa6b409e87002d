import { subtractPanel } from '#shared/linalg/panel.ts';
import { openArena, type Arena } from '#shared/linalg/wasm/arena.ts';

/** Groups of four vectors that are held at once: enough to reuse each row of the matrix, few enough for the cache. */
export const HELD_GROUPS = 16;

/**
 * Row-major matrices kept beside room for groups of four interleaved vectors, so that panels of either can be multiplied
 * without copying the matrix: the workhorse under the triangular solutions and the dense inverse.
 */
export class PanelStore {
  readonly matrix: Float64Array;
  readonly vectors: Float64Array;
  private readonly arena: Arena;
  private readonly vectorsAt: number;

  /** @param size doubles of all matrices together @param length doubles of one vector */
  constructor(size: number, length: number, plain = false) {
    this.vectorsAt = size * 8;
    this.arena = openArena((size + HELD_GROUPS * 4 * length) * 8, plain);
    this.matrix = new Float64Array(this.arena.buffer, 0, size);
    this.vectors = new Float64Array(this.arena.buffer, this.vectorsAt, HELD_GROUPS * 4 * length);
  }

  /**
   * out[i] −= Σ_{k0 ≤ k < k1} a[i][k]·x[k] for rows i0 … i1 of the matrix at `matrixAt` with `stride` columns; x and out are
   * element offsets into `vectors` where element 0 of their groups stands.
   */
  subtract(matrixAt: number, stride: number, i0: number, i1: number, k0: number, k1: number, x: number, out: number): void {
    const { kernels } = this.arena;
    if (k1 <= k0) return;
    if (kernels) kernels.panel((matrixAt + i0 * stride + k0) * 8, stride * 8, i1 - i0, k1 - k0, this.vectorsAt + (x + 4 * k0) * 8, this.vectorsAt + (out + 4 * i0) * 8);
    else subtractPanel(this.matrix, matrixAt, stride, i0, i1, k0, k1, this.vectors, x, this.vectors, out);
  }
}
