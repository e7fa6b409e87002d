import { openArena, type Arena } from '#shared/linalg/wasm/arena.ts';

/** Numbers made at a time. */
const BATCH = 1024;

/**
 * xoshiro256** ("Scrambled linear pseudorandom number generators", ACM Trans. Math. Softw. 47, 36, 2021): 256 bits of state,
 * period 2²⁵⁶ − 1. The state is held as eight 32-bit halves, low half first, so that only integer operations are used;
 * a kernel with 64-bit integers makes the same numbers faster where it is to be had.
 */
export class Xoshiro256 {
  private readonly arena: Arena;
  private readonly s: Int32Array;
  /** State from which the numbers held were made. */
  private readonly before = new Int32Array(8);
  private readonly held: Float64Array;
  private place = BATCH;

  /** @param seed 32 bytes, four 64-bit words, little-endian; not all zero */
  constructor(seed: Uint8Array, plain = false) {
    if (seed.length !== 32) throw new RangeError(`a seed has 32 bytes, not ${seed.length}`);
    if (seed.every((b) => b === 0)) throw new RangeError('the all-zero seed is the generator’s one fixed point');
    this.arena = openArena(32 + 8 * BATCH, plain);
    this.s = new Int32Array(this.arena.buffer, 0, 8);
    this.held = new Float64Array(this.arena.buffer, 32, BATCH);
    for (let i = 0; i < 8; i++) this.s[i] = seed[4 * i]! | (seed[4 * i + 1]! << 8) | (seed[4 * i + 2]! << 16) | (seed[4 * i + 3]! << 24);
  }

  /** Uniform on the multiples of 2⁻⁵³ in [0, 1): the upper 53 bits of the next word. */
  next(): number {
    if (this.place === BATCH) this.refill();
    return this.held[this.place++]!;
  }

  private refill(): void {
    this.before.set(this.s);
    this.place = 0;
    if (this.arena.kernels) this.arena.kernels.uniform(0, 32, BATCH);
    else for (let i = 0; i < BATCH; i++) this.held[i] = this.make();
  }

  private make(): number {
    const s = this.s;
    const lo = s[2]!;
    const hi = s[3]!;
    // s1·5 = (s1 << 2) + s1
    let a = (lo << 2) >>> 0;
    let sum = a + (lo >>> 0);
    let high = (((hi << 2) | (lo >>> 30)) + hi + (sum > 4294967295 ? 1 : 0)) | 0;
    let low = sum | 0;
    // rotate left by 7
    const rotatedLow = (low << 7) | (high >>> 25);
    const rotatedHigh = (high << 7) | (low >>> 25);
    // ·9 = (x << 3) + x
    a = (rotatedLow << 3) >>> 0;
    sum = a + (rotatedLow >>> 0);
    high = (((rotatedHigh << 3) | (rotatedLow >>> 29)) + rotatedHigh + (sum > 4294967295 ? 1 : 0)) | 0;
    low = sum | 0;
    this.step();
    return ((high >>> 0) * 2097152 + (low >>> 11)) * 1.1102230246251565e-16;
  }

  /** Moves on by 2¹²⁸ numbers: the start of another stream of the same seed that can never meet this one. */
  jump(): void {
    // Numbers made in advance and not yet given out are taken back.
    if (this.place < BATCH) {
      this.s.set(this.before);
      for (let i = 0; i < this.place; i++) this.step();
      this.place = BATCH;
    }
    const out = new Int32Array(8);
    for (const word of JUMP) {
      for (let bit = 0; bit < 32; bit++) {
        if ((word >>> bit) & 1) for (let i = 0; i < 8; i++) out[i]! ^= this.s[i]!;
        this.step();
      }
    }
    this.s.set(out);
  }

  private step(): void {
    const s = this.s;
    const tLow = s[2]! << 17;
    const tHigh = (s[3]! << 17) | (s[2]! >>> 15);
    s[4]! ^= s[0]!;
    s[5]! ^= s[1]!;
    s[6]! ^= s[2]!;
    s[7]! ^= s[3]!;
    s[2]! ^= s[4]!;
    s[3]! ^= s[5]!;
    s[0]! ^= s[6]!;
    s[1]! ^= s[7]!;
    s[4]! ^= tLow;
    s[5]! ^= tHigh;
    // rotate left by 45 = swap halves, then by 13
    const low = s[7]!;
    const high = s[6]!;
    s[6] = (low << 13) | (high >>> 19);
    s[7] = (high << 13) | (low >>> 19);
  }
}

/** The generator's published jump polynomial, 32 bits at a time, low half first. A test recomputes it from the recurrence. */
const JUMP = [0x3cfd0aba, 0x180ec6d3, 0xf0c9392c, 0xd5a61266, 0xe03fc9aa, 0xa9582618, 0x29b1661c, 0x39abdc45];
