import { BinomialTable } from '#shared/random/binomial-table.ts';
import { binomial } from '#shared/random/binomial.ts';
import type { Xoshiro256 } from '#shared/random/xoshiro256.ts';

/**
 * Multinomial draws for a list of circuits, replicate after replicate: circuits in order, outcomes ascending, each outcome a
 * binomial of the shots left with its probability among the outcomes left; the last takes the rest.
 *
 * The sampler, for whoever wants the same numbers: the first outcome of a circuit has the same N and p in every replicate and is
 * drawn by inversion from a table, one uniform number each (`BinomialTable`; where that would be wider than 4,096 entries, as the
 * others). Every other outcome is drawn by `binomial`.
 */
export class MultinomialTable {
  private readonly shots: Float64Array;
  private readonly conditional: Float64Array;
  private readonly outcomes: number;
  /** The tables of all circuits end to end: where each begins, how long it is (0 = none), its smallest result. */
  private readonly begin: Int32Array;
  private readonly length: Int32Array;
  private readonly smallest: Float64Array;
  private readonly cumulative: Float64Array;
  private readonly guide: Uint16Array;

  /** @param probabilities circuits × outcomes, row-major, each row summing to 1, none negative */
  constructor(probabilities: Float64Array, shots: Float64Array, outcomes: number) {
    this.shots = shots;
    this.outcomes = outcomes;
    this.conditional = new Float64Array(probabilities.length);
    for (let c = 0; c < shots.length; c++) {
      let tail = 0;
      for (let o = outcomes - 1; o >= 0; o--) {
        const p = probabilities[c * outcomes + o]!;
        tail += p;
        this.conditional[c * outcomes + o] = tail > 0 ? p / tail : 0;
      }
    }
    const tables = Array.from(shots, (n, c) => {
      const p = this.conditional[c * outcomes]!;
      return p > 0 && p < 1 ? BinomialTable.of(n, p) : null;
    });
    this.length = Int32Array.from(tables, (t) => t?.cumulative.length ?? 0);
    this.smallest = Float64Array.from(tables, (t) => t?.first ?? 0);
    this.begin = new Int32Array(tables.length);
    for (let c = 1; c < tables.length; c++) this.begin[c] = this.begin[c - 1]! + this.length[c - 1]!;
    const size = this.length.reduce((sum, n) => sum + n, 0);
    this.cumulative = new Float64Array(size);
    this.guide = new Uint16Array(size);
    tables.forEach((t, c) => {
      if (!t) return;
      this.cumulative.set(t.cumulative, this.begin[c]);
      this.guide.set(t.guide, this.begin[c]);
    });
  }

  /** One replicate: the frequency of row (circuit, outcome < last) goes to out[at + stride·row]. */
  draw(generator: Xoshiro256, out: Float64Array, at: number, stride: number): void {
    const { outcomes, shots: shotsOf, conditional, cumulative, guide } = this;
    const last = outcomes - 1;
    let place = at;
    for (let c = 0; c < shotsOf.length; c++) {
      const shots = shotsOf[c]!;
      let left = shots;
      for (let o = 0; o < last; o++) {
        let k: number;
        const length = o === 0 ? this.length[c]! : 0;
        if (length > 0) {
          const begin = this.begin[c]!;
          const u = generator.next();
          let step = guide[begin + Math.floor(u * length)]!;
          while (u >= cumulative[begin + step]!) step++;
          k = this.smallest[c]! + step;
        } else {
          k = binomial(generator, left, conditional[c * outcomes + o]!);
        }
        left -= k;
        out[place] = k / shots;
        place += stride;
      }
    }
  }
}
