import type { IdealGate } from '#shared/formats/types.ts';
import { complexFromRows, polishUnitary, type ComplexSquare } from '#shared/quantum/complex-matrix.ts';
import { standardGates } from '#shared/quantum/standard-gates.ts';
import { transferMatrix } from '#shared/quantum/transfer-matrix.ts';

/** The unitary of a declared gate. The dataset's checks have refused unknown names and non-unitary matrices. */
export function idealUnitary(ideal: IdealGate): ComplexSquare {
  if ('unitary' in ideal) return polishUnitary(complexFromRows(ideal.unitary));
  const gate = standardGates.get(ideal.gate);
  if (!gate) throw new RangeError(`"${ideal.gate}" is not an OpenQASM 3 standard gate.`);
  const params = ideal.params ?? [];
  if (params.length !== gate.params) throw new RangeError(`"${ideal.gate}" takes ${gate.params} angles, not ${params.length}.`);
  return gate.unitary(params);
}

/** Pauli transfer matrix of a declared gate on its own targets, first target slowest. */
export function idealTransferMatrix(ideal: IdealGate): Float64Array {
  return transferMatrix(idealUnitary(ideal));
}
