import type { Entry } from '#shared/contracts/entries.ts';
import { columnDecimals } from '#shared/domain/figure-words.ts';
import { linearAxis, type Axis } from '#web/charts/axis.ts';
import { beamExtent } from '#web/charts/beam-geometry.ts';
import { gateWords } from './entry-words.ts';

type EntryFigure = Entry['figures'][number];

export interface GateRow {
  label: string;
  words: string;
  loss: EntryFigure | null;
  angle: EntryFigure | null;
}

export interface GateFigures {
  rows: readonly GateRow[];
  loss: { axis: Axis; decimals: number };
  angle: { axis: Axis; decimals: number };
}

/** Gate loss and angle error of every gate, each on one axis for all gates. */
export function gateFigures(entry: Pick<Entry, 'figures' | 'gates' | 'register'>): GateFigures {
  const of = (key: EntryFigure['key'], label: string): EntryFigure | null => entry.figures.find((f) => f.key === key && f.gate === label) ?? null;
  const rows = entry.gates.map(({ label }) => ({ label, words: gateWords(entry, label), loss: of('gate-loss', label), angle: of('angle-error', label) }));
  const losses = rows.flatMap((row) => (row.loss ? [row.loss] : []));
  const angles = rows.flatMap((row) => (row.angle ? [row.angle] : []));
  return {
    rows,
    loss: { axis: linearAxis(beamExtent(losses), { count: 5, include: [0], thousandths: true, pad: 0.05 }), decimals: columnDecimals(losses) },
    angle: { axis: linearAxis(beamExtent(angles), { count: 4, include: [0], pad: 0.08 }), decimals: columnDecimals(angles) },
  };
}
