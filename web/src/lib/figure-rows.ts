import type { Submission } from '#shared/contracts/submissions.ts';
import { figureName } from '#shared/domain/figure-words.ts';
import { joinWords } from '#shared/domain/format.ts';
import type { PreviewRow } from '#web/charts/figure-beams.tsx';

type Figure = NonNullable<Submission['result']>['figures'][number];

/** Name of a figure within a register: its qubits are named where it does not stand for the whole register. */
export const figureTitle = (figure: Pick<Figure, 'key' | 'depth' | 'gate' | 'qubits' | 'extrapolated' | 'firstOrderOnly'>, { register, gates }: Pick<Submission, 'register' | 'gates'>): string => {
  const words = gates.find(({ label }) => label === figure.gate)?.words ?? figure.gate;
  const name = figureName(figure, words === null ? undefined : words);
  const part = figure.qubits.length > 0 && figure.qubits.length < register.length;
  const place = part ? `, on ${joinWords(figure.qubits.map((q) => register[q] ?? `qubit ${q}`))}` : '';
  const remarks = [figure.extrapolated ? 'extrapolated' : '', figure.firstOrderOnly ? 'to first order' : ''].filter(Boolean).join(', ');
  return `${name}${place}${remarks ? ` (${remarks})` : ''}`;
};

/** The figures of a result as rows of a preview, in the order of the result. */
export const figureRows = (figures: readonly Figure[], submission: Pick<Submission, 'register' | 'gates'>): PreviewRow[] =>
  figures.map((figure) => ({ key: [figure.key, figure.depth, figure.gate, figure.qubits.join('-')].join('/'), name: figureTitle(figure, submission), figure }));
