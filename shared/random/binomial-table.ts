/** Widest table kept, in standard deviations times two; beyond it draws go through rejection. */
const WIDEST = 4096;
/** Half the distance between two uniform numbers. */
const HALF_STEP = 5.551115123125783e-17;
/** The tails left out hold less than 2⁻⁵³ of the probability on each side, less than one step of the uniform numbers. */
const REACH = 9;

/**
 * Inversion by table for many draws of one binomial (n, p): the result is the smallest k with u < F(k), u one uniform number.
 * F is summed from both tails towards the mode, where rounding is least. A guide by ⌊u·size⌋ makes the search a step or two.
 */
export class BinomialTable {
  readonly first: number;
  readonly cumulative: Float64Array;
  readonly guide: Uint16Array;

  private constructor(first: number, cumulative: Float64Array) {
    this.first = first;
    this.cumulative = cumulative;
    const size = cumulative.length;
    this.guide = new Uint16Array(size);
    let k = 0;
    for (let g = 0; g < size; g++) {
      while (k < size - 1 && cumulative[k]! <= g / size) k++;
      this.guide[g] = k;
    }
  }

  /** Null where the table would be wider than is worth keeping. */
  static of(n: number, p: number): BinomialTable | null {
    const mode = Math.min(n, Math.floor((n + 1) * p));
    const spread = Math.ceil(REACH * Math.sqrt(n * p * (1 - p)) + 40);
    const from = Math.max(0, mode - spread);
    const to = Math.min(n, mode + spread);
    if (to - from >= WIDEST) return null;
    const mass = new Float64Array(to - from + 1);
    const odds = p / (1 - p);
    mass[mode - from] = 1;
    for (let k = mode + 1; k <= to; k++) mass[k - from] = mass[k - 1 - from]! * ((n - k + 1) / k) * odds;
    for (let k = mode - 1; k >= from; k--) mass[k - from] = mass[k + 1 - from]! * ((k + 1) / (n - k)) / odds;
    let total = 0;
    for (let k = from; k < mode; k++) total += mass[k - from]!;
    let above = 0;
    for (let k = to; k >= mode; k--) above += mass[k - from]!;
    total += above;
    const cumulative = new Float64Array(mass.length);
    let sum = 0;
    for (let i = 0; i < mass.length; i++) {
      sum += mass[i]! / total;
      cumulative[i] = sum;
    }
    // What no uniform number can reach is cut off: below, sums under half a step; above, everything after the first sum of 1.
    let low = 0;
    while (cumulative[low]! < HALF_STEP) low++;
    let high = low;
    while (high < mass.length - 1 && cumulative[high]! < 1 - HALF_STEP) high++;
    cumulative[high] = 1;
    return new BinomialTable(from + low, cumulative.slice(low, high + 1));
  }

  draw(u: number): number {
    const { cumulative } = this;
    let k = this.guide[Math.floor(u * cumulative.length)]!;
    while (u >= cumulative[k]!) k++;
    return this.first + k;
  }
}
