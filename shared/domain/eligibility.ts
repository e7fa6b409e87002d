import type { Figure, FigureKey } from '#shared/formats/types.ts';
import { domainReason } from './domain-reason.ts';
import type { FigureDomain } from './figure-domain.ts';
import type { EntryState } from './life-cycle.ts';
import type { SheetKind } from './sheet-kinds.ts';

/** Why an entry is left off its board, and what would change that. */
export interface Reason {
  code: 'class-unranked' | 'old' | 'own-design' | 'structured' | 'design' | 'ambiguous' | 'unsettled' | 'no-sealed-check' | 'sealed-check' | 'floor' | 'domain' | 'no-figure' | 'newer' | 'withdrawn';
  sentence: string;
  remedy: string;
}

/** One estimated patch: what its design and its estimate turned out to be, and how much was measured. */
export interface PatchFacts {
  qubits: readonly number[];
  complete: boolean;
  sound: boolean;
  rankAmbiguous: boolean;
  settled: boolean;
  /** Circuits estimated from: the sealed ones do not count. */
  circuits: number;
  /** Fewest shots of a circuit. */
  shots: number;
}

export interface EligibilityFacts {
  gateClass: { id: string; kind: 'joint' | 'chained'; ranked: boolean; floor: { circuits: number; shots: number } } | null;
  /** The run sheet that was matched circuit by circuit; null for a design of the contributor's own. */
  runSheet: string | null;
  /** How that sheet was drawn; random unless told. */
  runSheetKind?: SheetKind | null;
  patches: readonly PatchFacts[];
  sealedCheck: { passed: boolean } | null;
  figures: readonly Figure[];
  /** The figure the board is read by, and what the entry has of it. */
  figure: { key: FigureKey; depth: number | null; found: Figure | null };
  /** Version name of a newer public entry of the same class, device and register. */
  newer: string | null;
  state: EntryState;
}

const patchName = (patch: PatchFacts): string => `the patch on ${patch.qubits.length === 1 ? 'qubit' : 'qubits'} ${patch.qubits.join(', ')}`;

/** Least circuits of one patch: the class's floor for joint and pair patches, max(200, a third) for the one-qubit patches of a chained register. */
export const patchFloor = (gateClass: { kind: 'joint' | 'chained'; floor: { circuits: number } }, qubits: number): number =>
  gateClass.kind === 'chained' && qubits === 1 ? Math.max(200, Math.ceil(gateClass.floor.circuits / 3)) : gateClass.floor.circuits;

const floorReason = (facts: EligibilityFacts): Reason | null => {
  const { gateClass } = facts;
  if (!gateClass) return null;
  for (const patch of facts.patches) {
    const least = patchFloor(gateClass, patch.qubits.length);
    const few = patch.circuits < least;
    if (!few && patch.shots >= gateClass.floor.shots) continue;
    return {
      code: 'floor',
      sentence: few
        ? `${patch.circuits} circuits to estimate from in ${patchName(patch)} are below the floor of ${least} for this gate class.`
        : `${patch.shots} shots of a circuit in ${patchName(patch)} are below the floor of ${gateClass.floor.shots} for this gate class.`,
      remedy: `A dataset with at least ${least} circuits of ${gateClass.floor.shots} shots.`,
    };
  }
  return null;
};

/**
 * May this entry stand on the board of its class, read by this figure? Every reason against it, the gravest first;
 * an empty list means eligible. Pure. `domains`: where each figure's
 * coverage was shown to hold; null = the rule does not apply.
 */
export const ineligibility = (facts: EligibilityFacts, domains: readonly FigureDomain[] | null = null): Reason[] => {
  const reasons: (Reason | null | false)[] = [
    facts.state === 'withdrawn' && { code: 'withdrawn', sentence: 'The entry was withdrawn.', remedy: 'A new dataset.' },
    !facts.gateClass?.ranked && { code: 'class-unranked', sentence: facts.gateClass ? 'This gate class is never ranked: its gates do not determine every figure.' : 'The gates are not those of a ranked gate class.', remedy: 'A run sheet of a ranked gate class.' },
    facts.runSheet === null && { code: 'own-design', sentence: 'The circuits are the contributor’s own design, not a run sheet.', remedy: 'A run sheet drawn by the registry.' },
    facts.runSheetKind === 'structured' && { code: 'structured', sentence: 'The run sheet is structured: its circuits repeat blocks. Boards compare entries whose circuits were drawn gate by gate.', remedy: 'A random run sheet of this gate class.' },
    facts.patches.some((p) => !p.complete || !p.sound) && { code: 'design', sentence: 'The circuits do not determine all that this gate class asks for.', remedy: 'A run sheet drawn by the registry: its design is sound before it is handed out.' },
    facts.patches.some((p) => p.rankAmbiguous) && { code: 'ambiguous', sentence: 'The rank of the design depends on where small singular values are cut off.', remedy: 'More circuits, of more lengths.' },
    facts.patches.some((p) => !p.settled) && { code: 'unsettled', sentence: 'The estimate did not settle: the gate errors are beyond what the eight passes can follow.', remedy: 'Shorter circuits, or a quieter device.' },
    facts.sealedCheck === null && facts.runSheet !== null && { code: 'no-sealed-check', sentence: 'No circuit was kept sealed, so the prediction was not tested.', remedy: 'A run sheet drawn by the registry, with its seal.' },
    facts.sealedCheck?.passed === false && { code: 'sealed-check', sentence: 'Sealed circuits were predicted worse or better than chance allows at 99 %.', remedy: 'A new dataset free of drift.' },
    floorReason(facts),
    domainReason(facts, domains),
    (facts.figure.found?.value ?? null) === null && { code: 'no-figure', sentence: 'The figure this board is read by is not determined by the dataset.', remedy: 'Read the board by another figure, or send a dataset that determines it.' },
    facts.newer !== null && { code: 'newer', sentence: `A newer entry of the same device and register, ${facts.newer}, stands in its place.`, remedy: 'Nothing: a board shows the newest entry of each device and register.' },
  ];
  return reasons.filter((reason): reason is Reason => Boolean(reason));
};
