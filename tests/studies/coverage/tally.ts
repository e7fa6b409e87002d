import type { StudyKey } from '#shared/studies/coverage-study.ts';
import { moments } from '#shared/stats/moments.ts';
import { studyIntervals } from '#tests/studies/coverage/read-interval.ts';

/** Counts of one figure over the trials of a chunk. */
export interface FigureTally {
  key: StudyKey;
  depth: number | null;
  gate: string | null;
  qubits: number[];
  /** Trials with an interval. */
  trials: number;
  /** Of them, with the truth inside at 50, 80 and 95 %. */
  inside: [number, number, number];
  /** Truth below and above the 95 % interval. */
  below: number;
  above: number;
  /** Sums of z = (estimate − truth)/standard error and of its square. */
  z: number;
  zz: number;
  /** The same counts over settled trials alone, at 95 %. */
  settled: [trials: number, inside: number];
}

export interface FigureName {
  key: StudyKey;
  depth: number | null;
  gate: string | null;
  qubits: readonly number[];
}

const nameOf = (f: FigureName): string => JSON.stringify([f.key, f.depth, f.gate, f.qubits]);

/** Gathers, trial by trial, whether the truth lay inside. */
export class Tally {
  private readonly found = new Map<string, FigureTally>();
  private readonly intervals: typeof studyIntervals;

  /** @param intervals the method's own unless told */
  constructor(intervals: typeof studyIntervals = studyIntervals) {
    this.intervals = intervals;
  }

  /** @param distance reflected interval @param replicates not sorted; values that are not finite are left out */
  add(name: FigureName, truth: number, estimate: number, replicates: Float64Array, distance: boolean, settled: boolean): void {
    const kept = replicates.filter((v) => Number.isFinite(v)).sort();
    if (!Number.isFinite(estimate) || kept.length === 0) return;
    const tally = this.of(name);
    tally.trials++;
    if (settled) tally.settled[0]++;
    this.intervals(kept, estimate, distance).forEach(({ low, high }, i) => {
      const inside = truth >= low && truth <= high;
      if (inside) tally.inside[i]!++;
      if (i < 2) return;
      if (truth < low) tally.below++;
      if (truth > high) tally.above++;
      if (inside && settled) tally.settled[1]++;
    });
    const { deviation } = moments(kept);
    const z = deviation > 0 ? (estimate - truth) / deviation : 0;
    tally.z += z;
    tally.zz += z * z;
  }

  private of(name: FigureName): FigureTally {
    const id = nameOf(name);
    let tally = this.found.get(id);
    if (!tally) {
      tally = { key: name.key, depth: name.depth, gate: name.gate, qubits: [...name.qubits], trials: 0, inside: [0, 0, 0], below: 0, above: 0, z: 0, zz: 0, settled: [0, 0] };
      this.found.set(id, tally);
    }
    return tally;
  }

  get figures(): FigureTally[] {
    return [...this.found.values()];
  }
}
