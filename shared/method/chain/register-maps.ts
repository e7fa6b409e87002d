import type { GateDeclaration } from '#shared/formats/types.ts';
import type { LocalEstimate } from '#shared/method/chain/estimate-local.ts';
import type { PairEstimate } from '#shared/method/chain/estimate-pair.ts';
import type { MapTable } from '#shared/method/chain/map-table.ts';

/** Where the maps of one gate of the register are found. */
export interface GateSource {
  /** Qubits in the order of the map: one, or those of the pair's patch. */
  qubits: readonly number[];
  table: MapTable;
  /** Place of the gate in the table. */
  at: number;
  local: LocalEstimate;
  pair: PairEstimate | null;
}

/** The register put together from its patches. */
export interface RegisterMaps {
  locals: ReadonlyMap<number, LocalEstimate>;
  pairs: readonly PairEstimate[];
  /** By label; a gate that no patch estimates is absent. */
  gates: ReadonlyMap<string, GateSource>;
}

export function registerMaps(declared: readonly GateDeclaration[], locals: ReadonlyMap<number, LocalEstimate>, pairs: readonly PairEstimate[]): RegisterMaps {
  const gates = new Map<string, GateSource>();
  for (const { label, targets } of declared) {
    const local = locals.get(targets[0]!)!;
    if (targets.length === 1) {
      const { table, problem } = local;
      gates.set(label, { qubits: targets, table, at: table.place[problem.set.labels.indexOf(label)]!, local, pair: null });
    } else if (targets.length === 2) {
      const pair = pairs.find(({ qubits }) => targets.every((t) => qubits.includes(t)));
      if (pair) gates.set(label, { qubits: pair.qubits, table: pair.table, at: pair.table.place[pair.set.labels.indexOf(label)]!, local, pair });
    }
  }
  return { locals, pairs, gates };
}

const qubitsOf = (register: readonly string[], qubits: readonly number[]): string => qubits.map((q) => register[q]).join(' and ');

/**
 * Why a circuit over the register is not determined, or null: every one-qubit patch it touches must be complete and
 * determined, every pair whose gate it uses sound and determined.
 */
export function reasonAgainstCircuit(maps: RegisterMaps, register: readonly string[], circuit: { qubits: readonly number[]; gates: readonly string[] }): string | null {
  for (const q of circuit.qubits) {
    const local = maps.locals.get(q)!;
    if (local.blocked !== null) return `not determined: the patch of ${register[q]} is not determined`;
    if (!local.problem.complete) return `not determined: the patch of ${register[q]} is incomplete`;
  }
  for (const label of circuit.gates) {
    const source = maps.gates.get(label);
    if (!source) return `not determined: no patch estimates the gate "${label}"`;
    if (source.pair?.sound === false) return `not determined: unsound pair ${qubitsOf(register, source.pair.qubits)}`;
    if (source.pair?.blocked) return `not determined: the pair ${qubitsOf(register, source.pair.qubits)} is not determined`;
  }
  return null;
}
