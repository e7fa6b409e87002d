import { wilsonInterval, Z_99 } from '#shared/stats/wilson.ts';

/** Coverage that is accepted of a nominal 95 % interval. */
export const ACCEPTED = { from: 0.93, to: 0.97 } as const;

/** Fewer trials than this are no evidence either way; a hundred tell only a gross failure, coverage below about 87 %. */
export const LEAST_TRIALS = 100;

/** The 99 % Wilson interval of a coverage, from counts. */
export const coverageInterval = (inside: number, trials: number): { low: number; high: number } => wilsonInterval(inside, trials, Z_99);

/** Whether coverage at nominal 95 % is shown to be near enough: the 99 % Wilson interval meets 93 to 97 %. */
export function coverageAccepted(inside: number, trials: number): boolean {
  const { low, high } = coverageInterval(inside, trials);
  return trials >= LEAST_TRIALS && low <= ACCEPTED.to && high >= ACCEPTED.from;
}
