import type { ErrorDetail } from '#shared/errors/app-error.ts';
import { checkCircuitGates, CircuitIds } from '#shared/formats/check-circuits.ts';
import { checkSchema } from '#shared/formats/check-schema.ts';
import { decodeJson } from '#shared/formats/decode-json.ts';
import { Faults } from '#shared/formats/faults.ts';
import type { CircuitsFile, Dataset } from '#shared/formats/types.ts';

export type CircuitsReading = { ok: true; circuits: CircuitsFile } | { ok: false; errors: ErrorDetail[] };

/** Joint data predicts on its patch as it stands; chained data on any qubits of the register. */
function checkQubits(qubits: readonly number[], dataset: Pick<Dataset, 'register' | 'patches'>, path: (string | number)[], faults: Faults): void {
  const [patch, second] = dataset.patches;
  if (patch && !second) {
    if (qubits.join() !== patch.qubits.join()) faults.add([...path, 'qubits'], `The qubits must be those of the patch, [${patch.qubits.join(', ')}] in this order; they are [${qubits.slice(0, 8).join(', ')}${qubits.length > 8 ? ', …' : ''}].`);
    return;
  }
  qubits.forEach((qubit, k) => {
    if (qubit >= dataset.register.length) faults.add([...path, 'qubits', k], `${qubit} is no index of the register, which has ${dataset.register.length} qubits, numbered from 0.`);
  });
}

/** The rules of a circuits file that its schema cannot state, beside the dataset it is used with. */
export function checkCircuits(file: CircuitsFile, dataset: Pick<Dataset, 'register' | 'patches' | 'gates'>): ErrorDetail[] {
  const faults = new Faults();
  const ids = new CircuitIds();
  const declared = new Map(dataset.gates.map((gate) => [gate.label, gate]));
  for (let c = 0; c < file.circuits.length && !faults.full; c++) {
    const circuit = file.circuits[c];
    if (!circuit) continue;
    ids.check(circuit.id, ['circuits', c], faults);
    checkQubits(circuit.qubits, dataset, ['circuits', c], faults);
    checkCircuitGates(circuit.gates, circuit.qubits, declared, ['circuits', c], faults);
  }
  return faults.list;
}

/** Reads a file of circuits to predict, for use with a dataset that has been read. */
export function readCircuits(bytes: Uint8Array, dataset: Pick<Dataset, 'register' | 'patches' | 'gates'>): CircuitsReading {
  const decoded = decodeJson(bytes);
  if (!decoded.ok) return decoded;
  const schemaErrors = checkSchema('circuits', decoded.value);
  if (schemaErrors.length > 0) return { ok: false, errors: schemaErrors };
  const circuits = decoded.value as unknown as CircuitsFile;
  const errors = checkCircuits(circuits, dataset);
  return errors.length > 0 ? { ok: false, errors } : { ok: true, circuits };
}
