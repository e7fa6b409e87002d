import type { EntityManager } from '@mikro-orm/postgresql';
import type { Board, BoardFigure, BoardRow, BoardSummary } from '#shared/contracts/boards.ts';
import { boardReadings, byEstimate, registerFigure } from '#shared/domain/board-figures.ts';
import { gateClasses } from '#shared/domain/gate-classes.ts';
import type { Figure, GateClass } from '#shared/formats/types.ts';
import type { Reason } from '#shared/domain/eligibility.ts';
import { EntryVersion } from '#api/entities/entry-version.ts';
import { currentMethod } from '#api/lib/method-versions.ts';
import { presentDevice } from '#api/modules/devices/presenter.ts';
import { versionsWith } from '#api/modules/entries/public-entries.ts';
import { presentClassRef, presentGateClass } from '#api/modules/gate-classes/presenter.ts';
import { reasonsAgainst } from './standing.ts';

const dayMs = 86_400_000;

/** The public versions of a class with what a board needs; reviews and sealed points stay in the database. */
const candidatesOf = async (em: EntityManager, gateClass: string) => {
  const versions = await versionsWith(em, 'gate_class', gateClass);
  const rows = await em.find(EntryVersion, { id: { $in: versions.map((v) => v.id) } }, { populate: ['device.organisation'], exclude: ['review', 'sealedPoints'] });
  const byId = new Map(rows.map((row) => [row.id, row]));
  return versions.flatMap((version) => {
    const row = byId.get(version.id);
    return row ? [{ ...version, row: { ...row, device: row.device.unwrap() } }] : [];
  });
};
type Candidate = Awaited<ReturnType<typeof candidatesOf>>[number];

/** The latest public version of each accession: earlier ones have given up their place to it. */
const latestOf = (candidates: readonly Candidate[]): Candidate[] => {
  const latest = new Map<string, Candidate>();
  for (const c of candidates) if ((latest.get(c.accession)?.version ?? 0) < c.version) latest.set(c.accession, c);
  return [...latest.values()];
};

const undetermined = (reading: { key: Figure['key']; depth: number | null }, replicates: number): Figure => ({
  key: reading.key, depth: reading.depth, gate: null, qubits: [], value: null, standardError: null, intervals: null, firstOrder: null, determined: false,
  reason: 'not a figure of the whole register in this gate class', extrapolated: false, firstOrderOnly: false, replicates,
});

const rowOf = ({ accession, version, frozenAt, row }: Candidate, figure: BoardFigure): BoardRow => ({
  accession,
  version,
  device: presentDevice(row.device),
  register: row.register,
  figure: registerFigure(row.summary.figures, boardReadings[figure], row.register.length) ?? undetermined(boardReadings[figure], row.replicates),
  method: row.method,
  lastCircuitAt: row.endedAt.toISOString(),
  frozenAt: frozenAt.toISOString(),
  demo: row.demo,
});

interface View {
  figure: BoardFigure;
  modality?: string | undefined;
  provider?: string | undefined;
  within?: number | undefined;
}

const isShown = (row: BoardRow, view: View): boolean =>
  (view.modality === undefined || row.device.modality === view.modality) &&
  (view.provider === undefined || row.device.provider.id === view.provider);

const tooOld = (row: BoardRow, view: View, now: Date): Reason | null => {
  const days = Math.floor((now.getTime() - Date.parse(row.lastCircuitAt)) / dayMs);
  if (view.within === undefined || days <= view.within) return null;
  return { code: 'old', sentence: `The last circuit ran ${days} days ago; this view takes ${view.within}.`, remedy: 'A newer entry, or a wider filter.' };
};

/** The board of a class: eligible rows by estimate, the others with every reason. Ranks are another matter. */
export const readBoard = async (em: EntityManager, gateClass: GateClass, view: View, now: Date): Promise<Board> => {
  const candidates = await candidatesOf(em, gateClass.id);
  const reading = boardReadings[view.figure];
  const order = byEstimate(reading.better);
  const all = latestOf(candidates).map((candidate) => {
    const row = rowOf(candidate, view.figure);
    return { row, reasons: [...reasonsAgainst(candidate, candidates, reading), tooOld(row, view, now)].filter((r): r is Reason => r !== null) };
  });
  const shown = all.filter(({ row }) => isShown(row, view));
  shown.sort((a, b) => order(a.row.figure.value, b.row.figure.value) || (a.row.accession < b.row.accession ? -1 : 1));
  const providers = new Map(all.map(({ row }) => [row.device.provider.id, row.device.provider]));
  return {
    gateClass: presentGateClass(gateClass),
    figure: view.figure,
    method: currentMethod,
    readAt: now.toISOString(),
    rows: shown.filter(({ reasons }) => reasons.length === 0).map(({ row }) => row),
    notListed: shown.filter(({ reasons }) => reasons.length > 0),
    filters: { modalities: [...new Set(all.map(({ row }) => row.device.modality))].sort(), providers: [...providers.values()].sort((a, b) => a.name.localeCompare(b.name, 'en')) },
  };
};

/** One line a board, in the order in which the classes are listed. */
export const listBoards = async (em: EntityManager): Promise<BoardSummary[]> => {
  const lines: BoardSummary[] = [];
  for (const gateClass of gateClasses) {
    const candidates = await candidatesOf(em, gateClass.id);
    const latest = latestOf(candidates);
    const changes = candidates.map((c) => c.frozenAt.getTime());
    const ref = presentClassRef(gateClass.id);
    if (!ref) continue;
    lines.push({
      gateClass: ref,
      entries: latest.filter((c) => c.state !== 'withdrawn').length,
      eligible: latest.filter((c) => reasonsAgainst(c, candidates, boardReadings['retained-signal-16']).length === 0).length,
      lastChange: changes.length > 0 ? new Date(Math.max(...changes)).toISOString() : null,
    });
  }
  return lines;
};
