import { gateClassById } from '#shared/domain/gate-classes.ts';
import type { ErrorDetail } from '#shared/errors/app-error.ts';
import { contentIdOf, sha256Hex } from '#shared/formats/canonical-json.ts';
import { checkDataset } from '#shared/formats/check-dataset.ts';
import { checkSchema } from '#shared/formats/check-schema.ts';
import { decodeJson } from '#shared/formats/decode-json.ts';
import type { Dataset, GateClass } from '#shared/formats/types.ts';

/** Finds a gate class; classes made later than the shipped ones are given by whoever keeps them. */
export type FindGateClass = (id: string) => GateClass | null;

export type DatasetReading =
  | { ok: true; dataset: Dataset; contentId: string; bytesSha256: string; gateClass: GateClass | null }
  | { ok: false; errors: ErrorDetail[] };

/**
 * Reads a dataset from the bytes of its (unpacked) file: strict JSON, then the schema, then the rules beyond it.
 * The next step is taken only where the one before found nothing, so that no fault is told twice.
 * `contentId` names the data whatever its spelling, `bytesSha256` the file as it is.
 */
export function readDataset(bytes: Uint8Array, find: FindGateClass = gateClassById): DatasetReading {
  const decoded = decodeJson(bytes);
  if (!decoded.ok) return decoded;
  const schemaErrors = checkSchema('dataset', decoded.value);
  if (schemaErrors.length > 0) return { ok: false, errors: schemaErrors };
  const dataset = decoded.value as unknown as Dataset;
  const gateClass = dataset.gateClass === 'custom' ? null : find(dataset.gateClass);
  const errors = checkDataset(dataset, gateClass);
  if (errors.length > 0) return { ok: false, errors };
  return { ok: true, dataset, contentId: contentIdOf(dataset), bytesSha256: sha256Hex(bytes), gateClass };
}
