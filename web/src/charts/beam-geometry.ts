import type { Interval } from '#shared/formats/types.ts';
import type { Axis } from './axis.ts';

/** Heights in pixels of the beam's parts, by level; the thinnest is drawn first. */
const thickness: readonly (readonly [level: number, height: number])[] = [[0.95, 2], [0.8, 5], [0.5, 10]];

/** Width of the dot with its edge, in pixels. */
export const dotWidth = 8.5;

/** How far an interval runs over the edge of the plot, in per cent, where it passes the axis. */
const overrun = 2;

export interface BeamBar {
  level: number;
  height: number;
  /** Left end and width, per cent of the plot. */
  from: number;
  width: number;
}

export interface BeamParts {
  /** Where the dot stands, per cent of the plot; null where there is no estimate. */
  dot: number | null;
  bars: readonly BeamBar[];
}

const inside = (percent: number): number => Math.min(100 + overrun, Math.max(-overrun, percent));

/**
 * The stepped beam: line, bar and block for 95, 80 and 50 %. Positions are per cent of the plot and thicknesses are pixels.
 * A block narrower than the dot is left out, so that the dot does not read as a diamond; each end is drawn where it is.
 */
export function beamParts(value: number | null, intervals: readonly Interval[] | null, axis: Axis, plotWidth: number): BeamParts {
  const bars: BeamBar[] = [];
  for (const [level, height] of thickness) {
    const interval = intervals?.find((i) => Math.abs(i.level - level) < 1e-9);
    if (!interval) continue;
    const from = inside(axis.at(interval.low));
    const width = Math.max(0, inside(axis.at(interval.high)) - from);
    if (level === 0.5 && (width / 100) * plotWidth < dotWidth) continue;
    bars.push({ level, height, from, width: Math.round(width * 1000) / 1000 });
  }
  return { dot: value === null ? null : inside(axis.at(value)), bars };
}

/** Values an axis must hold: the ends of the 95 % intervals, and estimates that have none. */
export const beamExtent = (figures: readonly { value: number | null; intervals: readonly Interval[] | null }[]): number[] =>
  figures.flatMap((f) => (f.value === null ? [] : [f.value, ...(f.intervals ?? []).filter((i) => i.level > 0.9).flatMap((i) => [i.low, i.high])]));
