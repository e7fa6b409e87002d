import type { Entry } from '#shared/contracts/entries.ts';
import { figureDecimals, intervalAt } from '#shared/domain/figure-words.ts';
import { countInWords, formatNumber, formatValue, joinWords, plural } from '#shared/domain/format.ts';

type EntryFigure = Entry['figures'][number];

/** Words of a gate by its label: "rx(π/2)", on a larger register "rx(π/2) on q1". */
export const gateWords = (entry: Pick<Entry, 'gates' | 'register'>, label: string): string => {
  const gate = entry.gates.find((g) => g.label === label);
  if (!gate) return label;
  if (entry.register.length < 2) return gate.words;
  return `${gate.words} on ${joinWords(gate.targets.map((t) => entry.register[t] ?? String(t)))}`;
};

export const qubitNames = (entry: Pick<Entry, 'register'>, qubits: readonly number[]): string => joinWords(qubits.map((q) => entry.register[q] ?? String(q)));

/** Title of a drawing that leaves the page: it must say by itself what it shows, and whether the device is invented. */
export const fileTitle = (entry: Pick<Entry, 'device' | 'accession' | 'version' | 'demo'>, what: string): string =>
  `${entry.device.name}, ${entry.accession}.${entry.version}: ${what}${entry.demo ? ' (demonstration data)' : ''}`;

export interface Headline {
  before: string;
  value: string;
  after: string;
}

/** "After sixteen gates, Meadow-5 keeps 96.95 % of the ideal signal, with a 95 % interval from 96.58 % to 97.32 %." */
export const headlineOf = (entry: Pick<Entry, 'headline' | 'device'>): Headline | null => {
  const figure = entry.headline;
  if (!figure || figure.value === null) return null;
  const decimals = figureDecimals(figure);
  const wide = intervalAt(figure, 0.95);
  const ends = wide ? `, with a 95\u202f% interval from ${formatValue(wide.low, decimals, 'percent')} to ${formatValue(wide.high, decimals, 'percent')}` : '; no interval could be given';
  const gates = figure.depth ?? 0;
  return { before: `After ${countInWords(gates)} ${plural(gates, 'gate')}, ${entry.device.name} keeps `, value: formatValue(figure.value, decimals, 'percent'), after: ` of the ideal signal${ends}.` };
};

/** What an angle's interval says about its gate; nothing where it holds zero. */
export const angleNotes = (entry: Pick<Entry, 'figures' | 'gates' | 'register'>): { gate: string; sentence: string }[] =>
  entry.figures.filter((f: EntryFigure) => f.key === 'angle-error' && f.value !== null && f.gate !== null).flatMap((f) => {
    const wide = intervalAt(f, 0.95);
    if (!wide || f.value === null || f.gate === null || (wide.low <= 0 && wide.high >= 0)) return [];
    const decimals = figureDecimals(f);
    return [{ gate: gateWords(entry, f.gate), sentence: `turns too ${f.value > 0 ? 'far' : 'little'}. Its angle error is ${formatNumber(f.value, decimals)} rad and its 95\u202f% interval leaves out zero.` }];
  });
