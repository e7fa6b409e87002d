import type { Interval } from '#shared/formats/types.ts';
import { studyIntervals } from '#tests/studies/coverage/read-interval.ts';

/** Ways to make an interval of a distance from its sorted replicates, beside the method's own. Other figures keep theirs. */
export const proposals: Readonly<Record<string, typeof studyIntervals>> = {
  /** 2θ̂ − q, cut at 0: the method's. */
  reflected: studyIntervals,
  /** √(2θ̂² − q²), cut at 0: noise adds to a distance in squares, in the estimate and once more in its replicates. */
  squared: (sorted, estimate, distance) => (distance ? pairUp(sorted, (q) => Math.sqrt(Math.max(0, 2 * estimate * estimate - q * q))) : studyIntervals(sorted, estimate, false)),
  /** From the reflected lower end to the greater of the two upper ends: an estimate near 0 says little about how large the truth may be. */
  wider: (sorted, estimate, distance) => {
    const reflected = studyIntervals(sorted, estimate, distance);
    if (!distance) return reflected;
    return studyIntervals(sorted, estimate, false).map(({ level, high }, i) => ({ level, low: reflected[i]!.low, high: Math.max(high, reflected[i]!.high) }));
  },
  /** From the squared lower end to the greater of the squared and the percentile upper end. */
  'squared and wider': (sorted, estimate, distance) => {
    const squared = proposals.squared!(sorted, estimate, distance);
    if (!distance) return squared;
    return studyIntervals(sorted, estimate, false).map(({ level, high }, i) => ({ level, low: squared[i]!.low, high: Math.max(high, squared[i]!.high) }));
  },
};

/** The interval whose lower end comes from the upper quantile, as in every reflection. */
function pairUp(sorted: Float64Array, end: (q: number) => number): Interval[] {
  return studyIntervals(sorted, 0, false).map(({ level, low, high }) => ({ level, low: end(high), high: end(low) }));
}
