import { randomBytes } from 'node:crypto';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import type { SheetKind } from '#shared/domain/sheet-kinds.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { canonicalJson, sha256Hex } from '#shared/formats/canonical-json.ts';
import type { RunSheet, Seal } from '#shared/formats/types.ts';
import { drawSheet } from '#shared/runsheet/draw-sheet.ts';
import { openSeal } from '#shared/runsheet/seal.ts';
import type { ThreadProgress } from '#api/jobs/threads.ts';
import { taskFactors, type Factors } from './task-factors.ts';

export interface DrawSheetInput {
  id: string;
  gateClass: string;
  device: { provider: string; name: string };
  register: string[];
  /** Random unless told. */
  kind?: SheetKind;
  circuits: number;
  shots: number;
  drawnAt: string;
}

export type DrawSheetOutput = {
  ok: true;
  /** RFC 8785 bytes, so that the SHA-256 of the file is the content id that a dataset names. */
  bytes: Uint8Array;
  sha256: string;
  seal: Seal;
  /** Circuits to estimate from, as the sheet was asked for: of each pair patch in a chained register. */
  circuits: number;
  sealed: number;
  totalShots: number;
  rank: number;
  conditionRatio: number;
  draws: number;
  /** Factors of the sheet's designs, for its first estimate. */
  factors: Factors;
};

const totals = (sheet: RunSheet): { sealed: number; totalShots: number } => ({
  sealed: sheet.patches.reduce((sum, patch) => sum + patch.sealed, 0),
  totalShots: sheet.patches.reduce((sum, patch) => sum + patch.circuits.length, 0) * sheet.shots,
});

const seedBytes = 32;

/** Where seeds and secrets come from: the operating system, except for the demo registry, which is the same everywhere. */
export type RandomBytes = (length: number) => Uint8Array;

/** Draws a sheet with a fresh seed and fresh secrets. A class without a sound sheet is told in words, not thrown. */
export const drawRunSheetTask = (input: DrawSheetInput, report: (progress: ThreadProgress) => void, random: RandomBytes = randomBytes): DrawSheetOutput | { ok: false; message: string } => {
  const gateClass = gateClassById(input.gateClass);
  if (!gateClass) return { ok: false, message: `There is no gate class ${JSON.stringify(input.gateClass)}.` };
  const store = taskFactors();
  try {
    const drawn = drawSheet({
      gateClass, register: input.register, ...(input.kind ? { kind: input.kind } : {}), circuits: input.circuits, shots: input.shots, seed: Buffer.from(random(seedBytes)).toString('hex'),
      issued: { id: input.id, device: input.device, drawnAt: input.drawnAt },
      newSecret: () => new Uint8Array(random(32)), factors: store,
      onProgress: ({ draws, circuits, fraction }) => report({ stage: `Draw ${draws + 1}, ${circuits} circuits to estimate from`, fraction }),
    });
    if (!drawn.secret) throw new Error('A sheet of the registry was drawn without a seal.');
    const bytes = new TextEncoder().encode(canonicalJson(drawn.sheet));
    const weakest = [...drawn.designs].sort((a, b) => a.conditionRatio - b.conditionRatio)[0];
    return {
      ok: true, bytes, sha256: sha256Hex(bytes), seal: openSeal(drawn.sheet, drawn.secret), circuits: drawn.circuits, ...totals(drawn.sheet),
      rank: Math.max(...drawn.designs.map((d) => d.rank)), conditionRatio: weakest?.conditionRatio ?? 0, draws: drawn.draws, factors: store.made,
    };
  } catch (fault) {
    if (fault instanceof AppError) return { ok: false, message: fault.message };
    throw fault;
  }
};
