import { nodeHash, type Hash } from '#shared/merkle/hash.ts';

const same = (a: Hash, b: Hash): boolean => a.length === b.length && a.every((byte, i) => byte === b[i]);
const isCount = (n: number): boolean => Number.isSafeInteger(n) && n >= 0;
const half = (n: number): number => Math.floor(n / 2);

/** Does the path lead from the leaf to the root? Never throws. Source: RFC 9162, section 2.1.3.2. */
export function includes(leaf: Hash, index: number, size: number, path: readonly Hash[], root: Hash): boolean {
  if (!isCount(index) || !isCount(size) || index >= size) return false;
  let fn = index;
  let sn = size - 1;
  let r = leaf;
  for (const p of path) {
    if (sn === 0) return false;
    if (fn % 2 === 1 || fn === sn) {
      r = nodeHash(p, r);
      while (fn % 2 === 0 && fn !== 0) {
        fn = half(fn);
        sn = half(sn);
      }
    } else r = nodeHash(r, p);
    fn = half(fn);
    sn = half(sn);
  }
  return sn === 0 && same(r, root);
}

/** Does the tree of `second` leaves begin with that of `first`? Never throws. Source: RFC 9162, section 2.1.4.2. */
export function isConsistent(first: number, second: number, firstRoot: Hash, secondRoot: Hash, path: readonly Hash[]): boolean {
  if (!isCount(first) || !isCount(second) || first < 1 || first > second) return false;
  if (first === second) return path.length === 0 && same(firstRoot, secondRoot);
  if (path.length === 0) return false;
  const isPower = (n: number): boolean => {
    let k = 1;
    while (k < n) k *= 2;
    return k === n;
  };
  const whole = isPower(first) ? [firstRoot, ...path] : [...path];
  let fn = first - 1;
  let sn = second - 1;
  while (fn % 2 === 1) {
    fn = half(fn);
    sn = half(sn);
  }
  let fr = whole[0]!;
  let sr = whole[0]!;
  for (const c of whole.slice(1)) {
    if (sn === 0) return false;
    if (fn % 2 === 1 || fn === sn) {
      fr = nodeHash(c, fr);
      sr = nodeHash(c, sr);
      while (fn % 2 === 0 && fn !== 0) {
        fn = half(fn);
        sn = half(sn);
      }
    } else sr = nodeHash(sr, c);
    fn = half(fn);
    sn = half(sn);
  }
  return sn === 0 && same(fr, firstRoot) && same(sr, secondRoot);
}
