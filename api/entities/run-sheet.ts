import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import type { SheetKind } from '#shared/domain/sheet-kinds.ts';
import { instant } from './columns.ts';
import { Device } from './device.ts';
import { Organisation } from './organisation.ts';
import { User } from './user.ts';

export const runSheetStates = ['waiting', 'drawing', 'drawn', 'failed'] as const;

/** A run sheet asked for, being drawn, or drawn. Its file and its secret lie in tables of their own. */
export const RunSheet = defineEntity({
  name: 'RunSheet',
  tableName: 'run_sheet',
  properties: {
    /** "RS-000123" */
    id: p.string().primary(),
    organisation: () => p.manyToOne(Organisation).ref(),
    device: () => p.manyToOne(Device).ref(),
    gateClass: p.string(),
    register: p.json<string[]>(),
    kind: p.string().$type<SheetKind>().default('random'),
    circuitsAsked: p.integer(),
    shots: p.integer(),
    state: p.string().$type<(typeof runSheetStates)[number]>(),
    progress: p.double().$type<number>(),
    message: p.text().nullable(),
    createdBy: () => p.manyToOne(User).ref(),
    createdAt: instant(),
    drawnAt: instant().nullable(),
    /** What was drawn; null before. */
    circuits: p.integer().nullable(),
    sealed: p.integer().nullable(),
    totalShots: p.bigint('number').nullable(),
    rank: p.integer().nullable(),
    conditionRatio: p.double().$type<number>().nullable(),
    draws: p.integer().nullable(),
    sheetSha256: p.string().fieldName('sheet_sha256').nullable(),
    sealSha256: p.string().fieldName('seal_sha256').nullable(),
  },
});
export type RunSheet = InferEntity<typeof RunSheet>;
