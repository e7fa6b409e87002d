// AssemblyScript.

/** The next numbers of xoshiro256** in [0, 1), 53 bits each; the state of four 64-bit words is moved on. */
export function uniform(state: usize, out: usize, count: i32): void {
  let s0 = load<u64>(state), s1 = load<u64>(state, 8), s2 = load<u64>(state, 16), s3 = load<u64>(state, 24);
  while (count > 0) {
    const word = rotl<u64>(s1 * 5, 7) * 9;
    // The upper 53 bits fit a signed integer and a double alike.
    store<f64>(out, <f64>(<i64>(word >> 11)) * 1.1102230246251565e-16);
    const t = s1 << 17;
    s2 ^= s0;
    s3 ^= s1;
    s1 ^= s2;
    s0 ^= s3;
    s2 ^= t;
    s3 = rotl<u64>(s3, 45);
    out += 8;
    count--;
  }
  store<u64>(state, s0);
  store<u64>(state, s1, 8);
  store<u64>(state, s2, 16);
  store<u64>(state, s3, 24);
}
