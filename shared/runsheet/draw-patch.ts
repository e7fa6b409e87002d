import type { GateDeclaration, SheetCircuit } from '#shared/formats/types.ts';
import { isCompleteAndSound, judgeDesign } from '#shared/method/judge-design.ts';
import type { Xoshiro256 } from '#shared/random/xoshiro256.ts';
import { drawCircuits, drawStructured } from '#shared/runsheet/draw-circuits.ts';
import { sealedIds } from '#shared/runsheet/seal.ts';
import type { PatchPlan } from '#shared/runsheet/sheet-plan.ts';

/** Circuits of one patch with ids that count on from `first`; all ids of a sheet have one width. */
export function drawPatch(generator: Xoshiro256, plan: PatchPlan, first: number, width: number): SheetCircuit[] {
  const count = plan.estimated + plan.sealed;
  const drawn = plan.structure ? drawStructured(generator, count, plan.structure) : drawCircuits(generator, count, plan.lengths, plan.labels);
  return drawn.map((gates, i) => ({ id: `c${String(first + i).padStart(width, '0')}`, gates }));
}

/** The circuits that the estimate will use: all but the sealed. */
export function unsealed(plan: PatchPlan, circuits: readonly SheetCircuit[], secret: Uint8Array | null): SheetCircuit[] {
  if (!secret || plan.sealed === 0) return [...circuits];
  const sealed = new Set(sealedIds(secret, circuits, plan.sealed));
  return circuits.filter(({ id }) => !sealed.has(id));
}

/** Fewer probabilities than the rank asks for can never be sound; saves judging what is bound to fail. */
export function canBeSound(plan: PatchPlan): boolean {
  return plan.judged === null || plan.estimated * (2 ** plan.qubits.length - 1) >= (plan.expectedRank ?? 0);
}

/** Is the patch sound by its unsealed circuits alone? */
export function isSound(plan: PatchPlan, gates: readonly GateDeclaration[], circuits: readonly SheetCircuit[]): boolean {
  if (plan.judged === null) return true;
  if (!canBeSound(plan)) return false;
  const input = { gates, qubits: plan.qubits, circuits, pairOfChain: plan.judged === 'pair-of-chain' };
  // The quick answer knows complete designs only; one qubit is judged in milliseconds, complete or not.
  if (plan.qubits.length === 1) return judgeDesign(input).sound(plan.expectedRank ?? undefined);
  return isCompleteAndSound(input);
}
