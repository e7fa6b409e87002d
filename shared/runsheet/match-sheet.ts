import type { ErrorDetail } from '#shared/errors/app-error.ts';
import { contentIdOf } from '#shared/formats/canonical-json.ts';
import { Faults } from '#shared/formats/faults.ts';
import { matchGates } from '#shared/formats/match-gates.ts';
import { shown } from '#shared/formats/pointer.ts';
import type { Dataset, RunSheet } from '#shared/formats/types.ts';

const keyOf = (qubits: readonly number[]): string => [...qubits].sort((a, b) => a - b).join(',');
const few = (ids: readonly string[]): string => `${ids.slice(0, 5).map(shown).join(', ')}${ids.length > 5 ? ` and ${ids.length - 5} more` : ''}`;

function matchHead(dataset: Dataset, sheet: RunSheet, faults: Faults): void {
  if (dataset.runSheet?.id !== sheet.id) faults.add(['runSheet'], `The dataset names the run sheet ${shown(dataset.runSheet?.id)}; this is ${shown(sheet.id)}.`);
  const sha256 = contentIdOf(sheet);
  if (dataset.runSheet && dataset.runSheet.sha256 !== sha256) faults.add(['runSheet', 'sha256'], `The content id of ${shown(sheet.id)} is ${sha256}, not ${dataset.runSheet.sha256}.`);
  if (dataset.gateClass !== sheet.gateClass) faults.add(['gateClass'], `The sheet was drawn for the gate class ${shown(sheet.gateClass)}; the dataset says ${shown(dataset.gateClass)}.`);
  if (sheet.device && (sheet.device.provider !== dataset.device.provider || sheet.device.name !== dataset.device.name)) {
    faults.add(['device'], `The sheet was drawn for ${shown(sheet.device.name)} of ${shown(sheet.device.provider)}; the dataset says ${shown(dataset.device.name)} of ${shown(dataset.device.provider)}.`);
  }
  if (dataset.register.length !== sheet.register.length || dataset.register.some((name, q) => name !== sheet.register[q])) {
    faults.add(['register'], `The sheet was drawn for the register ${few(sheet.register)}; the dataset has ${few(dataset.register)}.`);
  }
}

type Circuits = readonly { id: string; gates: readonly string[] }[];

/** One patch, circuit by circuit; sheet labels are told in the words of the dataset. */
function matchPatch(dataset: Dataset, d: number, sheetCircuits: Circuits, shots: number, labels: ReadonlyMap<string, string>, faults: Faults): void {
  const patch = dataset.patches[d];
  if (!patch) return;
  const wanted = new Map(sheetCircuits.map((circuit) => [circuit.id, circuit]));
  patch.circuits.forEach((circuit, c) => {
    const path = ['patches', d, 'circuits', c];
    const drawn = wanted.get(circuit.id);
    wanted.delete(circuit.id);
    if (!drawn) {
      faults.add([...path, 'id'], `The sheet has no circuit ${shown(circuit.id)} in this patch.`);
      return;
    }
    const same = drawn.gates.length === circuit.gates.length && drawn.gates.every((label, g) => labels.get(label) === circuit.gates[g]);
    if (!same) faults.add([...path, 'gates'], `The gates of ${shown(circuit.id)} are not those of the sheet, ${shown(drawn.gates.map((label) => labels.get(label) ?? label).join(' '))}.`);
    if (circuit.shots !== shots) faults.add([...path, 'shots'], `The sheet asks for ${shots} shots of every circuit; ${shown(circuit.id)} has ${circuit.shots}.`);
  });
  const absent = [...wanted.keys()];
  if (absent.length > 0) faults.add(['patches', d, 'circuits'], `${absent.length} ${absent.length === 1 ? 'circuit' : 'circuits'} of the sheet ${absent.length === 1 ? 'is' : 'are'} missing: ${few(absent)}.`);
}

/**
 * Was the sheet run as it was drawn? Compares number and content id, class, device, register, gates (by what they do),
 * patches, and every circuit by id, gates and shots. Pointers are into the dataset; at most 50 faults, none = matched.
 */
export function matchSheet(dataset: Dataset, sheet: RunSheet): ErrorDetail[] {
  const faults = new Faults();
  matchHead(dataset, sheet, faults);
  const { labels, missing, surplus } = matchGates(sheet.gates, dataset.gates);
  for (const gate of missing) faults.add(['gates'], `The sheet's gate ${shown(gate.label)} is not declared in the dataset.`);
  for (const g of surplus) faults.add(['gates', g], `The gate ${shown(dataset.gates[g]?.label)} is not on the sheet.`);
  const places = new Map(dataset.patches.map(({ qubits }, d) => [keyOf(qubits), d]));
  for (const { qubits, circuits } of sheet.patches) {
    const d = places.get(keyOf(qubits));
    places.delete(keyOf(qubits));
    if (d === undefined) faults.add(['patches'], `The sheet's patch of qubits ${qubits.join(', ')} is missing.`);
    else matchPatch(dataset, d, circuits, sheet.shots, labels, faults);
  }
  for (const d of places.values()) faults.add(['patches', d], `The sheet has no patch of these qubits.`);
  return faults.list;
}
