import type { SealedCheck } from '#shared/formats/types.ts';
import type { Frequencies } from '#shared/method/frequencies.ts';
import { binomial } from '#shared/random/binomial.ts';
import type { Xoshiro256 } from '#shared/random/xoshiro256.ts';
import { meanTotalVariation } from '#shared/stats/distance.ts';
import { moments } from '#shared/stats/moments.ts';
import { quantileSorted } from '#shared/stats/quantile.ts';

/**
 * The reference distribution of the prediction error: for replicate b the mean total variation distance between p̂ and a draw
 * of N shots from p̂_b, clipped to [0, 1] and renormalised. What the value would be if noise alone parted the two.
 */
export class SealedReference {
  private readonly estimate: Float64Array;
  private readonly counts: Frequencies;
  private readonly generator: Xoshiro256;
  private readonly drawn: Float64Array;
  private readonly distances: number[] = [];

  /** @param estimate p̂ of the sealed circuits, circuits × d */
  constructor(estimate: Float64Array, counts: Frequencies, generator: Xoshiro256) {
    this.estimate = estimate;
    this.counts = counts;
    this.generator = generator;
    this.drawn = new Float64Array(estimate.length);
  }

  /** Takes one replicate: the sealed circuits stand from row `from` on in its probabilities. */
  add(probabilities: Float64Array, from: number): void {
    const { circuits, d, shots } = this.counts;
    for (let c = 0; c < circuits; c++) {
      let tail = 0;
      for (let o = 0; o < d; o++) tail += clip(probabilities[(from + c) * d + o]!);
      let left = shots[c]!;
      for (let o = 0; o < d - 1; o++) {
        const p = clip(probabilities[(from + c) * d + o]!);
        const k = binomial(this.generator, left, tail > 0 ? p / tail : 0);
        this.drawn[c * d + o] = k / shots[c]!;
        left -= k;
        tail -= p;
      }
      this.drawn[c * d + d - 1] = left / shots[c]!;
    }
    this.distances.push(meanTotalVariation(this.estimate, 0, this.drawn, 0, circuits, d));
  }

  /** z = (value − mean)/sd; passed = inside the central 99 %. Null without at least two replicates. */
  check(value: number, ideal: number): SealedCheck | null {
    if (this.distances.length < 2) return null;
    const sorted = Float64Array.from(this.distances).sort();
    const { mean, deviation } = moments(sorted);
    const low99 = quantileSorted(sorted, 0.005);
    const high99 = quantileSorted(sorted, 0.995);
    return { value, ideal, noise: mean, z: deviation > 0 ? (value - mean) / deviation : 0, low99, high99, passed: value >= low99 && value <= high99 };
  }
}

function clip(p: number): number {
  return Math.min(1, Math.max(0, p));
}
