import type { SheetKind } from '#shared/domain/sheet-kinds.ts';
import { AppError } from '#shared/errors/app-error.ts';
import type { GateClass, GateDeclaration } from '#shared/formats/types.ts';
import { structuredPlan, type StructuredPlan } from '#shared/runsheet/structured-plan.ts';


/** What is drawn for one patch of a sheet. */
export interface PatchPlan {
  qubits: number[];
  /** Circuits to estimate from; sealed ones come on top. */
  estimated: number;
  sealed: number;
  lengths: readonly number[];
  /** Labels that circuits are drawn from. */
  labels: readonly string[];
  /** How its design is judged: as a joint patch, as a pair of a chained register, or (prediction only) not at all. */
  judged: 'joint' | 'pair-of-chain' | null;
  /** Rank that a sound design has; null = as many as the gauge leaves. */
  expectedRank: number | null;
  /** What the circuits are put together from; null = gate by gate. */
  structure: StructuredPlan | null;
}

/** A sheet's least number of circuits for a one-qubit patch of a chained register. */
const leastLocal = 200;

/** Circuits over the whole register of a chained sheet, all sealed: they test the prediction. */
const wholeRegister = 40;

/** Structured sheets are for one qubit: the sequences of a pair have some seven hundred parameters of their own beside those of its gates. */
export const canBeStructured = (gateClass: Pick<GateClass, 'registerSize'>): boolean => gateClass.registerSize === 1;

export const structuredRefusal = (gateClass: Pick<GateClass, 'id'>): string => `Structured sheets are drawn for gate classes of one qubit; ${gateClass.id} has more.`;

/** The structured plan of a one-qubit class: blocks are repeated up to its longest circuit. */
export const structureOf = (gateClass: GateClass): StructuredPlan => structuredPlan(gateClass.gates, 0, Math.max(...gateClass.lengths));

/** A quarter on top of the N circuits to estimate from: a fifth of the sheet. */
export const sealedOf = (estimated: number): number => Math.ceil(estimated / 4);

const inside = (gates: readonly GateDeclaration[], qubits: readonly number[]): GateDeclaration[] => gates.filter(({ targets }) => targets.every((target) => qubits.includes(target)));

function pairsOf(gates: readonly GateDeclaration[]): { qubits: number[]; entangling: number }[] {
  const pairs = new Map<string, { qubits: number[]; entangling: number }>();
  for (const { targets } of gates) {
    if (targets.length !== 2) continue;
    const qubits = [...targets].sort((a, b) => a - b);
    const pair = pairs.get(qubits.join()) ?? { qubits, entangling: 0 };
    pair.entangling++;
    pairs.set(qubits.join(), pair);
  }
  return [...pairs.values()];
}

function chainedPlans(gateClass: GateClass, circuits: number, seal: boolean): PatchPlan[] {
  const { gates, lengths, registerSize } = gateClass;
  const drawing = new Set(gateClass.drawing);
  const local = Math.max(leastLocal, Math.ceil(circuits / 3));
  const everyQubit = Array.from({ length: registerSize }, (_, q) => q);
  const plans = everyQubit.map((q): PatchPlan => ({
    qubits: [q], estimated: local, sealed: seal ? sealedOf(local) : 0, lengths: gateClass.localLengths ?? lengths,
    labels: inside(gates, [q]).map(({ label }) => label), judged: 'joint', expectedRank: null, structure: null,
  }));
  for (const { qubits, entangling } of pairsOf(gates)) {
    plans.push({
      qubits, estimated: circuits, sealed: seal ? sealedOf(circuits) : 0, lengths,
      labels: inside(gates, qubits).map(({ label }) => label).filter((label) => drawing.has(label)), judged: 'pair-of-chain', expectedRank: gateClass.expectedRank * entangling, structure: null,
    });
  }
  // In a register of two the pair is the whole register, and a pair has one patch only: its own sealed circuits test the prediction.
  if (seal && registerSize > 2) plans.push({ qubits: everyQubit, estimated: 0, sealed: wholeRegister, lengths, labels: gates.map(({ label }) => label), judged: null, expectedRank: null, structure: null });
  return plans;
}

/**
 * The patches of a sheet of N circuits to estimate from. Joint: one patch. Chained: N for each pair with an entangling
 * gate, max(200, ⌈N/3⌉) for each qubit, and 40 sealed ones over the whole register. Without a seal nothing is sealed and
 * nothing is drawn beyond what is estimated.
 * @throws AppError `invalid-request` for a structured sheet of more than one qubit
 */
export function patchPlans(gateClass: GateClass, circuits: number, seal: boolean, kind: SheetKind = 'random'): PatchPlan[] {
  if (kind === 'structured' && !canBeStructured(gateClass)) throw new AppError('invalid-request', structuredRefusal(gateClass));
  if (gateClass.kind === 'chained') return chainedPlans(gateClass, circuits, seal);
  const qubits = Array.from({ length: gateClass.registerSize }, (_, q) => q);
  return [{
    qubits, estimated: circuits, sealed: seal ? sealedOf(circuits) : 0, lengths: gateClass.lengths, labels: gateClass.drawing, judged: 'joint', expectedRank: gateClass.expectedRank,
    structure: kind === 'structured' ? structureOf(gateClass) : null,
  }];
}
