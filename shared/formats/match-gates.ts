import type { GateDeclaration } from '#shared/formats/types.ts';
import { idealTransferMatrix } from '#shared/quantum/ideal-gate.ts';
import { embedTransferMatrix } from '#shared/quantum/transfer-matrix.ts';

/** Gates count as the same where no element of their transfer matrices differs by more. */
export const gateTolerance = 1e-9;

/** Transfer matrix with the targets in ascending order, so that cz on [1, 0] is cz on [0, 1], while cx is not. */
function fingerprint({ targets, ideal }: GateDeclaration): { targets: number[]; map: Float64Array } {
  const ascending = [...targets].sort((a, b) => a - b);
  const positions = targets.map((target) => ascending.indexOf(target));
  return { targets: ascending, map: embedTransferMatrix(idealTransferMatrix(ideal), positions, targets.length) };
}

type Fingerprint = ReturnType<typeof fingerprint>;

function same(a: Fingerprint, b: Fingerprint): boolean {
  return a.targets.length === b.targets.length && a.targets.every((target, i) => target === b.targets[i])
    && a.map.every((x, i) => Math.abs(x - (b.map[i] ?? Infinity)) <= gateTolerance);
}

export interface GateMatch {
  /** Label in the wanted set → label in the given set. */
  labels: Map<string, string>;
  /** Wanted gates that nothing given is equal to. */
  missing: GateDeclaration[];
  /** Given gates that are not wanted, or are there twice; indices into the given set. */
  surplus: number[];
}

/**
 * Pairs the gates that a class (or sheet) wants with those given, one to one, by what they do and where, whatever
 * their labels. Among equal gates the one with the same label is taken first.
 * Cost: the square of the number of gates on equal targets; the gates must have passed checkGates.
 */
export function matchGates(wanted: readonly GateDeclaration[], given: readonly GateDeclaration[]): GateMatch {
  const prints = given.map(fingerprint);
  const left = new Set(given.keys());
  const labels = new Map<string, string>();
  const missing: GateDeclaration[] = [];
  for (const gate of wanted) {
    const print = fingerprint(gate);
    const equal = [...left].filter((i) => same(print, prints[i] as Fingerprint));
    const taken = equal.find((i) => given[i]?.label === gate.label) ?? equal[0];
    if (taken === undefined) {
      missing.push(gate);
      continue;
    }
    left.delete(taken);
    labels.set(gate.label, given[taken]?.label ?? '');
  }
  return { labels, missing, surplus: [...left] };
}
