import type { Entry } from '#shared/contracts/entries.ts';
import { figureDecimals, intervalAt } from '#shared/domain/figure-words.ts';
import { countInWords, formatNumber, formatSigned, formatValue, joinWords, plural } from '#shared/domain/format.ts';

/** A misfit further out than this lies outside the 99 % range. */
const outsideAt = 2.58;

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

/** More sentences than this and they are drawn together: a register of five has ten angles. */
const most = 3;

/** What an angle's interval says about its gate; nothing where it holds zero. */
const anglesApart = (entry: Pick<Entry, 'figures' | 'gates' | 'register'>): { gate: string; sentence: string; far: boolean }[] =>
  entry.figures.filter((f: EntryFigure) => f.key === 'angle-error' && f.value !== null && f.gate !== null).flatMap((f) => {
    const wide = intervalAt(f, 0.95);
    if (!wide || f.value === null || f.gate === null || (wide.low <= 0 && wide.high >= 0)) return [];
    const decimals = figureDecimals(f);
    return [{ gate: gateWords(entry, f.gate), sentence: `turns too ${f.value > 0 ? 'far' : 'little'}. Its angle error is ${formatNumber(f.value, decimals)} rad and its 95\u202f% interval leaves out zero.`, far: f.value > 0 }];
  });

/** The same, gates that turn too far and too little drawn together where there are many. */
export const angleNotes = (entry: Pick<Entry, 'figures' | 'gates' | 'register'>): { gate: string; sentence: string }[] => {
  const apart = anglesApart(entry);
  if (apart.length <= most) return apart.map(({ gate, sentence }) => ({ gate, sentence }));
  return [true, false].flatMap((far) => {
    const gates = apart.filter((note) => note.far === far).map(({ gate }) => gate);
    const turn = gates.length === 1 ? 'turns' : 'turn';
    return gates.length === 0 ? [] : [{ gate: joinWords(gates), sentence: `${turn} too ${far ? 'far' : 'little'}: the 95\u202f% ${plural(gates.length, 'interval')} of ${gates.length === 1 ? 'its angle error leaves' : 'their angle errors leave'} out zero.` }];
  });
};

/** What the misfit of the patches says: one sentence for all that fit, one for each that does not. */
export const misfitNotes = (entry: Pick<Entry, 'patches' | 'register'>): string[] => {
  const judged = entry.patches.flatMap((p) => (p.misfit ? [{ where: qubitNames(entry, p.qubits), sigmas: p.misfit.sigmas }] : []));
  const of = (where: string): string => (entry.patches.length > 1 ? ` of ${where}` : '');
  const one = ({ where, sigmas }: (typeof judged)[number]): string =>
    `${of(where)} over the circuits of the estimate: ${formatSigned(sigmas, 1)} standard deviations from what the estimate leads one to expect.${Math.abs(sigmas) <= outsideAt ? ' No sign of drift.' : ' Outside the 99 % range: drift, leakage, crosstalk, or counts that are not counts.'}`;
  const fit = judged.filter(({ sigmas }) => Math.abs(sigmas) <= outsideAt);
  if (fit.length <= most) return judged.map(one);
  const values = fit.map(({ sigmas }) => sigmas);
  const all = fit.length === judged.length ? 'all' : `${countInWords(fit.length)} of the`;
  return [` of ${all} ${countInWords(judged.length)} patches, over the circuits of the estimate: from ${formatSigned(Math.min(...values), 1)} to ${formatSigned(Math.max(...values), 1)} standard deviations from what the estimate leads one to expect. No sign of drift.`, ...judged.filter(({ sigmas }) => Math.abs(sigmas) > outsideAt).map(one)];
};
