/** Mean and sample standard deviation (divisor n − 1; 0 for one value), by two passes. */
export function moments(values: ArrayLike<number>): { mean: number; deviation: number } {
  const n = values.length;
  let sum = 0;
  for (let i = 0; i < n; i++) sum += values[i]!;
  const mean = sum / n;
  let squares = 0;
  for (let i = 0; i < n; i++) squares += (values[i]! - mean) * (values[i]! - mean);
  return { mean, deviation: n > 1 ? Math.sqrt(squares / (n - 1)) : 0 };
}
