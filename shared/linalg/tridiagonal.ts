/**
 * Largest eigenvalue of a symmetric tridiagonal matrix by bisection on the number of negative pivots (Sturm sequence).
 * Exact to the last bit or two, whatever the clustering. Cost about 60 passes.
 * @param diagonal n numbers
 * @param offDiagonal n − 1 numbers
 */
export function largestTridiagonalEigenvalue(diagonal: readonly number[], offDiagonal: readonly number[]): number {
  const n = diagonal.length;
  let low = -Infinity;
  let high = -Infinity;
  for (let i = 0; i < n; i++) {
    const reach = Math.abs(offDiagonal[i - 1] ?? 0) + Math.abs(i < n - 1 ? offDiagonal[i]! : 0);
    low = Math.max(low, diagonal[i]!);
    high = Math.max(high, diagonal[i]! + reach);
  }
  for (;;) {
    const middle = low + (high - low) / 2;
    if (!(middle > low && middle < high)) return high;
    if (allBelow(diagonal, offDiagonal, middle)) high = middle;
    else low = middle;
  }
}

/** Whether every eigenvalue is below x: all pivots of T − x are negative. */
function allBelow(diagonal: readonly number[], offDiagonal: readonly number[], x: number): boolean {
  let pivot = diagonal[0]! - x;
  if (!(pivot < 0)) return false;
  for (let i = 1; i < diagonal.length; i++) {
    const b = offDiagonal[i - 1]!;
    pivot = diagonal[i]! - x - (b * b) / pivot;
    if (!(pivot < 0)) return false;
  }
  return true;
}
