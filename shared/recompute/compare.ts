import { figureName } from '#shared/domain/figure-words.ts';
import { canonicalJson, sha256Hex } from '#shared/formats/canonical-json.ts';
import { readLittleEndian } from '#shared/formats/float64.ts';
import type { Dataset, Figure, Result } from '#shared/formats/types.ts';
import { agreementOf, CLOSE, differencesOf, largestGap, worstOf } from './differences.ts';
import type { Agreement, ComparedBytes, ComparedFigure, ComparedPart, Comparison } from './types.ts';

/** "Gate loss, cz01, q0 and q1": the qubits only where the register has several. */
export function figureTitle(figure: Figure, { register }: Pick<Dataset, 'register'>): string {
  const name = figureName(figure);
  return register.length > 1 && figure.qubits.length > 0 ? `${name} (${figure.qubits.map((q) => register[q] ?? String(q)).join(', ')})` : name;
}

function compareFigures(frozen: Result, again: Result, dataset: Pick<Dataset, 'register'>): ComparedFigure[] {
  return frozen.figures.map((figure, i) => {
    const other = again.figures[i] ?? null;
    const differences = differencesOf(figure, other, `/figures/${i}`);
    return { title: figureTitle(figure, dataset), frozen: figure, again: other, differences, agreement: agreementOf(differences) };
  });
}

/** Everything of a result that is no figure. */
function compareParts(frozen: Result, again: Result, { register }: Pick<Dataset, 'register'>): ComparedPart[] {
  const part = (title: string, pointer: string, a: unknown, b: unknown): ComparedPart => {
    const differences = differencesOf(a, b, pointer);
    return { title, differences, agreement: agreementOf(differences) };
  };
  const { patches, figures, sealedCheck, warnings, predictions, ...head } = frozen;
  const { patches: patchesAgain, figures: figuresAgain, sealedCheck: checkAgain, warnings: warningsAgain, predictions: predictionsAgain, ...headAgain } = again;
  const names = (qubits: readonly number[]): string => qubits.map((q) => register[q] ?? String(q)).join(', ');
  const counts = [part('Number of figures', '/figures/length', figures.length, figuresAgain.length), part('Number of patches', '/patches/length', patches.length, patchesAgain.length)];
  return [
    part('Method, dataset, replicates, sealed circuits', '', head, headAgain),
    ...patches.map((patch, i) => part(`Design, misfit and error maps of ${names(patch.qubits)}`, `/patches/${i}`, patch, patchesAgain[i] ?? null)),
    part('Sealed check', '/sealedCheck', sealedCheck, checkAgain),
    part('Predictions', '/predictions', predictions, predictionsAgain),
    part('Warnings', '/warnings', warnings, warningsAgain),
    // More of them on one side is a difference that no part above would show.
    ...counts.filter(({ agreement }) => agreement !== 'identical'),
  ];
}

const isCloseNumber = (a: number, b: number): boolean => Object.is(a, b) || Math.abs(a - b) <= CLOSE * Math.max(1, Math.abs(a), Math.abs(b));

/** Replicates by digest and, where that differs and the frozen ones are here, number by number. */
function compareReplicates(frozenSha256: string, frozen: Uint8Array | null, again: Uint8Array): ComparedBytes {
  const againSha256 = sha256Hex(again);
  if (againSha256 === frozenSha256) return { agreement: 'identical', frozenSha256, againSha256, largestGap: null };
  if (!frozen || frozen.length !== again.length) return { agreement: 'differs', frozenSha256, againSha256, largestGap: null };
  const [a, b] = [readLittleEndian(frozen), readLittleEndian(again)];
  let close = true;
  let most = 0;
  a.forEach((x, i) => {
    const y = b[i]!;
    if (Number.isNaN(x) && Number.isNaN(y)) return;
    close &&= isCloseNumber(x, y);
    if (Number.isFinite(x - y)) most = Math.max(most, Math.abs(x - y));
  });
  return { agreement: close ? 'close' : 'differs', frozenSha256, againSha256, largestGap: most };
}

export interface Recomputed {
  result: Result;
  replicates: Uint8Array;
}

/**
 * A frozen result beside one that was made anew: every figure with its intervals, every other part, the canonical bytes and
 * the replicates. Nothing is rounded: identical means the same double.
 */
export function compareResults(frozen: Result, resultSha256: string, replicates: { sha256: string; bytes: Uint8Array | null }, again: Recomputed, dataset: Pick<Dataset, 'register'>): Comparison {
  const text = canonicalJson(again.result);
  // Through its text, so that both have been written and read alike (−0 is written 0).
  const read = JSON.parse(text) as Result;
  const figures = compareFigures(frozen, read, dataset);
  const parts = compareParts(frozen, read, dataset);
  const againSha256 = sha256Hex(new TextEncoder().encode(text));
  const inParts = worstOf([...figures, ...parts].map(({ agreement }) => agreement));
  // Where every part is identical but the digest is not, the recorded digest itself is wrong.
  const bytes: Agreement = againSha256 === resultSha256 ? 'identical' : inParts === 'identical' ? 'differs' : inParts;
  const result: ComparedBytes = { agreement: bytes, frozenSha256: resultSha256, againSha256, largestGap: largestGap([...figures, ...parts].flatMap(({ differences }) => differences)) };
  const table = compareReplicates(replicates.sha256, replicates.bytes, again.replicates);
  return { agreement: worstOf([inParts, bytes, table.agreement]), figures, parts, result, replicates: table };
}
