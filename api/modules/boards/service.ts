import type { EntityManager } from '@mikro-orm/postgresql';
import type { Board, BoardFigure, BoardRow, BoardSummary } from '#shared/contracts/boards.ts';
import { boardReadings, byEstimate, registerFigure } from '#shared/domain/board-figures.ts';
import { gateClasses } from '#shared/domain/gate-classes.ts';
import type { Figure, GateClass } from '#shared/formats/types.ts';
import type { Reason } from '#shared/domain/eligibility.ts';
import { officialMethod } from '#shared/method/versions.ts';
import { EntryVersion } from '#api/entities/entry-version.ts';
import { presentDevice } from '#api/modules/devices/presenter.ts';
import { versionsWith } from '#api/modules/entries/public-entries.ts';
import { presentClassRef, presentGateClass } from '#api/modules/gate-classes/presenter.ts';
import type { RunInThread } from '#api/jobs/threads.ts';
import { boardMethod, boardMethods, notEstimated, readBy } from './method-results.ts';
import { firstOf, rankEligible } from './ranking.ts';
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

const undetermined = (reading: { key: Figure['key']; depth: number | null }, replicates: number, reason = 'not a figure of the whole register in this gate class'): Figure => ({
  key: reading.key, depth: reading.depth, gate: null, qubits: [], value: null, standardError: null, intervals: null, firstOrder: null, determined: false,
  reason, extrapolated: false, firstOrderOnly: false, replicates,
});

const rowOf = ({ accession, version, frozenAt, row }: Candidate, figure: BoardFigure): BoardRow => ({
  accession,
  version,
  device: presentDevice(row.device),
  register: row.register,
  figure: registerFigure(row.summary.figures, boardReadings[figure], row.register.length) ?? undetermined(boardReadings[figure], row.replicates),
  rank: null,
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
  /** Method version; the official one unless told. */
  method?: string | undefined;
}

const isShown = (row: BoardRow, view: View): boolean =>
  (view.modality === undefined || row.device.modality === view.modality) &&
  (view.provider === undefined || row.device.provider.id === view.provider);

const tooOld = (row: BoardRow, view: View, now: Date): Reason | null => {
  const days = Math.floor((now.getTime() - Date.parse(row.lastCircuitAt)) / dayMs);
  if (view.within === undefined || days <= view.within) return null;
  return { code: 'old', sentence: `The last circuit ran ${days} days ago; this view takes ${view.within}.`, remedy: 'A newer entry, or a wider filter.' };
};

/** The latest version of every entry of a class, read by one figure and one method version, with the reasons against each. */
export const judgeEntries = async (em: EntityManager, gateClass: GateClass, view: View, now: Date) => {
  const method = boardMethod(view.method);
  const frozen = await candidatesOf(em, gateClass.id);
  const { read: candidates, missing } = await readBy(em, frozen, method);
  const reading = boardReadings[view.figure];
  const all = latestOf(candidates).map((candidate) => {
    const row = rowOf(candidate, view.figure);
    // Its frozen figures are another version's and do not stand on this board.
    if (missing.has(candidate.id)) return { row: { ...row, figure: undetermined(reading, candidate.row.replicates, `not estimated with ${method}`) }, reasons: [notEstimated(method)], candidate };
    return { row, reasons: [...reasonsAgainst(candidate, candidates, reading), tooOld(row, view, now)].filter((r): r is Reason => r !== null), candidate };
  });
  return { frozen, method, reading, all };
};

/** The board of a class: eligible rows by estimate with their rank ranges, the others with every reason. */
export const readBoard = async (em: EntityManager, run: RunInThread, gateClass: GateClass, view: View, now: Date): Promise<Board> => {
  const { frozen, method, reading, all } = await judgeEntries(em, gateClass, view, now);
  const order = byEstimate(reading.better);
  const { how, ranks } = await rankEligible(em, run, all.filter(({ reasons }) => reasons.length === 0).map(({ candidate }) => candidate), reading, method);
  // What was withdrawn has left the board; its own page tells why.
  const shown = all.filter(({ row, candidate }) => candidate.state !== 'withdrawn' && isShown(row, view));
  shown.sort((a, b) => order(a.row.figure.value, b.row.figure.value) || (a.row.accession < b.row.accession ? -1 : 1));
  const providers = new Map(all.map(({ row }) => [row.device.provider.id, row.device.provider]));
  return {
    gateClass: presentGateClass(gateClass),
    figure: view.figure,
    method,
    methods: await boardMethods(em, frozen),
    readAt: now.toISOString(),
    ranking: how,
    rows: shown.filter(({ reasons }) => reasons.length === 0).map(({ row }) => ({ ...row, rank: ranks.get(row.accession) ?? null })),
    notListed: shown.filter(({ reasons }) => reasons.length > 0).map(({ row, reasons }) => ({ row, reasons })),
    filters: { modalities: [...new Set(all.map(({ row }) => row.device.modality))].sort(), providers: [...providers.values()].sort((a, b) => a.name.localeCompare(b.name, 'en')) },
  };
};

/** One line a board, in the order in which the classes are listed. */
export const listBoards = async (em: EntityManager, run: RunInThread): Promise<BoardSummary[]> => {
  const reading = boardReadings['retained-signal-16'];
  const lines: BoardSummary[] = [];
  for (const gateClass of gateClasses) {
    const { read: candidates, missing } = await readBy(em, await candidatesOf(em, gateClass.id), officialMethod.id);
    const latest = latestOf(candidates);
    const changes = candidates.map((c) => c.frozenAt.getTime());
    const ref = presentClassRef(gateClass.id);
    if (!ref) continue;
    const eligible = latest.filter((c) => !missing.has(c.id) && reasonsAgainst(c, candidates, reading).length === 0);
    lines.push({
      gateClass: ref,
      entries: latest.filter((c) => c.state !== 'withdrawn').length,
      eligible: eligible.length,
      first: firstOf(await rankEligible(em, run, eligible, reading, officialMethod.id)),
      lastChange: changes.length > 0 ? new Date(Math.max(...changes)).toISOString() : null,
    });
  }
  return lines;
};
