import type { GateSet } from '#shared/method/gate-set.ts';
import { applyParameters, emptyMaps, type Layout } from '#shared/method/parameters.ts';
import type { Passes } from '#shared/method/passes.ts';
import type { Replicates } from '#shared/method/replicates.ts';

/** Rows of every table: what the device should do, the estimate, the single pass, then the replicates. */
export const IDEAL = 0;
export const ESTIMATE = 1;
export const FIRST = 2;
export const REPLICATES = 3;

/** The maps that one patch adds to the register, for the ideal, the estimate, the single pass and each replicate. */
export interface MapTable {
  D: number;
  /** Place of gate k of the patch's set among the gates of the table, or −1. */
  place: Int32Array;
  /** Row r of gate g begins at (r·count + g)·D². A replicate that is not finite is NaN throughout. */
  gates: Float64Array;
  count: number;
  /** One-qubit patches: rows of D, and rows of d·D with every outcome's effect. Empty for pairs. */
  state: Float64Array;
  effects: Float64Array;
}

function emptyTable(set: GateSet, layout: Layout, rows: number): MapTable {
  const { D, d } = set;
  const place = new Int32Array(set.gates.length).fill(-1);
  let count = 0;
  layout.gateAt.forEach((at, k) => {
    if (at >= 0) place[k] = count++;
  });
  const spam = layout.stateAt >= 0 ? rows : 0;
  return { D, place, count, gates: new Float64Array(rows * count * D * D), state: new Float64Array(spam * D), effects: new Float64Array(spam * d * D) };
}

/**
 * Fills the table of a patch. `passes` null = nothing was estimated: all but the ideal is NaN.
 * @param set the patch's set: the estimated gates stand at their ideal, for pairs too
 */
export function tabulate(set: GateSet, layout: Layout, passes: Passes | null, replicates: Replicates | null): MapTable {
  const { D, d } = set;
  const count = replicates?.count ?? 0;
  const rows = REPLICATES + count;
  const table = emptyTable(set, layout, rows);
  const maps = emptyMaps(set);
  const write = (row: number, e: Float64Array | null): void => {
    applyParameters(set, layout, e, maps);
    table.place.forEach((g, k) => {
      if (g >= 0) table.gates.set(maps.gates.subarray(k * D * D, (k + 1) * D * D), (row * table.count + g) * D * D);
    });
    if (table.state.length === 0) return;
    table.state.set(maps.state, row * D);
    const at = row * d * D;
    table.effects.set(maps.effects, at);
    // The last effect is what the others leave of the identity, whose only component is √d.
    for (let a = 0; a < D; a++) {
      let rest = a === 0 ? Math.sqrt(d) : 0;
      for (let o = 0; o < d - 1; o++) rest -= maps.effects[o * D + a]!;
      table.effects[at + (d - 1) * D + a] = rest;
    }
  };
  const nothing = new Float64Array(layout.columns).fill(NaN);
  write(IDEAL, null);
  write(ESTIMATE, passes ? passes.e : nothing);
  write(FIRST, passes ? passes.first : nothing);
  for (let b = 0; b < count; b++) {
    const finite = replicates!.finite[b];
    write(REPLICATES + b, finite ? replicates!.parameters.subarray(b * layout.columns, (b + 1) * layout.columns) : nothing);
  }
  return table;
}
