import { Evaluator } from '#shared/method/evaluator.ts';
import { withLast } from '#shared/method/frequencies.ts';
import type { GateSet } from '#shared/method/gate-set.ts';
import { applyParameters, emptyMaps, layoutOf, type NoisyMaps } from '#shared/method/parameters.ts';

/** What one figure is read from: the noisy maps and the probabilities of the circuits that figures look at. */
export interface ReadingContext {
  maps: NoisyMaps;
  /** Circuits × d, row-major, unclipped. */
  probabilities: Float64Array;
}

/** Circuits that figures are read on, gathered so that one evaluation serves all. */
export class ReadingCircuits {
  readonly circuits: Int32Array[] = [];

  /** Adds circuits; returns the row at which they begin. */
  add(circuits: readonly Int32Array[]): number {
    const from = this.circuits.length;
    this.circuits.push(...circuits);
    return from;
  }
}

/** Evaluates the gathered circuits for one set of maps after another; the context's arrays are reused. */
export class Reader {
  private readonly evaluator: Evaluator;
  private readonly rows: Float64Array;
  private readonly probabilities: Float64Array;
  private readonly d: number;
  private readonly count: number;

  constructor(set: GateSet, circuits: readonly Int32Array[]) {
    this.evaluator = new Evaluator(circuits, set.gates.length, set.D, set.d - 1);
    this.d = set.d;
    this.count = circuits.length;
    this.rows = new Float64Array(circuits.length * (set.d - 1));
    this.probabilities = new Float64Array(circuits.length * set.d);
  }

  read(maps: NoisyMaps): ReadingContext {
    this.evaluator.run(maps, this.rows);
    const { d, rows, probabilities } = this;
    for (let c = 0; c < this.count; c++) {
      let rest = 1;
      for (let o = 0; o < d - 1; o++) {
        const p = rows[c * (d - 1) + o]!;
        probabilities[c * d + o] = p;
        rest -= p;
      }
      probabilities[c * d + d - 1] = rest;
    }
    return { maps, probabilities };
  }
}

/** Probabilities of circuits for one set of maps, circuits × d. */
export function probabilitiesOf(set: GateSet, circuits: readonly Int32Array[], maps: NoisyMaps): Float64Array {
  const rows = new Float64Array(circuits.length * (set.d - 1));
  new Evaluator(circuits, set.gates.length, set.D, set.d - 1).run(maps, rows);
  return withLast(rows, circuits.length, set.d);
}

/** Probabilities at the maps of the set itself, circuits × d. */
export function idealProbabilities(set: GateSet, circuits: readonly Int32Array[]): Float64Array {
  const maps = emptyMaps(set);
  applyParameters(set, layoutOf(set), null, maps);
  return probabilitiesOf(set, circuits, maps);
}
