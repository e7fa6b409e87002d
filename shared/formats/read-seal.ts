import type { ErrorDetail } from '#shared/errors/app-error.ts';
import { checkSchema } from '#shared/formats/check-schema.ts';
import { decodeJson } from '#shared/formats/decode-json.ts';
import { shown } from '#shared/formats/pointer.ts';
import type { Dataset, Seal } from '#shared/formats/types.ts';
import { checkSealOnPatches } from '#shared/runsheet/seal.ts';

export type SealReading = { ok: true; seal: Seal } | { ok: false; errors: ErrorDetail[] };

/** Reads an opened seal for use with a dataset that has been read: same run sheet, circuits that exist, chosen by the secret. */
export function readSeal(bytes: Uint8Array, dataset: Pick<Dataset, 'runSheet' | 'patches'>): SealReading {
  const decoded = decodeJson(bytes);
  if (!decoded.ok) return decoded;
  const schemaErrors = checkSchema('seal', decoded.value);
  if (schemaErrors.length > 0) return { ok: false, errors: schemaErrors };
  const seal = decoded.value as unknown as Seal;
  if (seal.runSheet !== dataset.runSheet?.id) {
    const named = dataset.runSheet ? `names the run sheet ${shown(dataset.runSheet.id)}` : 'names no run sheet';
    return { ok: false, errors: [{ pointer: '/runSheet', message: `The seal is for the run sheet ${shown(seal.runSheet)}, but the dataset ${named}.` }] };
  }
  const errors = checkSealOnPatches(seal, dataset.patches);
  return errors.length > 0 ? { ok: false, errors } : { ok: true, seal };
}
