import type { GateClassSummary } from '#shared/contracts/gate-classes.ts';
import { figureName } from '#shared/domain/figure-words.ts';
import { decimalsFor, formatCount, formatNumber, joinWords } from '#shared/domain/format.ts';
import type { FigureKey } from '#shared/formats/types.ts';
import { headlineDepth } from './plan-forecast.ts';
import type { UnitForecast } from './unit-forecast.ts';

/** "±0.0037": two digits, as the standard error itself is written. */
export const widthWords = (halfWidth: number): string => `±${formatNumber(halfWidth, decimalsFor(halfWidth))}`;

/** "about 5 minutes" of shots one after another at a thousand a second. */
export const timeWords = (shots: number): string => {
  const seconds = shots / 1000;
  if (seconds < 90) return `about ${formatCount(seconds)} seconds`;
  if (seconds < 5400) return `about ${formatCount(seconds / 60)} minutes`;
  return `about ${formatCount(seconds / 3600)} hours`;
};

/** "identity, rx(π/2), ry(π/2) on each qubit; cz on 0 and 1, 1 and 2": the gates of a class in one line. */
export const gateListWords = ({ gates, registerSize }: Pick<GateClassSummary, 'gates' | 'registerSize'>): string => {
  const places = new Map<string, string[]>();
  for (const { words, targets } of gates) places.set(words, [...(places.get(words) ?? []), joinWords(targets.map(String))]);
  if (registerSize === 1) return [...places.keys()].join(', ');
  const everywhere = [...places].filter(([, on]) => on.length === registerSize && on.every((place) => !place.includes(' '))).map(([words]) => words);
  const elsewhere = [...places].filter(([words]) => !everywhere.includes(words)).map(([words, on]) => `${words} on ${on.join(', ')}`);
  return [everywhere.length > 0 ? `${everywhere.join(', ')} on each qubit` : '', ...elsewhere].filter(Boolean).join('; ');
};

const dependsOn: Readonly<Partial<Record<FigureKey, string>>> = {
  'retained-signal': 'shots and number of circuits', 'error-per-gate': 'number of circuits', 'gate-loss': 'number of circuits', 'angle-error': 'number of circuits', 'readout-loss': 'shots',
};

export interface ForecastRow {
  name: string;
  width: string | null;
  dependsOn: string;
  headline: boolean;
}

/** "±0.0007", or "±0.0007 to ±0.0011" for a figure that stands for several qubits or pairs. */
const rangeWords = (halfWidths: readonly number[]): string => [...new Set([Math.min(...halfWidths), Math.max(...halfWidths)].map(widthWords))].join(' to ');

/** The forecast of one plan as rows: of the retained signals only that of the headline depth, and one row for a gate that several qubits or pairs have. */
export const forecastRows = (unit: UnitForecast, shots: number, gates: GateClassSummary['gates']): ForecastRow[] => {
  const rows = new Map<string, ForecastRow & { halfWidths: (number | null)[] }>();
  for (const f of unit.figures) {
    if (f.key === 'retained-signal' && f.depth !== headlineDepth) continue;
    const name = figureName(f, gates.find((g) => g.label === f.gate)?.words);
    const row = rows.get(name) ?? { name, width: null, dependsOn: dependsOn[f.key] ?? '', headline: f.key === 'retained-signal', halfWidths: [] };
    row.halfWidths.push(f.halfWidth && f.halfWidth.typical / Math.sqrt(shots));
    rows.set(name, row);
  }
  return [...rows.values()].map(({ halfWidths, ...row }) => {
    const known = halfWidths.filter((w) => w !== null);
    return { ...row, width: known.length === halfWidths.length ? rangeWords(known) : null };
  });
};
