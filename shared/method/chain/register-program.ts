import type { GateSource, RegisterMaps } from '#shared/method/chain/register-maps.ts';
import type { MapTable } from '#shared/method/chain/map-table.ts';

/** One gate as it meets the part of the register it acts in: places of its qubits among those of the part. */
export interface Step {
  table: MapTable;
  at: number;
  first: number;
  /** −1 for a gate on one qubit. */
  second: number;
}

/** Qubits that a circuit binds together by its entangling gates; the others cannot be told from a register of their own. */
export interface Part {
  locals: MapTable[];
  steps: Step[];
  /** For each outcome of the circuit the outcome of this part, first qubit most significant. */
  outcome: Int32Array;
}

/** A circuit over the register, ready to be evaluated. */
export interface RegisterCircuit {
  d: number;
  parts: Part[];
}

/** Splits a circuit into its parts. Outcomes are bit strings over `qubits`, the first leftmost. Gates must all have a source. */
export function compileCircuit(maps: RegisterMaps, circuit: { qubits: readonly number[]; gates: readonly string[] }): RegisterCircuit {
  const { qubits } = circuit;
  const sources = circuit.gates.map((label) => maps.gates.get(label)!);
  const part = partOf(qubits, sources);
  const d = 2 ** qubits.length;
  const parts = [...new Set(part)].map((name): Part => {
    const places = [...qubits.keys()].filter((i) => part[i] === name);
    const own = places.map((i) => qubits[i]!);
    const steps = sources.filter((s) => own.includes(s.qubits[0]!)).map((s) => ({
      table: s.table, at: s.at, first: own.indexOf(s.qubits[0]!), second: s.qubits.length > 1 ? own.indexOf(s.qubits[1]!) : -1,
    }));
    const outcome = Int32Array.from({ length: d }, (_, o) => places.reduce((bits, i) => 2 * bits + ((o >> (qubits.length - 1 - i)) & 1), 0));
    return { locals: own.map((q) => maps.locals.get(q)!.table), steps, outcome };
  });
  return { d, parts };
}

/** The part of each qubit, named by the place of its first one. */
function partOf(qubits: readonly number[], sources: readonly GateSource[]): number[] {
  const part = [...qubits.keys()];
  for (const { qubits: on } of sources) {
    if (on.length < 2) continue;
    const [a, b] = [part[qubits.indexOf(on[0]!)]!, part[qubits.indexOf(on[1]!)]!];
    const [low, high] = [Math.min(a, b), Math.max(a, b)];
    part.forEach((name, i) => {
      if (name === high) part[i] = low;
    });
  }
  return part;
}
