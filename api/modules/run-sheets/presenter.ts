import type { RunSheetView } from '#shared/contracts/run-sheets.ts';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { isLive, submissionStates } from '#shared/domain/life-cycle.ts';
import type { EntityManager } from '@mikro-orm/postgresql';
import type { RunSheet } from '#api/entities/run-sheet.ts';
import { Submission } from '#api/entities/submission.ts';
import { presentDevice } from '#api/modules/devices/presenter.ts';
import { presentClassRef } from '#api/modules/gate-classes/presenter.ts';

const liveStates = submissionStates.filter(isLive);

/** Which live submission uses each of these sheets; the first one where a correction uses it again. */
export const usersOf = async (em: EntityManager, sheets: readonly RunSheet[]): Promise<Map<string, string>> => {
  const rows = await em.find(Submission, { runSheet: { $in: sheets.map((s) => s.id) }, state: { $in: liveStates } }, { fields: ['id', 'runSheet'], orderBy: { id: 'desc' } });
  return new Map(rows.flatMap((row) => (row.runSheet ? [[row.runSheet.id, row.id] as const] : [])));
};

/** A run sheet as its organisation sees it. Device, its organisation and the person must be loaded. */
export const presentRunSheet = (s: RunSheet, submission: string | null): RunSheetView => ({
  id: s.id,
  state: s.state,
  progress: s.progress,
  message: s.message ?? null,
  device: presentDevice(s.device.unwrap()),
  gateClass: presentClassRef(s.gateClass) ?? { id: s.gateClass, title: gateClassById(s.gateClass)?.title ?? s.gateClass, ranked: false },
  register: s.register,
  kind: s.kind,
  circuitsAsked: s.circuitsAsked,
  circuits: s.circuits ?? null,
  sealed: s.sealed ?? null,
  shots: s.shots,
  totalShots: s.totalShots ?? null,
  rank: s.rank ?? null,
  conditionRatio: s.conditionRatio ?? null,
  draws: s.draws ?? null,
  sheetSha256: s.sheetSha256 ?? null,
  sealSha256: s.sealSha256 ?? null,
  createdBy: s.createdBy.unwrap().name,
  createdAt: s.createdAt.toISOString(),
  drawnAt: s.drawnAt?.toISOString() ?? null,
  file: s.state === 'drawn' ? `/api/v1/run-sheets/${s.id}/file` : null,
  submission,
});
