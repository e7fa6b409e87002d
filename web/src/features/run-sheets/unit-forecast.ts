import { sha256 } from '@noble/hashes/sha2.js';
import { utf8ToBytes } from '@noble/hashes/utils.js';
import type { FigureKey, GateClass } from '#shared/formats/types.ts';
import { forecastChain } from '#shared/method/chain/forecast-chain.ts';
import { forecast, type Forecast } from '#shared/method/forecast.ts';
import { Xoshiro256 } from '#shared/random/xoshiro256.ts';
import { drawCircuits } from '#shared/runsheet/draw-circuits.ts';
import { patchPlans } from '#shared/runsheet/sheet-plan.ts';
import { samplesOf } from './plan-forecast.ts';

/** One figure's half-width at one shot a circuit: divide by the square root of the shots. */
export interface UnitFigure {
  key: FigureKey;
  depth: number | null;
  gate: string | null;
  /** Root mean square over the sample sheets, with the narrowest and the widest of them; null = not determined by any. */
  halfWidth: { typical: number; least: number; most: number } | null;
}

/** What sheets of so many circuits promise, seen on a few sample sheets. */
export interface UnitForecast {
  circuits: number;
  rank: number;
  /** Median over the sample sheets. */
  conditionRatio: number;
  figures: UnitFigure[];
}

/** Two-sided 95 % quantile of the normal distribution. */
const z95 = 1.959963984540054;

/** The patches of a sample sheet, drawn as the registry draws, without a seal. */
const sampleSheet = (gateClass: GateClass, circuits: number, seed: string): { qubits: number[]; circuits: { gates: string[] }[] }[] => {
  const stream = new Xoshiro256(sha256(utf8ToBytes(seed)));
  return patchPlans(gateClass, circuits, false).map(({ qubits, estimated, lengths, labels }) => ({ qubits, circuits: drawCircuits(stream, estimated, lengths, labels).map((gates) => ({ gates })) }));
};

type Seen = Pick<Forecast, 'rank' | 'conditionRatio'> & { figures: { key: FigureKey; depth: number | null; gate: string | null; standardError: number | null }[] };

const forecastOf = (gateClass: GateClass, circuits: number, readoutError: number, sample: number): Seen => {
  const { gates, registerSize, bench } = gateClass;
  const patches = sampleSheet(gateClass, circuits, `plan ${gateClass.id} ${circuits} ${sample}`);
  const common = { gates, shots: 1, bench, readoutError };
  if (gateClass.kind === 'chained') return forecastChain({ ...common, registerSize, locals: patches.slice(0, registerSize), pairs: patches.slice(registerSize) });
  const [patch] = patches;
  if (!patch) throw new RangeError('The class has no patch.');
  return forecast({ ...common, ...patch });
};

const middle = (values: readonly number[]): number => {
  const sorted = [...values].sort((a, b) => a - b);
  const half = Math.floor(sorted.length / 2);
  return sorted.length % 2 === 1 ? sorted[half] ?? Number.NaN : ((sorted[half - 1] ?? Number.NaN) + (sorted[half] ?? Number.NaN)) / 2;
};

const spread = (errors: readonly (number | null)[]): UnitFigure['halfWidth'] => {
  const known = errors.filter((e) => e !== null).map((e) => e * z95);
  return known.length === 0 ? null : { typical: Math.sqrt(known.reduce((sum, w) => sum + w * w, 0) / known.length), least: Math.min(...known), most: Math.max(...known) };
};

/**
 * Half-widths for sheets of a class, before any is drawn: forecasts on a few sample sheets. Deterministic; the sample seeds
 * have nothing to do with the registry's. Cost a sample: one qubit 20 to 120 ms; a pair of 1,200 circuits a second, of 4,800
 * three; registers of two to five half a second to two.
 */
export function unitForecast(gateClass: GateClass, circuits: number, readoutError: number): UnitForecast {
  const seen = Array.from({ length: samplesOf(gateClass) }, (_, i) => forecastOf(gateClass, circuits, readoutError, i));
  const first = seen[0];
  if (!first) throw new RangeError('No sample sheet was drawn.');
  return {
    circuits,
    rank: Math.max(...seen.map((f) => f.rank)),
    conditionRatio: middle(seen.map((f) => f.conditionRatio)),
    figures: first.figures.map(({ key, depth, gate }, i) => ({ key, depth, gate, halfWidth: spread(seen.map((f) => f.figures[i]?.standardError ?? null)) })),
  };
}
