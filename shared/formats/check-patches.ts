import type { Faults } from '#shared/formats/faults.ts';
import { shown } from '#shared/formats/pointer.ts';

type Patches = readonly { qubits: readonly number[] }[];

function checkJoint(qubits: readonly number[], register: readonly string[], faults: Faults): void {
  if (qubits.length > 2) faults.add(['patches', 0, 'qubits'], `One patch alone is estimated jointly and may have one or two qubits; this has ${qubits.length}. Measure a larger register in chained patches.`);
  const left = register.map((_, q) => q).filter((q) => !qubits.includes(q));
  if (left.length > 0) faults.add(['patches', 0, 'qubits'], `One patch alone must list the whole register; ${left.length === 1 ? 'qubit' : 'qubits'} ${left.slice(0, 8).join(', ')}${left.length > 8 ? ' …' : ''} ${left.length === 1 ? 'is' : 'are'} missing.`);
}

function checkChained(patches: Patches, register: readonly string[], faults: Faults): void {
  const taken = new Map<string, number>();
  patches.forEach(({ qubits }, p) => {
    if (qubits.length > 2) return;
    const key = [...qubits].sort((a, b) => a - b).join(',');
    const earlier = taken.get(key);
    if (earlier === undefined) taken.set(key, p);
    else if (qubits.length === 1) faults.add(['patches', p, 'qubits'], `Qubit ${key} has a one-qubit patch already: patch ${earlier}.`);
    else faults.add(['patches', p, 'qubits'], `The qubits ${key.replace(',', ' and ')} have a patch already: patch ${earlier}.`);
  });
  register.forEach((name, q) => {
    if (!taken.has(String(q))) faults.add(['patches'], `Qubit ${q} (${shown(name)}) has no one-qubit patch; with several patches each qubit needs one.`);
  });
}

/**
 * One patch = joint: the whole register of one or two qubits. Several = chained: each qubit exactly one one-qubit
 * patch, each pair at most one patch, larger patches for prediction only.
 */
export function checkPatches(patches: Patches, register: readonly string[], faults: Faults): void {
  let inside = true;
  patches.forEach(({ qubits }, p) => qubits.forEach((qubit, k) => {
    if (qubit < register.length) return;
    inside = false;
    faults.add(['patches', p, 'qubits', k], `${qubit} is no index of the register, which has ${register.length} ${register.length === 1 ? 'qubit' : 'qubits'}, numbered from 0.`);
  }));
  const [only] = patches;
  if (!inside || !only) return;
  if (patches.length === 1) checkJoint(only.qubits, register, faults);
  else checkChained(patches, register, faults);
}
