import { registerFigure } from '#shared/domain/board-figures.ts';
import { ineligibility, type Reason } from '#shared/domain/eligibility.ts';
import { figureDomains } from '#shared/domain/figure-domains.ts';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { versionedAccessionOf } from '#shared/domain/ids.ts';
import type { FigureKey } from '#shared/formats/types.ts';
import type { EntryVersion } from '#api/entities/entry-version.ts';
import type { PublicVersion } from '#api/modules/entries/public-entries.ts';

/** A public version with as much of its row as standing on a board asks for. */
export interface Candidate extends Pick<PublicVersion, 'accession' | 'version' | 'state' | 'frozenAt'> {
  row: Pick<EntryVersion, 'gateClass' | 'register' | 'runSheetId' | 'runSheetKind' | 'endedAt' | 'summary' | 'dataset'> & { device: { id: string } };
}

const nameOf = (c: Candidate): string => versionedAccessionOf(c.accession, c.version);
const place = (c: Candidate): string => JSON.stringify([c.row.gateClass, c.row.device.id, c.row.register]);

/** Later data first; of the same data the version frozen later. */
const isNewer = (a: Candidate, b: Candidate): boolean => {
  const byData = a.row.endedAt.getTime() - b.row.endedAt.getTime();
  if (a.accession === b.accession) return a.version > b.version;
  if (byData !== 0) return byData > 0;
  return a.frozenAt.getTime() !== b.frozenAt.getTime() ? a.frozenAt > b.frozenAt : nameOf(a) > nameOf(b);
};

/** The newest dataset from a random run sheet of the same class, device and register, if it is another than this one. Withdrawn ones do not count. */
const newerThan = (candidate: Candidate, all: readonly Candidate[]): Candidate | null => {
  const rivals = all.filter((other) => other.state !== 'withdrawn' && other.row.runSheetId !== null && other.row.runSheetKind !== 'structured' && place(other) === place(candidate) && isNewer(other, candidate));
  return rivals.reduce<Candidate | null>((newest, other) => (newest === null || isNewer(other, newest) ? other : newest), null);
};

/** Reasons against one version on the board of its class, read by one figure. `all`: public versions of the class. */
export const reasonsAgainst = (candidate: Candidate, all: readonly Candidate[], reading: { key: FigureKey; depth: number | null }): Reason[] => {
  const { row, state } = candidate;
  const newer = newerThan(candidate, all);
  return ineligibility({
    gateClass: gateClassById(row.gateClass),
    runSheet: row.runSheetId ?? null,
    runSheetKind: row.runSheetKind ?? null,
    patches: row.summary.patches.map((patch) => {
      const counted = row.summary.counts.find((c) => c.qubits.join() === patch.qubits.join());
      return { qubits: patch.qubits, complete: patch.complete, sound: patch.sound, rankAmbiguous: patch.rankAmbiguous, settled: patch.settled, circuits: counted?.estimated ?? 0, shots: counted?.minShots ?? 0 };
    }),
    sealedCheck: row.summary.sealedCheck,
    figures: row.summary.figures,
    figure: { ...reading, found: registerFigure(row.summary.figures, reading, row.register.length) },
    newer: newer && nameOf(newer),
    state,
  }, figureDomains);
};
