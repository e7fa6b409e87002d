import { precisionFixed, scaleLinear, scaleLog, tickStep } from 'd3';
import { formatNumber, formatSigned } from '#shared/domain/format.ts';

export interface Tick {
  value: number;
  /** Per cent of the plot, from its left or upper edge. */
  at: number;
  label: string;
}

/** An axis: where a value lies, in per cent of the plot, and which values are named. */
export interface Axis {
  at: (value: number) => number;
  ticks: readonly Tick[];
  domain: readonly [number, number];
}

const round = (percent: number): number => Math.round(percent * 1000) / 1000;

/** Turns an axis so that it grows upwards. */
export const upright = (axis: Axis): Axis => ({
  ...axis,
  at: (value) => round(100 - axis.at(value)),
  ticks: axis.ticks.map((tick) => ({ ...tick, at: round(100 - tick.at) })),
});

interface LinearOptions {
  /** About how many ticks. */
  count?: number;
  /** Space left at both ends, as a share of the extent. */
  pad?: number;
  /** Values that must be inside: zero, a limit, 1. */
  include?: readonly number[];
  /** Domain ends on ticks. */
  nice?: boolean;
  /** "+0.03" in place of "0.03". */
  signed?: boolean;
  /** Ticks read in thousandths. */
  thousandths?: boolean;
}

/** A linear axis that holds all values given. A single value, or none, still gives an axis of some width. */
export function linearAxis(values: readonly number[], { count = 6, pad = 0.06, include = [], nice = false, signed = false, thousandths = false }: LinearOptions = {}): Axis {
  const held = [...values, ...include].filter(Number.isFinite);
  let low = held.length > 0 ? Math.min(...held) : 0;
  let high = held.length > 0 ? Math.max(...held) : 1;
  // Below a thousand-millionth of the values, or below what a scale can divide by, there is no extent to speak of.
  if (high - low <= Math.max(Math.abs(low), Math.abs(high)) * 1e-9 || high - low < 1e-200) {
    const half = Math.max(Math.abs(high) * 0.01, 1e-6);
    low -= half;
    high += half;
  }
  const room = (high - low) * pad;
  const scale = scaleLinear().domain([low - room, high + room]).range([0, 100]);
  if (nice) scale.nice(count);
  const [from = 0, to = 1] = scale.domain();
  const factor = thousandths ? 1000 : 1;
  const decimals = precisionFixed(tickStep(from * factor, to * factor, count));
  const write = signed ? formatSigned : formatNumber;
  return {
    at: (value) => round(scale(value)),
    domain: [from, to],
    ticks: scale.ticks(count).map((value) => ({ value, at: round(scale(value)), label: write(value * factor, decimals) })),
  };
}

/** An axis over the values given by hand, evenly spread after a monotone `place`. */
export function placedAxis(values: readonly number[], place: (value: number) => number, label: (value: number) => string, pad = 4): Axis {
  const low = place(Math.min(...values));
  const high = place(Math.max(...values));
  const width = high - low || 1;
  const at = (value: number): number => round(pad + ((place(value) - low) / width) * (100 - 2 * pad));
  return { at, domain: [Math.min(...values), Math.max(...values)], ticks: values.map((value) => ({ value, at: at(value), label: label(value) })) };
}

/** A logarithmic axis with ticks at 1, 2 and 5 times powers of ten. All values must be above zero. */
export function logAxis(values: readonly number[], label: (value: number) => string): Axis {
  const held = values.filter((v) => v > 0 && Number.isFinite(v));
  const low = held.length > 0 ? Math.min(...held) : 1;
  const high = held.length > 0 ? Math.max(...held) : 10;
  const scale = scaleLog().domain([low, high <= low ? low * 10 : high]).range([0, 100]);
  const ticks: Tick[] = [];
  for (let power = Math.floor(Math.log10(low)); power <= Math.ceil(Math.log10(high)); power += 1) {
    for (const lead of [1, 2, 5]) {
      const value = Number(`${lead}e${power}`);
      if (value >= low * 0.999 && value <= high * 1.001) ticks.push({ value, at: round(scale(value)), label: label(value) });
    }
  }
  return { at: (value) => round(scale(value)), ticks, domain: [low, high] };
}
