import type { Faults } from '#shared/formats/faults.ts';
import { shown } from '#shared/formats/pointer.ts';
import type { DatasetCircuit, GateDeclaration } from '#shared/formats/types.ts';

type Path = readonly (string | number)[];

/** Circuit ids, each once in the file. */
export class CircuitIds {
  private readonly seen = new Map<string, Path>();

  check(id: string, path: Path, faults: Faults): void {
    const earlier = this.seen.get(id);
    if (earlier === undefined) this.seen.set(id, path);
    else faults.add([...path, 'id'], `The circuit id ${shown(id)} is used twice; first at /${earlier.join('/')}.`);
  }
}

/** Labels are declared, and their gates stay within the qubits of the circuit. `used` gathers what was met. */
export function checkCircuitGates(gates: readonly string[], qubits: readonly number[], declared: ReadonlyMap<string, GateDeclaration>, path: Path, faults: Faults, used?: Set<string>): void {
  for (let g = 0; g < gates.length && !faults.full; g++) {
    const label = gates[g] ?? '';
    if (used?.has(label)) continue;
    const gate = declared.get(label);
    if (!gate) faults.add([...path, 'gates', g], `No gate is called ${shown(label)}.`);
    else if (!gate.targets.every((target) => qubits.includes(target))) faults.add([...path, 'gates', g], `The gate ${shown(label)} acts on ${gate.targets.length === 1 ? 'qubit' : 'qubits'} ${gate.targets.join(', ')}, not all among the qubits of this circuit (${qubits.slice(0, 8).join(', ')}${qubits.length > 8 ? ' …' : ''}).`);
    else used?.add(label);
  }
}

/** Outcomes are bit strings of the patch's length, and their counts sum to the shots. */
export function checkCounts({ counts, shots }: DatasetCircuit, qubits: number, path: Path, faults: Faults): void {
  let sum = 0;
  for (const [outcome, count] of Object.entries(counts)) {
    sum += count;
    if (outcome.length !== qubits) faults.add([...path, 'counts', outcome], `The outcome ${shown(outcome)} has ${outcome.length} ${outcome.length === 1 ? 'character' : 'characters'}; the patch has ${qubits} ${qubits === 1 ? 'qubit' : 'qubits'}.`);
  }
  if (sum !== shots) faults.add([...path, 'counts'], `The counts sum to ${sum}, but shots is ${shots}.`);
}
