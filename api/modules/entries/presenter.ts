import type { Entry, EntryItem } from '#shared/contracts/entries.ts';
import { boardReadings, headlineOf } from '#shared/domain/board-figures.ts';
import type { Reason } from '#shared/domain/eligibility.ts';
import type { EntryVersion } from '#api/entities/entry-version.ts';
import { presentDevice } from '#api/modules/devices/presenter.ts';
import { presentClassRef } from '#api/modules/gate-classes/presenter.ts';
import type { FrozenVersion } from './load.ts';
import type { PublicVersion } from './public-entries.ts';

/** The reading in which an entry's own page tells of its standing. */
export const pageReading = boardReadings['retained-signal-16'];

const classTitle = (id: string): string => presentClassRef(id)?.title ?? (id === 'custom' ? 'Gates of the contributor’s own choice' : id);

export type ItemRow = Pick<EntryVersion, 'title' | 'gateClass' | 'device' | 'demo'>;

export const presentItem = ({ accession, version, state, frozenAt, row }: PublicVersion & { row: ItemRow }): EntryItem => ({
  accession,
  version,
  state,
  title: row.title,
  gateClass: row.gateClass,
  gateClassTitle: classTitle(row.gateClass),
  device: presentDevice(row.device.unwrap()),
  frozenAt: frozenAt.toISOString(),
  demo: row.demo,
});

const countsOf = ({ dataset, summary }: EntryVersion): Entry['circuits'] => {
  const sum = (values: number[]): number => values.reduce((a, b) => a + b, 0);
  return {
    estimated: sum(summary.counts.map((c) => c.estimated)),
    sealed: summary.sealed,
    shots: sum(dataset.patches.map((p) => p.shots)),
    minLength: Math.min(...dataset.patches.map((p) => p.minLength)),
    maxLength: Math.max(...dataset.patches.map((p) => p.maxLength)),
    minShots: Math.min(...dataset.patches.map((p) => p.minShots)),
    maxShots: Math.max(...dataset.patches.map((p) => p.maxShots)),
  };
};

const provenanceOf = (row: EntryVersion): Entry['provenance'] => ({
  contributors: row.dataset.contributors,
  organisation: row.organisation.unwrap().name,
  firmware: row.dataset.device.firmware,
  runSheet: row.runSheetId ?? null,
  startedAt: row.dataset.startedAt,
  endedAt: row.dataset.endedAt,
  software: row.dataset.software,
  notes: row.dataset.notes,
  licence: row.dataset.licence,
  fileName: row.fileName,
  bytes: row.fileSize,
  contentId: row.contentId,
  bytesSha256: row.bytesSha256,
  resultSha256: row.resultSha256,
  replicatesSha256: row.replicatesSha256,
  reviewedAt: row.review.reviewedAt,
  reviewNote: row.review.note,
});

/** A version's page. `versions`: all public versions of the accession, newest first. */
export const presentEntry = (shown: FrozenVersion, versions: readonly FrozenVersion[], eligibility: Reason[], withdrawal: Entry['withdrawal']): Entry => {
  const { row, accession, version } = shown;
  const api = `/api/v1/entries/${accession}/v/${version}`;
  const { summary } = row;
  return {
    ...presentItem(shown),
    class: presentClassRef(row.gateClass) ?? { id: row.gateClass, title: classTitle(row.gateClass), ranked: false },
    register: row.register,
    gates: row.dataset.gates,
    headline: headlineOf(summary.figures, row.register.length),
    method: row.method,
    replicates: row.replicates,
    figures: summary.figures,
    warnings: summary.warnings,
    patches: summary.patches,
    longestCircuit: Math.max(0, ...summary.counts.map((c) => c.longest)),
    circuits: countsOf(row),
    sealedCheck: summary.sealedCheck,
    sealedPoints: row.sealedPoints,
    provenance: provenanceOf(row),
    eligibility,
    withdrawal,
    versions: versions.map((v) => ({ version: v.version, frozenAt: v.frozenAt.toISOString(), method: v.row.method, state: v.state, headline: headlineOf(v.row.summary.figures, v.row.register.length) })),
    links: { dataset: `${api}/dataset`, result: `${api}/result`, replicates: `${api}/replicates`, seal: row.sealed ? `${api}/seal` : null, runSheet: row.runSheetId ? `${api}/run-sheet` : null, archive: `${api}/archive`, page: `/entries/${accession}/v/${version}` },
  };
};
