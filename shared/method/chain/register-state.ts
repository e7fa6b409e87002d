/**
 * Vectors over the Paulis of m qubits (4^m elements, first qubit slowest) and what maps on one or two of them do.
 * Cost: 4·4^m multiply-adds for a map on one qubit, 16·4^m on two.
 */

/** Places at which the digits of two qubits are zero, in ascending order; kept for each pair of places. */
const restCache = new Map<number, Int32Array>();

/** Those places, in ascending order. */
export function restOf(m: number, i: number, j: number): Int32Array {
  const key = (m * 16 + Math.min(i, j)) * 16 + Math.max(i, j);
  let rest = restCache.get(key);
  if (!rest) {
    const mask = (3 << (2 * (m - 1 - i))) | (3 << (2 * (m - 1 - j)));
    rest = Int32Array.from({ length: 4 ** m }, (_, a) => a).filter((a) => (a & mask) === 0);
    restCache.set(key, rest);
  }
  return rest;
}

/** The 4×4 map at `g` of `maps` on qubit i, in place. */
export function applyToOne(v: Float64Array, m: number, i: number, maps: Float64Array, g: number): void {
  const stride = 4 ** (m - 1 - i);
  const size = 4 ** m;
  for (let block = 0; block < size; block += 4 * stride) {
    for (let p = block; p < block + stride; p++) {
      const a = v[p]!, b = v[p + stride]!, c = v[p + 2 * stride]!, e = v[p + 3 * stride]!;
      v[p] = maps[g]! * a + maps[g + 1]! * b + maps[g + 2]! * c + maps[g + 3]! * e;
      v[p + stride] = maps[g + 4]! * a + maps[g + 5]! * b + maps[g + 6]! * c + maps[g + 7]! * e;
      v[p + 2 * stride] = maps[g + 8]! * a + maps[g + 9]! * b + maps[g + 10]! * c + maps[g + 11]! * e;
      v[p + 3 * stride] = maps[g + 12]! * a + maps[g + 13]! * b + maps[g + 14]! * c + maps[g + 15]! * e;
    }
  }
}

const four = new Float64Array(16);

/** The 16×16 map at `g` of `maps` on qubits i (its first) and j, in place. */
export function applyToTwo(v: Float64Array, m: number, i: number, j: number, maps: Float64Array, g: number): void {
  const si = 4 ** (m - 1 - i);
  const sj = 4 ** (m - 1 - j);
  const rest = restOf(m, i, j);
  for (let n = 0; n < rest.length; n++) {
    const p = rest[n]!;
    for (let a = 0, k = 0; a < 4; a++) for (let b = 0; b < 4; b++) four[k++] = v[p + a * si + b * sj]!;
    let row = g;
    for (let a = 0; a < 4; a++) {
      for (let b = 0; b < 4; b++) {
        let s = 0;
        for (let k = 0; k < 16; k += 4) s += maps[row + k]! * four[k]! + maps[row + k + 1]! * four[k + 1]! + maps[row + k + 2]! * four[k + 2]! + maps[row + k + 3]! * four[k + 3]!;
        v[p + a * si + b * sj] = s;
        row += 16;
      }
    }
  }
}

/** out = G·(held), both 4×4 row-major; `held` is overwritten. */
export function multiplyHeld(maps: Float64Array, g: number, held: Float64Array, at: number): void {
  for (let c = at; c < at + 4; c++) {
    const x = held[c]!, y = held[c + 4]!, z = held[c + 8]!, w = held[c + 12]!;
    for (let r = 0; r < 4; r++) held[c + 4 * r] = maps[g + 4 * r]! * x + maps[g + 4 * r + 1]! * y + maps[g + 4 * r + 2]! * z + maps[g + 4 * r + 3]! * w;
  }
}
