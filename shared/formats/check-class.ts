import type { Faults } from '#shared/formats/faults.ts';
import { matchGates } from '#shared/formats/match-gates.ts';
import { shown } from '#shared/formats/pointer.ts';
import type { GateClass, GateDeclaration } from '#shared/formats/types.ts';

function described({ ideal, targets }: GateDeclaration): string {
  const name = 'unitary' in ideal ? 'a unitary' : `${ideal.gate}${ideal.params?.length ? `(${ideal.params.join(', ')})` : ''}`;
  return `${name} on ${targets.length === 1 ? 'qubit' : 'qubits'} ${targets.join(', ')}`;
}

/** A file uses exactly its class's register size and gates; labels are free. */
export function checkClass(gates: readonly GateDeclaration[], registerSize: number, gateClass: GateClass, faults: Faults): void {
  if (registerSize !== gateClass.registerSize) {
    faults.add(['register'], `The gate class ${shown(gateClass.id)} is for a register of ${gateClass.registerSize}; this one has ${registerSize}.`);
    return;
  }
  const { missing, surplus } = matchGates(gateClass.gates, gates);
  for (const gate of missing) faults.add(['gates'], `The gate class ${shown(gateClass.id)} has the gate ${described(gate)}, which is not declared here.`);
  for (const i of surplus) {
    const gate = gates[i];
    if (gate) faults.add(['gates', i], `The gate ${shown(gate.label)} (${described(gate)}) is not one of the gates of ${shown(gateClass.id)}, or is declared twice.`);
  }
}
