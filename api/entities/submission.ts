import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import type { Check } from '#shared/contracts/common.ts';
import type { SubmissionState } from '#shared/domain/life-cycle.ts';
import { instant } from './columns.ts';
import { Device } from './device.ts';
import { Organisation } from './organisation.ts';
import { RunSheet } from './run-sheet.ts';
import { User } from './user.ts';

/** A dataset on its way into the record: where it stands now. Files, estimates, moves and messages are rows of append-only tables. */
export const Submission = defineEntity({
  name: 'Submission',
  tableName: 'submission',
  properties: {
    /** "S-000218" */
    id: p.string().primary(),
    organisation: () => p.manyToOne(Organisation).ref(),
    device: () => p.manyToOne(Device).ref().nullable(),
    runSheet: () => p.manyToOne(RunSheet).ref().nullable(),
    /** Accession of the entry that this dataset corrects. */
    correctionOf: p.string().nullable(),
    state: p.string().$type<SubmissionState>(),
    /** 1 for the first file, one more with every replacement. */
    round: p.integer(),
    title: p.string(),
    gateClass: p.string(),
    register: p.json<string[]>(),
    fileId: p.uuid(),
    contentId: p.string(),
    createdBy: () => p.manyToOne(User).ref(),
    createdAt: instant(),
    changedAt: instant(),
    access: p.text().nullable(),
    interests: p.text().nullable(),
    embargoUntil: p.date().nullable(),
    notes: p.text().nullable(),
    progress: p.double().$type<number>(),
    stage: p.string().nullable(),
    replicatesDone: p.integer().nullable(),
    replicates: p.integer(),
    checks: p.json<Check[]>(),
    estimateId: p.uuid().nullable(),
    claimedBy: () => p.manyToOne(User).ref().nullable(),
    claimedAt: instant().nullable(),
    sentAt: instant().nullable(),
    accession: p.string().nullable(),
    version: p.integer().nullable(),
    demo: p.boolean().default(false),
  },
});
export type Submission = InferEntity<typeof Submission>;
