import type { FigureDomain } from '#shared/domain/figure-domain.ts';
import { figureName } from '#shared/domain/figure-words.ts';
import { formatCount, narrowSpace } from '#shared/domain/format.ts';
import type { CoverageStudy } from '#shared/studies/coverage-study.ts';

export interface DomainRow {
  key: string;
  figure: string;
  shots: string;
  /** "up to 0.6 %"; null: nowhere shown. */
  loss: string | null;
}

const percent = (loss: number): string => `${Number((loss * 100).toPrecision(2))}${narrowSpace}%`;
const shotsWords = ({ from, below }: FigureDomain['shots']): string => (below === null ? `${formatCount(from)} and more` : `${formatCount(from)} to below ${formatCount(below)}`);
const lossWords = ({ from, to }: FigureDomain['gateLoss']): string => (from === 0 ? `up to ${percent(to)}` : `${percent(from)} to ${percent(to)}`);

/** Neighbouring ranges of shots with the same range of losses are one. */
const merged = (found: readonly FigureDomain[]): FigureDomain[] => {
  const out: FigureDomain[] = [];
  for (const domain of found) {
    const last = out.at(-1);
    if (last && last.shots.below === domain.shots.from && lossWords(last.gateLoss) === lossWords(domain.gateLoss)) out[out.length - 1] = { ...last, shots: { from: last.shots.from, below: domain.shots.below } };
    else out.push(domain);
  }
  return out;
};

/** The domain of every figure of a class: a row for each range of shots, and one for a figure that was shown to hold nowhere. */
export const domainRows = (domains: readonly FigureDomain[], study: Pick<CoverageStudy, 'cells'>, gateClass: string, studied: string): DomainRow[] => {
  const names = new Map(study.cells.filter((c) => c.gateClass === studied).flatMap((c) => c.figures).filter((f) => f.key !== 'prediction').map((f) => [`${f.key} ${f.depth}`, f] as const));
  return [...names].flatMap(([name, { key, depth }]): DomainRow[] => {
    const figure = key === 'prediction' ? '' : figureName({ key, depth, gate: null });
    const found = domains.filter((d) => d.gateClass === gateClass && d.key === key && d.depth === depth);
    if (found.length === 0) return [{ key: name, figure, shots: 'any', loss: null }];
    return merged(found).map((d) => ({ key: `${name} ${d.shots.from}`, figure, shots: shotsWords(d.shots), loss: lossWords(d.gateLoss) }));
  });
};
