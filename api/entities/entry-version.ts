import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import type { Check } from '#shared/contracts/common.ts';
import type { Message } from '#shared/contracts/submissions.ts';
import type { SealedPoint } from '#shared/contracts/entries.ts';
import type { DatasetSummary } from '#api/modules/submissions/dataset-summary.ts';
import type { ResultSummary } from '#api/modules/submissions/result-summary.ts';
import type { SheetKind } from '#shared/domain/sheet-kinds.ts';
import { instant, uuidKey } from './columns.ts';
import { Device } from './device.ts';
import { Organisation } from './organisation.ts';

/** What the review left behind for the record. */
export interface ReviewSummary {
  reviewedAt: string;
  note: string;
  round: number;
  checks: Check[];
  messages: Message[];
  access: string | null;
  interests: string | null;
  notes: string | null;
}

/** One frozen version of an entry: whatever its page says. Append-only. Bytes and seal lie in entry_bytes. */
export const EntryVersion = defineEntity({
  name: 'EntryVersion',
  tableName: 'entry_version',
  properties: {
    id: uuidKey(),
    accession: p.string(),
    version: p.integer(),
    submissionId: p.string(),
    decisionId: p.uuid(),
    organisation: () => p.manyToOne(Organisation).ref(),
    device: () => p.manyToOne(Device).ref(),
    gateClass: p.string(),
    register: p.json<string[]>(),
    runSheetId: p.string().nullable(),
    /** How the circuits of that sheet were drawn. Read from the sheet, which does not change once it is drawn. */
    runSheetKind: p.string().$type<SheetKind>().formula((alias) => `(select s.kind from run_sheet s where s.id = ${alias}.run_sheet_id)`).nullable(),
    title: p.string(),
    method: p.string(),
    replicates: p.integer(),
    fileName: p.string(),
    fileSize: p.integer(),
    contentId: p.string(),
    bytesSha256: p.string().fieldName('bytes_sha256'),
    resultSha256: p.string().fieldName('result_sha256'),
    replicatesSha256: p.string().fieldName('replicates_sha256'),
    /** Last circuit run. */
    endedAt: instant(),
    dataset: p.json<DatasetSummary>(),
    summary: p.json<ResultSummary>(),
    sealedPoints: p.json<SealedPoint[]>(),
    review: p.json<ReviewSummary>(),
    sealed: p.boolean(),
    acceptedAt: instant(),
    embargoUntil: p.date().nullable(),
    demo: p.boolean().default(false),
  },
});
export type EntryVersion = InferEntity<typeof EntryVersion>;
