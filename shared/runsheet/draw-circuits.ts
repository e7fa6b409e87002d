import { sha256 } from '@noble/hashes/sha2.js';
import { utf8ToBytes } from '@noble/hashes/utils.js';
import { Xoshiro256 } from '#shared/random/xoshiro256.ts';
import { powersOf, type StructuredPlan } from '#shared/runsheet/structured-plan.ts';

/** The stream that a sheet is drawn from: xoshiro256** seeded with SHA-256 of the UTF-8 text `<seed in lower-case hex>:run-sheet`. */
export function sheetStream(seed: string): Xoshiro256 {
  return new Xoshiro256(sha256(utf8ToBytes(`${seed}:run-sheet`)));
}

/** One of the items, each equally likely; the bias of 2⁻⁵³ is far below anything that a sheet could show. */
function pick<T>(generator: Xoshiro256, items: readonly T[]): T {
  const item = items[Math.floor(generator.next() * items.length)];
  if (item === undefined) throw new RangeError('there is nothing to draw from');
  return item;
}

/** Random circuits: for each its length uniformly from `lengths`, then each gate uniformly from `labels`. */
export function drawCircuits(generator: Xoshiro256, count: number, lengths: readonly number[], labels: readonly string[]): string[][] {
  return Array.from({ length: count }, () => Array.from({ length: pick(generator, lengths) }, () => pick(generator, labels)));
}

/**
 * Structured circuits: for each a preparation sequence, a block, how often it is repeated (0, 1, 2, 4 … within the plan's longest
 * length) and a readout sequence, each drawn uniformly in this order.
 */
export function drawStructured(generator: Xoshiro256, count: number, { preparations, blocks, readouts, longest }: StructuredPlan): string[][] {
  return Array.from({ length: count }, () => {
    const preparation = pick(generator, preparations);
    const block = pick(generator, blocks);
    const power = pick(generator, [0, ...powersOf(block, longest)]);
    const readout = pick(generator, readouts);
    return [...preparation, ...Array.from({ length: power }, () => block).flat(), ...readout];
  });
}
