import { createHash } from 'node:crypto';

/** A stream of uniform numbers. */
export interface Generator {
  /** Uniform in [0, 1), 53 bits. */
  next(): number;
}

/**
 * A small fast counting generator: three 32-bit words a, b, c and a counter n.
 *   t = a + b + n;  n += 1;  a = b ^ (b >>> 9);  b = c + (c << 3);  c = rotl(c, 21) + t;  the word is t   (mod 2³²)
 * a, b, c are the first twelve bytes (little-endian) of SHA-256 of the seed text, n starts at 1, twelve words are
 * thrown away. A uniform number takes 27 high bits of one word and 26 of the next. The demo devices' stream only:
 * the estimator's bootstrap uses another generator, so the two never share draws.
 */
export function createGenerator(seed: string): Generator {
  const hash = createHash('sha256').update(seed, 'utf8').digest();
  let [a, b, c, n] = [hash.readInt32LE(0), hash.readInt32LE(4), hash.readInt32LE(8), 1];
  const word = (): number => {
    const t = (a + b + n) | 0;
    n = (n + 1) | 0;
    a = b ^ (b >>> 9);
    b = (c + (c << 3)) | 0;
    c = (((c << 21) | (c >>> 11)) + t) | 0;
    return t >>> 0;
  };
  for (let i = 0; i < 12; i += 1) word();
  return { next: () => ((word() >>> 5) * 67108864 + (word() >>> 6)) / 9007199254740992 };
}
