import type { GateDeclaration } from '#shared/formats/types.ts';
import { idealGateSet } from '#shared/method/gate-set.ts';

/**
 * What structured circuits are put together from: a preparation sequence, a block repeated some number of times, and a readout
 * sequence. Sequences are labels in order of time; the empty one is among preparations and readouts.
 */
export interface StructuredPlan {
  preparations: string[][];
  blocks: string[][];
  readouts: string[][];
  /** A block is repeated so often that it stays within this many gates. */
  longest: number;
}

/** Sequences beyond those that span the space, so that each direction is prepared and read from both of its ends. */
const SPARE = 2;
/** Longest sequence looked at: four gates reach every corner that the shipped one-qubit classes reach at all. */
const LONGEST_SEQUENCE = 4;
/** A sequence adds nothing when less than this is new in it: ideal vectors are exact to 1e-15, new directions above 0.1. */
const NEW = 1e-9;

function sequencesUpTo(labels: readonly string[], length: number): string[][] {
  const out: string[][] = [[]];
  let last: string[][] = [[]];
  for (let l = 1; l <= length; l++) {
    last = last.flatMap((s) => labels.map((label) => [...s, label]));
    out.push(...last);
  }
  return out;
}

const squared = (v: Float64Array): number => v.reduce((s, x) => s + x * x, 0);

/** Takes the sequence with most that is new, the shortest and first among equals, until the space is spanned; then those farthest from all taken. */
function choose(sequences: readonly string[][], vectors: readonly Float64Array[], dimension: number): string[][] {
  const left = vectors.map((v) => v.slice());
  const chosen: number[] = [];
  const best = (score: (i: number) => number): number =>
    vectors.reduce((at, _, i) => (score(i) > (at < 0 ? NEW : score(at) + NEW) ? i : at), -1);
  for (let next = 0; next >= 0 && chosen.length < dimension; next = best((i) => squared(left[i]!))) {
    chosen.push(next);
    const q = left[next]!.slice();
    const size = squared(q);
    for (const v of left) {
      const w = v.reduce((s, x, a) => s + x * q[a]!, 0) / size;
      for (let a = 0; a < v.length; a++) v[a]! -= w * q[a]!;
    }
  }
  const apart = (i: number): number => Math.min(...chosen.map((c) => squared(vectors[i]!.map((x, a) => x - vectors[c]![a]!))));
  for (let spare = 0; spare < SPARE; spare++) {
    const next = best(apart);
    if (next < 0) break;
    chosen.push(next);
  }
  return chosen.map((i) => sequences[i]!);
}

/**
 * The plan of one qubit's gates. Preparation sequences: those whose ideal states span all states, and two more. Readout
 * sequences: the same for the ideal effect of outcome 0 pulled back through them. Blocks: every gate, and every two different
 * gates after one another. The same gates in the same order give the same plan everywhere.
 */
export function structuredPlan(gates: readonly GateDeclaration[], qubit: number, longest: number): StructuredPlan {
  const set = idealGateSet(gates, [qubit]);
  const { D, labels } = set;
  const sequences = sequencesUpTo(labels, LONGEST_SEQUENCE);
  const gateOf = new Map(labels.map((label, k) => [label, set.gates[k]!]));
  const forward = (v: Float64Array, label: string): Float64Array => v.map((_, a) => v.reduce((s, x, b) => s + gateOf.get(label)![a * D + b]! * x, 0));
  const backward = (m: Float64Array, label: string): Float64Array => m.map((_, b) => m.reduce((s, x, a) => s + x * gateOf.get(label)![a * D + b]!, 0));
  const states = sequences.map((s) => s.reduce(forward, set.state));
  const effects = sequences.map((s) => s.reduceRight(backward, set.effects[0]!));
  return {
    preparations: choose(sequences, states, D),
    readouts: choose(sequences, effects, D),
    blocks: [...labels.map((label) => [label]), ...labels.flatMap((a, i) => labels.slice(i + 1).map((b) => [a, b]))],
    longest,
  };
}

/** How often a block may be repeated: 1, 2, 4 … while it stays within the longest length. */
export function powersOf(block: readonly string[], longest: number): number[] {
  const out: number[] = [];
  for (let m = 1; m * block.length <= longest; m *= 2) out.push(m);
  return out;
}

/** The part that a circuit takes of a plan: places in its lists; block −1 with power 0 where nothing is repeated. */
export interface StructuredCircuit {
  preparation: number;
  block: number;
  power: number;
  readout: number;
}

const begins = (gates: readonly string[], with_: readonly string[]): boolean => with_.every((label, i) => gates[i] === label);

/**
 * Every way in which a circuit is a preparation sequence, a block repeated as a sheet repeats it (0, 1, 2, 4 …), and a readout
 * sequence: "a a a" may be "a" prepared and "a" repeated twice, or nothing prepared and "a a a" read. None = it has no such form.
 */
export function readStructure(gates: readonly string[], plan: StructuredPlan): StructuredCircuit[] {
  const out: StructuredCircuit[] = [];
  plan.preparations.forEach((prep, preparation) => {
    if (!begins(gates, prep)) return;
    plan.readouts.forEach((read, readout) => {
      const middle = gates.length - prep.length - read.length;
      if (middle < 0 || !begins(gates.slice(gates.length - read.length), read)) return;
      if (middle === 0) out.push({ preparation, block: -1, power: 0, readout });
      plan.blocks.forEach((label, block) => {
        const power = middle / label.length;
        if (!powersOf(label, plan.longest).includes(power)) return;
        for (let i = 0; i < middle; i++) if (gates[prep.length + i] !== label[i % label.length]) return;
        out.push({ preparation, block, power, readout });
      });
    });
  });
  return out;
}
