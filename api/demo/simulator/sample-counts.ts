import type { Generator } from '#api/demo/simulator/generator.ts';

/**
 * Counts of each outcome when a circuit is run `shots` times: one uniform number a shot, looked up in the running
 * sum of the probabilities. Rounding may leave the last sum below 1; such a shot falls to the last outcome that can occur.
 */
export function sampleCounts(probabilities: ArrayLike<number>, shots: number, stream: Generator): number[] {
  const sums = new Float64Array(probabilities.length);
  let total = 0;
  let last = 0;
  for (let o = 0; o < sums.length; o += 1) {
    const p = Math.max(0, probabilities[o]!);
    if (p > 0) last = o;
    total += p;
    sums[o] = total;
  }
  const counts = Array.from({ length: sums.length }, () => 0);
  for (let shot = 0; shot < shots; shot += 1) {
    const u = stream.next();
    let o = 0;
    while (o < last && u >= sums[o]!) o += 1;
    counts[o] = counts[o]! + 1;
  }
  return counts;
}
