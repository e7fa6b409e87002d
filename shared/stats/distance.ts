/** Mean over circuits of the total variation distance ½ Σ_o |a − b|; both are circuits × d, row-major, from row `from` on. */
export function meanTotalVariation(a: Float64Array, aFrom: number, b: Float64Array, bFrom: number, circuits: number, d: number): number {
  let sum = 0;
  for (let i = 0; i < circuits * d; i++) sum += Math.abs(a[aFrom * d + i]! - b[bFrom * d + i]!);
  return sum / (2 * circuits);
}
