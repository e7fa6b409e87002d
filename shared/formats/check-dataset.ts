import type { ErrorDetail } from '#shared/errors/app-error.ts';
import { checkCircuitGates, checkCounts, CircuitIds } from '#shared/formats/check-circuits.ts';
import { checkClass } from '#shared/formats/check-class.ts';
import { checkGates } from '#shared/formats/check-gates.ts';
import { checkPatches } from '#shared/formats/check-patches.ts';
import { checkContributors, checkLicence, checkTimes } from '#shared/formats/check-record.ts';
import { Faults } from '#shared/formats/faults.ts';
import { shown } from '#shared/formats/pointer.ts';
import type { Dataset, GateClass, GateDeclaration } from '#shared/formats/types.ts';

/** The circuits of every patch; returns the gates used in each. */
function checkEveryCircuit({ patches, gates }: Dataset, faults: Faults): Set<string>[] {
  const declared = new Map(gates.map((gate) => [gate.label, gate]));
  const ids = new CircuitIds();
  return patches.map(({ qubits, circuits }, p) => {
    const used = new Set<string>();
    for (let c = 0; c < circuits.length && !faults.full; c++) {
      const circuit = circuits[c];
      if (!circuit) continue;
      const path = ['patches', p, 'circuits', c];
      ids.check(circuit.id, path, faults);
      checkCircuitGates(circuit.gates, qubits, declared, path, faults, used);
      checkCounts(circuit, qubits.length, path, faults);
    }
    return used;
  });
}

/** Every gate is used where it is estimated: in the one patch, or in the patch of exactly its targets. */
function checkUse({ patches, gates }: Dataset, used: readonly ReadonlySet<string>[], faults: Faults): void {
  gates.forEach(({ label, targets }, g) => {
    const estimates = ({ qubits }: { qubits: number[] }) => patches.length === 1 || (qubits.length === targets.length && targets.every((target) => qubits.includes(target)));
    if (patches.some((patch, p) => estimates(patch) && used[p]?.has(label))) return;
    const where = patches.length === 1 ? 'in any circuit' : `in a circuit of the patch of ${targets.length === 1 ? 'qubit' : 'qubits'} ${targets.join(', ')}, which estimates it`;
    faults.add(['gates', g], `The gate ${shown(label)} is not used ${where}.`);
  });
}

/** The gates by themselves and, where they can be compared at all, against their class. */
export function checkGateSet(gates: readonly GateDeclaration[], registerSize: number, gateClass: GateClass | null, faults: Faults): void {
  const own = new Faults();
  checkGates(gates, registerSize, own);
  if (gateClass && own.none) checkClass(gates, registerSize, gateClass, own);
  faults.join(own);
}

/**
 * The rules of a dataset that its schema cannot state, for a value that fits the schema; at most 50 faults, none = valid.
 * `gateClass` is null for `custom` and for a class that is not known here.
 * Cost: linear in the file.
 */
export function checkDataset(dataset: Dataset, gateClass: GateClass | null): ErrorDetail[] {
  const faults = new Faults();
  checkTimes(dataset.acquisition, faults);
  checkContributors(dataset.contributors, faults);
  checkLicence(dataset.licence, faults);
  checkGateSet(dataset.gates, dataset.register.length, gateClass, faults);
  checkPatches(dataset.patches, dataset.register, faults);
  const used = checkEveryCircuit(dataset, faults);
  checkUse(dataset, used, faults);
  return faults.list;
}
