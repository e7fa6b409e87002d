import { sha256 } from '@noble/hashes/sha2.js';
import { utf8ToBytes } from '@noble/hashes/utils.js';
import { Xoshiro256 } from '#shared/random/xoshiro256.ts';

/**
 * What random numbers are drawn for. The stream of patch i (its place in the file, from 0; 0 for what belongs to no patch)
 * lies 3·i + this number jumps of 2¹²⁸ from the seed.
 */
export const streamOf = { replicates: 0, misfit: 1, sealed: 2 } as const;

/**
 * The generator of one purpose. Seed: SHA-256 of the UTF-8 text `<content id>:<method>`. Each purpose has its own stream, so
 * that the number of replicates changes no other draw and fewer replicates are a prefix of more; and so has each patch of a
 * chained register, so that the draws of one do not depend on how many circuits another has.
 */
export function openStream(contentId: string, method: string, purpose: keyof typeof streamOf, patch = 0): Xoshiro256 {
  const generator = new Xoshiro256(sha256(utf8ToBytes(`${contentId}:${method}`)));
  const jumps = 3 * patch + streamOf[purpose];
  for (let i = 0; i < jumps; i++) generator.jump();
  return generator;
}
