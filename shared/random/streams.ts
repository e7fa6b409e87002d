import { sha256 } from '@noble/hashes/sha2.js';
import { utf8ToBytes } from '@noble/hashes/utils.js';
import { Xoshiro256 } from '#shared/random/xoshiro256.ts';

/** What random numbers are drawn for; the number is how many jumps of 2¹²⁸ the stream lies from the seed. */
export const streamOf = { replicates: 0, misfit: 1, sealed: 2 } as const;

/**
 * The generator of one purpose. Seed: SHA-256 of the UTF-8 text `<content id>:<method>`. Each purpose has its own stream, so
 * that the number of replicates changes no other draw and fewer replicates are a prefix of more.
 */
export function openStream(contentId: string, method: string, purpose: keyof typeof streamOf): Xoshiro256 {
  const generator = new Xoshiro256(sha256(utf8ToBytes(`${contentId}:${method}`)));
  for (let i = 0; i < streamOf[purpose]; i++) generator.jump();
  return generator;
}
