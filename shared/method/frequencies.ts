import type { DatasetCircuit } from '#shared/formats/types.ts';

/** Counts of one patch as numbers: circuits × d outcomes, row-major, outcomes ascending as bit strings. */
export interface Frequencies {
  circuits: number;
  d: number;
  shots: Float64Array;
  /** n_o/N. */
  observed: Float64Array;
  /** (n_o + ½)/(N + d/2): never 0 or 1, so that every bootstrap draw has some scatter. */
  smoothed: Float64Array;
}

export function outcomeLabels(n: number): string[] {
  return Array.from({ length: 1 << n }, (_, o) => o.toString(2).padStart(n, '0'));
}

export function frequenciesOf(circuits: readonly DatasetCircuit[], n: number): Frequencies {
  const d = 1 << n;
  const labels = outcomeLabels(n);
  const shots = Float64Array.from(circuits, (c) => c.shots);
  const observed = new Float64Array(circuits.length * d);
  const smoothed = new Float64Array(circuits.length * d);
  circuits.forEach((c, i) => labels.forEach((label, o) => {
    const count = Object.hasOwn(c.counts, label) ? c.counts[label]! : 0;
    observed[i * d + o] = count / c.shots;
    smoothed[i * d + o] = (count + 0.5) / (c.shots + d / 2);
  }));
  return { circuits: circuits.length, d, shots, observed, smoothed };
}

/** The rows of the design: the last outcome of each circuit left out. */
export function withoutLast(values: Float64Array, circuits: number, d: number): Float64Array {
  const out = new Float64Array(circuits * (d - 1));
  for (let c = 0; c < circuits; c++) for (let o = 0; o < d - 1; o++) out[c * (d - 1) + o] = values[c * d + o]!;
  return out;
}

/** Adds the last outcome: what is left of one. */
export function withLast(rows: Float64Array, circuits: number, d: number): Float64Array {
  const out = new Float64Array(circuits * d);
  for (let c = 0; c < circuits; c++) {
    let rest = 1;
    for (let o = 0; o < d - 1; o++) {
      const p = rows[c * (d - 1) + o]!;
      out[c * d + o] = p;
      rest -= p;
    }
    out[c * d + d - 1] = rest;
  }
  return out;
}
