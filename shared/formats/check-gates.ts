import type { Faults } from '#shared/formats/faults.ts';
import { shown } from '#shared/formats/pointer.ts';
import type { GateDeclaration, IdealGate } from '#shared/formats/types.ts';
import { complexFromRows, unitarityDefect } from '#shared/quantum/complex-matrix.ts';
import { standardGates } from '#shared/quantum/standard-gates.ts';

/** Largest allowed element of U U† − 1: a matrix typed with ten digits passes, a wrong one does not. */
export const unitaryTolerance = 1e-9;

const many = (n: number, thing: string): string => `${n} ${thing}${n === 1 ? '' : 's'}`;

function checkNamed(ideal: Extract<IdealGate, { gate: string }>, targets: number, path: (string | number)[], faults: Faults): void {
  const gate = standardGates.get(ideal.gate);
  if (!gate) {
    faults.add([...path, 'ideal', 'gate'], `${shown(ideal.gate)} is not a standard gate.`);
    return;
  }
  if (gate.qubits !== targets) faults.add([...path, 'targets'], `The gate ${shown(ideal.gate)} acts on ${many(gate.qubits, 'qubit')}, but ${many(targets, 'target')} ${targets === 1 ? 'is' : 'are'} given.`);
  const given = ideal.params?.length ?? 0;
  if (given !== gate.params) faults.add([...path, 'ideal', ...(ideal.params ? ['params'] : [])], `The gate ${shown(ideal.gate)} takes ${many(gate.params, 'angle')}, but ${given} ${given === 1 ? 'is' : 'are'} given.`);
}

function checkUnitary(rows: Extract<IdealGate, { unitary: unknown }>['unitary'], targets: number, path: (string | number)[], faults: Faults): void {
  const place = [...path, 'ideal', 'unitary'];
  const size = 2 ** targets;
  if (rows.length !== size) {
    faults.add(place, `The matrix has ${many(rows.length, 'row')}; for ${many(targets, 'target')} it must have ${size}.`);
    return;
  }
  const short = rows.findIndex((row) => row.length !== size);
  if (short !== -1) {
    faults.add([...place, short], `Row ${short} has ${many(rows[short]?.length ?? 0, 'element')}; it must have ${size}.`);
    return;
  }
  const defect = unitarityDefect(complexFromRows(rows));
  if (!(defect <= unitaryTolerance)) faults.add(place, `The matrix is not unitary: an element of U U† − 1 is ${defect.toPrecision(3)}, and at most 1e-9 is allowed.`);
}

/** Labels once each, targets in the register, angles and matrices as the gate asks for them. */
export function checkGates(gates: readonly GateDeclaration[], registerSize: number, faults: Faults): void {
  const seen = new Map<string, number>();
  gates.forEach(({ label, targets, ideal }, i) => {
    const earlier = seen.get(label);
    if (earlier !== undefined) faults.add(['gates', i, 'label'], `The label ${shown(label)} is taken by gate ${earlier}.`);
    else seen.set(label, i);
    targets.forEach((target, t) => {
      if (target >= registerSize) faults.add(['gates', i, 'targets', t], `${target} is no index of the register, which has ${many(registerSize, 'qubit')}, numbered from 0.`);
    });
    if ('unitary' in ideal) checkUnitary(ideal.unitary, targets.length, ['gates', i], faults);
    else checkNamed(ideal, targets.length, ['gates', i], faults);
  });
}
