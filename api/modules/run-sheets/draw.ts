import { LockMode } from '@mikro-orm/core';
import { AppError } from '#shared/errors/app-error.ts';
import { RunSheet } from '#api/entities/run-sheet.ts';
import { recordAudit } from '#api/lib/audit.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { inTransaction, type Work } from '#api/lib/work.ts';
import type { DrawSheetOutput } from '#api/jobs/tasks/draw-sheet.ts';
import { keepFactors } from './factor-store.ts';
import { findRunSheet } from './service.ts';

export interface DrawOptions {
  signal?: AbortSignal;
  onProgress?: (report: { stage: string; fraction: number }) => void;
}

/** Takes the row while it still waits to be drawn; null where that is done, so that a second attempt does nothing. */
const lockUndrawn = async ({ em }: Work, id: string): Promise<RunSheet | null> =>
  em.findOne(RunSheet, { id, state: { $in: ['waiting', 'drawing'] } }, { lockMode: LockMode.PESSIMISTIC_WRITE, refresh: true });

const keep = (work: Work, id: string, drawnAt: Date, drawn: DrawSheetOutput): Promise<boolean> =>
  inTransaction(work, async (tx) => {
    const sheet = await lockUndrawn(tx, id);
    if (!sheet) return false;
    tx.em.assign(sheet, {
      state: 'drawn', progress: 1, message: null, drawnAt, circuits: drawn.circuits, sealed: drawn.sealed, totalShots: drawn.totalShots, rank: drawn.rank, conditionRatio: drawn.conditionRatio, draws: drawn.draws,
      sheetSha256: drawn.sha256, sealSha256: drawn.seal.sealSha256,
    });
    await runSql(tx.em, 'insert into run_sheet_file (run_sheet_id, bytes, sha256) values ($1, $2, $3)', [id, drawn.bytes, drawn.sha256]);
    await runSql(tx.em, 'insert into run_sheet_secret (run_sheet_id, seal) values ($1, $2)', [id, JSON.stringify(drawn.seal)]);
    await keepFactors(tx.em, id, drawn.factors, drawnAt);
    recordAudit(tx.em, { at: drawnAt, action: 'run-sheet.draw', subjectType: 'run-sheet', subjectId: id, organisationId: sheet.organisation.id, detail: { sheetSha256: drawn.sha256, sealSha256: drawn.seal.sealSha256, circuits: drawn.circuits, draws: drawn.draws } });
    return true;
  });

/** No sheet could be drawn: the row says why. */
export const giveUpRunSheet = (work: Work, id: string, message: string): Promise<void> =>
  inTransaction(work, async (tx) => {
    const sheet = await lockUndrawn(tx, id);
    if (!sheet) return;
    tx.em.assign(sheet, { state: 'failed', message });
    recordAudit(tx.em, { at: tx.clock.now(), action: 'run-sheet.fail', subjectType: 'run-sheet', subjectId: id, organisationId: sheet.organisation.id, detail: { message } });
  });

/**
 * Draws a run sheet: circuits and seal in a thread, then sheet, secret and row in one transaction. The seed and the secret
 * are fresh for every attempt and kept only with the sheet. Returns false where there was nothing to do.
 */
export const drawRunSheet = async (work: Work, id: string, options: DrawOptions = {}): Promise<boolean> => {
  const sheet = await findRunSheet({ em: work.em.fork() }, id);
  if (sheet.state === 'drawn' || sheet.state === 'failed') return false;
  await work.em.fork().nativeUpdate(RunSheet, { id, state: { $in: ['waiting', 'drawing'] } }, { state: 'drawing', progress: 0 });
  const drawnAt = work.clock.now();
  const device = sheet.device.unwrap();
  try {
    const drawn = await work.runInThread(
      'draw-sheet',
      { id, gateClass: sheet.gateClass, device: { provider: device.organisation.unwrap().name, name: device.name }, register: sheet.register, ...(sheet.kind === 'random' ? {} : { kind: sheet.kind }), circuits: sheet.circuitsAsked, shots: sheet.shots, drawnAt: drawnAt.toISOString() },
      { ...(options.signal ? { signal: options.signal } : {}), ...(options.onProgress ? { onProgress: options.onProgress } : {}) },
    );
    if (drawn.ok) return await keep(work, id, drawnAt, drawn);
    await giveUpRunSheet(work, id, drawn.message);
    return true;
  } catch (fault) {
    if (!(fault instanceof AppError)) throw fault;
    await giveUpRunSheet(work, id, fault.message);
    return true;
  }
};
