import type { Check } from '#shared/contracts/common.ts';
import { checksOfFile, type SheetStanding } from '#shared/domain/checks.ts';
import type { Dataset, RunSheet, Seal } from '#shared/formats/types.ts';
import { checkSeal } from '#shared/runsheet/seal.ts';
import { matchSheet } from '#shared/runsheet/match-sheet.ts';
import { readStored } from './read-stored.ts';

export interface CheckDatasetInput {
  bytes: Uint8Array;
  device: { found: boolean; sentence: string };
  /** The sheet named by the file, with its seal; null where the file names none. */
  sheet: { id: string; file: RunSheet; seal: Seal } | { id: string; why: string } | null;
}

const standing = (dataset: Dataset, sheet: CheckDatasetInput['sheet']): SheetStanding => {
  if (sheet === null) return { kind: 'own-design' };
  if ('why' in sheet) return { kind: 'refused', id: sheet.id, why: sheet.why };
  const sealFault = checkSeal(sheet.seal, sheet.file)[0];
  if (sealFault) throw new Error(`The seal of ${sheet.id} does not fit its sheet: ${sealFault.message}`);
  const faults = matchSheet(dataset, sheet.file);
  const first = faults[0];
  if (!first) return { kind: 'matched', id: sheet.id };
  return { kind: 'refused', id: sheet.id, why: `${first.pointer}: ${first.message}${faults.length > 1 ? ` And ${faults.length - 1} more.` : ''}` };
};

/** What can be said before the estimate: format, counts, device, run sheet circuit by circuit, floor. */
export const checkDataset = ({ bytes, device, sheet }: CheckDatasetInput): Check[] => {
  const { dataset, gateClass } = readStored(bytes);
  const found = standing(dataset, sheet);
  const sealed = new Set(found.kind === 'matched' && sheet && 'seal' in sheet ? sheet.seal.sealed : []);
  return checksOfFile({ dataset, bytes: bytes.byteLength, gateClass, device, sheet: found, sealed });
};
