import type { Device } from '#shared/contracts/devices.ts';
import { columnDecimals } from '#shared/domain/figure-words.ts';
import { linearAxis, type Axis } from '#web/charts/axis.ts';
import { beamExtent } from '#web/charts/beam-geometry.ts';

export type HistoryItem = Device['history'][number];

export interface HistoryGroup {
  gateClass: string;
  title: string;
  /** Oldest run first. */
  items: readonly HistoryItem[];
  axis: Axis;
  decimals: number;
}

/** A device's entries by gate class, each class on one axis: figures of different classes are not set against each other. */
export function historyGroups(history: readonly HistoryItem[]): HistoryGroup[] {
  const byClass = new Map<string, HistoryItem[]>();
  for (const item of history) byClass.set(item.gateClass, [...(byClass.get(item.gateClass) ?? []), item]);
  return [...byClass.values()].map((items) => {
    const sorted = [...items].sort((a, b) => a.lastCircuitAt.localeCompare(b.lastCircuitAt) || a.version - b.version);
    const figures = sorted.flatMap((item) => (item.headline ? [item.headline] : []));
    return { gateClass: items[0]?.gateClass ?? '', title: items[0]?.gateClassTitle ?? '', items: sorted, axis: linearAxis(beamExtent(figures), { count: 6, pad: 0.08 }), decimals: columnDecimals(figures) };
  });
}
