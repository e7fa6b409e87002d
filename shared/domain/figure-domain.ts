import type { FigureKey } from '#shared/formats/types.ts';
import { coverageAccepted } from '#shared/studies/coverage-rule.ts';
import type { CoverageCell, CoverageStudy } from '#shared/studies/coverage-study.ts';

/** Where the stated coverage of a figure was shown to hold, by class. None for a figure: nowhere, or never studied. */
export interface FigureDomain {
  gateClass: string;
  key: FigureKey;
  depth: number | null;
  /** Losses of an entry's worst gate, both ends included. `to` is compared with the upper 95 % bound, `from` with the lower. */
  gateLoss: { from: number; to: number };
  /** Fewest shots of a circuit, and the number from which another row holds; null = no end. */
  shots: { from: number; below: number | null };
}

/** Classes that were not simulated themselves take the domain of the largest register of the same gates that was. */
const studiedAs: Readonly<Record<string, string>> = { 'chained-cz-4q/1': 'chained-cz-3q/1', 'chained-cz-5q/1': 'chained-cz-3q/1' };

/** The class whose simulations speak for the given one. */
export const studiedClassOf = (gateClass: string): string => studiedAs[gateClass] ?? gateClass;

interface Range {
  from: number;
  to: number;
}

/**
 * Whether the figure was inside in a cell: every gate's, where there are several, among the trials that settled. Only settled
 * entries are ranked, so that only their coverage counts.
 */
function insideIn(cell: CoverageCell, key: FigureKey, depth: number | null): boolean {
  const rows = cell.figures.filter((f) => f.key === key && f.depth === depth);
  return rows.length > 0 && rows.every(({ settled: [trials, inside] }) => coverageAccepted(inside, trials));
}

/**
 * The longest run of inside cells in the order of their true gate loss: from the quietest of them to the loudest, or from 0 where
 * the quietest studied is among them. A cell that fails in between ends a run, whatever its coherent share; one cell alone between
 * two that fail is no range.
 */
function longestRun(cells: readonly CoverageCell[], key: FigureKey, depth: number | null): Range | null {
  const order = [...cells].sort((a, b) => a.greatestLoss - b.greatestLoss);
  let best: Range | null = null;
  let most = 0;
  for (let i = 0; i < order.length; i++) {
    let end = i;
    while (end < order.length && insideIn(order[end]!, key, depth)) end++;
    if (end - i > most && (i === 0 || end - i > 1)) {
      most = end - i;
      best = { from: i === 0 ? 0 : order[i]!.greatestLoss, to: order[end - 1]!.greatestLoss };
    }
    i = end;
  }
  return best;
}

const common = (a: Range | null, b: Range | null): Range | null => {
  if (!a || !b) return null;
  const both = { from: Math.max(a.from, b.from), to: Math.min(a.to, b.to) };
  return both.from < both.to ? both : null;
};

/**
 * The domain of every figure of a class, from the coverage study. At each studied number of shots the longest run of inside
 * cells; between two of them what both allow; beyond the greatest what it allows, since an estimate must settle against its own
 * shot noise to be ranked; below the least nothing.
 */
export function domainsOf(study: Pick<CoverageStudy, 'cells'>, gateClass: string): FigureDomain[] {
  const cells = study.cells.filter((c) => c.gateClass === studiedClassOf(gateClass));
  const shots = [...new Set(cells.map((c) => c.shots))].sort((a, b) => a - b);
  const names = new Map(cells.flatMap((c) => c.figures).flatMap(({ key, depth }) => (key === 'prediction' ? [] : [[`${key} ${depth}`, { key, depth }] as const])));
  return [...names.values()].flatMap(({ key, depth }) => {
    const runs = shots.map((s) => longestRun(cells.filter((c) => c.shots === s), key, depth));
    return shots.flatMap((from, i) => {
      const gateLoss = i + 1 < shots.length ? common(runs[i]!, runs[i + 1]!) : runs[i]!;
      return gateLoss ? [{ gateClass, key, depth, gateLoss, shots: { from, below: shots[i + 1] ?? null } }] : [];
    });
  });
}
