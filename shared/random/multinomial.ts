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
  private readonly first: (BinomialTable | null)[];

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
    this.first = Array.from(shots, (n, c) => {
      const p = this.conditional[c * outcomes]!;
      return p > 0 && p < 1 ? BinomialTable.of(n, p) : null;
    });
  }

  /** One replicate: the frequency of row (circuit, outcome < last) goes to out[at + stride·row]. */
  draw(generator: Xoshiro256, out: Float64Array, at: number, stride: number): void {
    const last = this.outcomes - 1;
    let place = at;
    for (let c = 0; c < this.shots.length; c++) {
      const shots = this.shots[c]!;
      let left = shots;
      for (let o = 0; o < last; o++) {
        const table = o === 0 ? this.first[c]! : null;
        const k = table ? table.draw(generator.next()) : binomial(generator, left, this.conditional[c * this.outcomes + o]!);
        left -= k;
        out[place] = k / shots;
        place += stride;
      }
    }
  }
}
