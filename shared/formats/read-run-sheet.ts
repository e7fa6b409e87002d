import { gateClassById } from '#shared/domain/gate-classes.ts';
import type { ErrorDetail } from '#shared/errors/app-error.ts';
import { contentIdOf } from '#shared/formats/canonical-json.ts';
import { checkCircuitGates, CircuitIds } from '#shared/formats/check-circuits.ts';
import { checkGateSet } from '#shared/formats/check-dataset.ts';
import { checkPatches } from '#shared/formats/check-patches.ts';
import { checkSchema } from '#shared/formats/check-schema.ts';
import { decodeJson } from '#shared/formats/decode-json.ts';
import { Faults } from '#shared/formats/faults.ts';
import type { FindGateClass } from '#shared/formats/read-dataset.ts';
import type { GateClass, RunSheet } from '#shared/formats/types.ts';

export type RunSheetReading = { ok: true; sheet: RunSheet; contentId: string } | { ok: false; errors: ErrorDetail[] };

/** The rules of a run sheet that its schema cannot state. */
export function checkRunSheet(sheet: RunSheet, gateClass: GateClass | null): ErrorDetail[] {
  const faults = new Faults();
  checkGateSet(sheet.gates, sheet.register.length, gateClass, faults);
  checkPatches(sheet.patches, sheet.register, faults);
  const declared = new Map(sheet.gates.map((gate) => [gate.label, gate]));
  const ids = new CircuitIds();
  sheet.patches.forEach(({ qubits, circuits, sealed }, p) => {
    const used = new Set<string>();
    if (sealed > circuits.length) faults.add(['patches', p, 'sealed'], `${sealed} circuits cannot be sealed; the patch has ${circuits.length}.`);
    if (sealed > 0 && sheet.sealSha256 === null) faults.add(['patches', p, 'sealed'], `${sealed} circuits are sealed, but the sheet has no sealSha256 to commit to which.`);
    for (let c = 0; c < circuits.length && !faults.full; c++) {
      const circuit = circuits[c];
      if (!circuit) continue;
      ids.check(circuit.id, ['patches', p, 'circuits', c], faults);
      checkCircuitGates(circuit.gates, qubits, declared, ['patches', p, 'circuits', c], faults, used);
    }
  });
  return faults.list;
}

/** Reads a run sheet. `contentId` is what a dataset names in `runSheet.sha256`. */
export function readRunSheet(bytes: Uint8Array, find: FindGateClass = gateClassById): RunSheetReading {
  const decoded = decodeJson(bytes);
  if (!decoded.ok) return decoded;
  const schemaErrors = checkSchema('runSheet', decoded.value);
  if (schemaErrors.length > 0) return { ok: false, errors: schemaErrors };
  const sheet = decoded.value as unknown as RunSheet;
  const errors = checkRunSheet(sheet, find(sheet.gateClass));
  return errors.length > 0 ? { ok: false, errors } : { ok: true, sheet, contentId: contentIdOf(sheet) };
}
