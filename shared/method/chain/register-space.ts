/** Where the axes of some qubits lie in a vector over the Paulis of n qubits, the first slowest: offsets within a block, first index of each block. */
export interface PauliPlace {
  offsets: Int32Array;
  bases: Int32Array;
}

/** `axes` in the order in which a matrix counts them, first slowest. */
export function placePaulis(n: number, axes: readonly number[]): PauliPlace {
  const run = (chosen: readonly number[]): Int32Array => {
    let indices = [0];
    for (const axis of chosen) indices = indices.flatMap((i) => [0, 1, 2, 3].map((a) => i + a * 4 ** (n - 1 - axis)));
    return Int32Array.from(indices);
  };
  return { offsets: run(axes), bases: run(Array.from({ length: n }, (_, q) => q).filter((q) => !axes.includes(q))) };
}

/** to = G·from on the placed axes, or Gᵀ·from; G is m×m row-major, mostly zeros for ideal gates. */
export function applyPlaced(gate: Float64Array, at: PauliPlace, from: Float64Array, to: Float64Array, transposed: boolean): void {
  const m = at.offsets.length;
  to.fill(0);
  for (let i = 0; i < m; i++) {
    for (let j = 0; j < m; j++) {
      const g = transposed ? gate[j * m + i]! : gate[i * m + j]!;
      if (g === 0) continue;
      for (const base of at.bases) to[base + at.offsets[i]!]! += g * from[base + at.offsets[j]!]!;
    }
  }
}

/** out[x·m + y] += Σ over the other axes of b[x, rest]·f[y, rest], rows x from 1 on. */
export function contractPlaced(at: PauliPlace, b: Float64Array, f: Float64Array, out: Float64Array, outAt: number): void {
  const m = at.offsets.length;
  for (let x = 1; x < m; x++) {
    for (let y = 0; y < m; y++) {
      let s = 0;
      for (const base of at.bases) s += b[base + at.offsets[x]!]! * f[base + at.offsets[y]!]!;
      out[outAt + (x - 1) * m + y]! += s;
    }
  }
}

/** The tensor product of one vector of length m for each of n axes, first slowest. */
export function productVector(parts: readonly Float64Array[]): Float64Array {
  return parts.reduce<Float64Array>((all, part) => {
    const out = new Float64Array(all.length * part.length);
    all.forEach((a, i) => part.forEach((v, j) => { out[i * part.length + j] = a * v; }));
    return out;
  }, Float64Array.of(1));
}
