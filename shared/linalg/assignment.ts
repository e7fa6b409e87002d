/**
 * Optimal assignment (Hungarian method with potentials): the permutation that minimises Σ cost[i][match[i]].
 * "The Hungarian method for the assignment problem", Naval Research Logistics Quarterly 2, 83, 1955. Cost n³.
 * @param cost n×n row-major, finite
 * @returns match[i], the column given to row i
 */
export function optimalAssignment(cost: Float64Array, n: number): Int32Array {
  const rowPotential = new Float64Array(n + 1);
  const columnPotential = new Float64Array(n + 1);
  const owner = new Int32Array(n + 1);
  const previous = new Int32Array(n + 1);
  const least = new Float64Array(n + 1);
  const used = new Uint8Array(n + 1);
  for (let i = 1; i <= n; i++) {
    owner[0] = i;
    least.fill(Infinity);
    used.fill(0);
    let column = 0;
    do {
      used[column] = 1;
      const row = owner[column]!;
      let delta = Infinity;
      let next = 0;
      for (let j = 1; j <= n; j++) {
        if (used[j]) continue;
        const reduced = cost[(row - 1) * n + j - 1]! - rowPotential[row]! - columnPotential[j]!;
        if (reduced < least[j]!) {
          least[j] = reduced;
          previous[j] = column;
        }
        if (least[j]! < delta) {
          delta = least[j]!;
          next = j;
        }
      }
      for (let j = 0; j <= n; j++) {
        if (used[j]) {
          rowPotential[owner[j]!]! += delta;
          columnPotential[j]! -= delta;
        } else {
          least[j]! -= delta;
        }
      }
      column = next;
    } while (owner[column] !== 0);
    while (column !== 0) {
      const before = previous[column]!;
      owner[column] = owner[before]!;
      column = before;
    }
  }
  const match = new Int32Array(n);
  for (let j = 1; j <= n; j++) match[owner[j]! - 1] = j - 1;
  return match;
}
