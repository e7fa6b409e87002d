import type { BoardDifference } from '#shared/contracts/boards.ts';
import { boardReadings } from '#shared/domain/board-figures.ts';
import { decimalsFor, formatNumber, formatRange, formatSigned } from '#shared/domain/format.ts';

/** A share in per cent without false certainty: "71 %", "above 99.9 %", "below 0.1 %". */
export const shareWords = (share: number): string => {
  if (share > 0.999) return 'above 99.9\u202f%';
  if (share < 0.001) return 'below 0.1\u202f%';
  return `${formatNumber(share * 100, share > 0.99 || share < 0.01 ? 1 : 0)}\u202f%`;
};

/** The difference of two entries as a sentence: who is better and by how much where its 95 % interval leaves out zero, else that it does not. */
export const differenceWords = ({ a, b, figure, value, standardError, intervals, shareBetter }: BoardDifference): string => {
  const decimals = decimalsFor(standardError);
  const wide = intervals.find((i) => Math.abs(i.level - 0.95) < 1e-9);
  const higher = boardReadings[figure].better === 'higher';
  if (!wide || (wide.low <= 0 && wide.high >= 0)) {
    const range = wide ? ` (95\u202f% interval ${formatRange(wide.low, wide.high, decimals)})` : '';
    return `${a.name} less ${b.name} is ${formatSigned(value, decimals)}${range}, which holds zero; ${a.name} is the better one in ${shareWords(shareBetter)} of replicates.`;
  }
  const aBetter = value > 0 === higher;
  const ends = [Math.abs(wide.low), Math.abs(wide.high)].sort((x, y) => x - y) as [number, number];
  const [winner, loser, share] = aBetter ? [a.name, b.name, shareBetter] : [b.name, a.name, 1 - shareBetter];
  return `${winner} is better than ${loser} by ${formatNumber(Math.abs(value), decimals)} (95\u202f% interval ${formatRange(ends[0], ends[1], decimals)}); better in ${shareWords(share)} of replicates.`;
};
