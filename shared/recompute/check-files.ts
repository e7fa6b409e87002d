import { canonicalJson, sha256Hex } from '#shared/formats/canonical-json.ts';
import { checkSchema } from '#shared/formats/check-schema.ts';
import { decodeJson } from '#shared/formats/decode-json.ts';
import { readDataset } from '#shared/formats/read-dataset.ts';
import { readRunSheet } from '#shared/formats/read-run-sheet.ts';
import { readSeal } from '#shared/formats/read-seal.ts';
import type { Dataset, Result, Seal } from '#shared/formats/types.ts';
import { matchSheet } from '#shared/runsheet/match-sheet.ts';
import { checkSeal } from '#shared/runsheet/seal.ts';
import { findMethod, methodVersions } from '#shared/method/versions.ts';
import type { FileCheck, FrozenFiles, RecordedDigests, Recomputable } from './types.ts';

/** All replicates of all figures are held in memory; no entry was ever frozen with more. */
export const mostReplicates = 50_000;

type Errors = readonly { pointer: string; message: string }[];
const told = (errors: Errors): string => `${errors[0]?.pointer ? `${errors[0].pointer}: ` : ''}${errors[0]?.message ?? ''}${errors.length > 1 ? ` (and ${errors.length - 1} more)` : ''}`;

/** A digest beside the recorded one. */
export function checkDigest(id: string, title: string, recorded: string, found: string): FileCheck {
  return { id, title, outcome: recorded === found ? 'agrees' : 'differs', detail: recorded === found ? found : `recorded ${recorded}, found ${found}` };
}

const faulty = (id: string, title: string, detail: string): FileCheck => ({ id, title, outcome: 'differs', detail });

function readResult(bytes: Uint8Array): { result: Result } | { fault: string } {
  const decoded = decodeJson(bytes);
  if (!decoded.ok) return { fault: told(decoded.errors) };
  const errors = checkSchema('result', decoded.value);
  if (errors.length > 0) return { fault: told(errors) };
  const result = decoded.value as unknown as Result;
  if (result.replicates > mostReplicates) return { fault: `/replicates: ${result.replicates} replicates are more than the ${mostReplicates} that can be made.` };
  if (!findMethod(result.method)) return { fault: `/method: The method ${JSON.stringify(result.method)} is not known to this program, which has ${methodVersions.map((m) => m.id).join(', ')}. A newer one is needed.` };
  return { result };
}

/** The seal opens by itself, belongs to the dataset, and (with the sheet) is the one that was committed to. */
function checkSealFile(files: FrozenFiles, dataset: Dataset, result: Result): { checks: FileCheck[]; seal: Seal | null; usable: boolean } {
  const title = 'seal against its commitment';
  if (!files.seal) {
    if (result.sealed === 0) return { checks: [{ id: 'seal', title, outcome: 'left-out', detail: 'the entry has no sealed circuits' }], seal: null, usable: true };
    return { checks: [faulty('seal', title, `the result keeps ${result.sealed} circuits out of the estimate, but there is no seal`)], seal: null, usable: false };
  }
  const reading = readSeal(files.seal, dataset);
  if (!reading.ok) return { checks: [faulty('seal', title, told(reading.errors))], seal: null, usable: false };
  const { seal } = reading;
  if (!files.runSheet) return { checks: [{ id: 'seal', title: 'seal', outcome: 'agrees', detail: `the secret fits its own digest and chooses these ${seal.sealed.length} circuits; the run sheet is not here to compare with` }], seal, usable: true };
  const sheet = readRunSheet(files.runSheet);
  if (!sheet.ok) return { checks: [faulty('run-sheet', 'run sheet', told(sheet.errors))], seal, usable: true };
  const errors = checkSeal(seal, sheet.sheet);
  const missed = matchSheet(dataset, sheet.sheet);
  return {
    checks: [
      checkDigest('run-sheet', 'content id of the run sheet, as the dataset names it', dataset.runSheet?.sha256 ?? '', sheet.contentId),
      missed.length === 0 ? { id: 'sheet-match', title: 'dataset against its run sheet', outcome: 'agrees', detail: 'every circuit of the sheet, with its shots, and none besides' } : faulty('sheet-match', 'dataset against its run sheet', told(missed)),
      errors.length === 0 ? { id: 'seal', title, outcome: 'agrees', detail: `the secret fits the digest printed on ${seal.runSheet} and chooses these ${seal.sealed.length} circuits` } : faulty('seal', title, told(errors)),
    ],
    seal, usable: true,
  };
}

/** Holds the files to the recorded digests and to one another. `ready` is null where nothing can be estimated from them. */
export function checkFiles(files: FrozenFiles, recorded: RecordedDigests): { checks: FileCheck[]; ready: Recomputable | null } {
  const checks = [checkDigest('dataset-bytes', 'SHA-256 of the dataset as it was sent', recorded.bytesSha256, sha256Hex(files.dataset)), checkDigest('result-bytes', 'SHA-256 of the frozen result', recorded.resultSha256, sha256Hex(files.result))];
  if (files.replicates) checks.push(checkDigest('replicates-bytes', 'SHA-256 of the frozen replicates', recorded.replicatesSha256, sha256Hex(files.replicates)));
  const reading = readDataset(files.dataset);
  if (!reading.ok) return { checks: [...checks, faulty('dataset', 'dataset', told(reading.errors))], ready: null };
  const { dataset, contentId, gateClass } = reading;
  checks.push(checkDigest('content-id', 'content id', recorded.contentId, contentId));
  const read = readResult(files.result);
  if ('fault' in read) return { checks: [...checks, faulty('result', 'frozen result', read.fault)], ready: null };
  const { result } = read;
  checks.push(checkDigest('result-dataset', 'dataset that the result names', result.datasetSha256, contentId));
  const canonical = canonicalJson(result) === new TextDecoder().decode(files.result);
  checks.push({ id: 'result-form', title: 'canonical form of the frozen result', outcome: canonical ? 'agrees' : 'differs', detail: canonical ? 'RFC 8785' : 'the file is not in the form of RFC 8785' });
  const sealed = checkSealFile(files, dataset, result);
  return { checks: [...checks, ...sealed.checks], ready: sealed.usable ? { dataset, contentId, gateClass, seal: sealed.seal, result } : null };
}
