/** Most QR steps spent on one eigenvalue; ten is usual. */
const MOST_STEPS = 60;

/**
 * Eigenvalues of a real n×n matrix by reduction to Hessenberg form and the implicit double-shift QR iteration
 * (EISPACK's HQR, "The QR algorithm for real Hessenberg matrices", Numer. Math. 14, 219, 1970). Backward stable.
 * `a` (row-major) is overwritten; real and imaginary parts go to `re` and `im`. Only + − × ÷ and sqrt. Cost about 10 n³.
 * @returns false when the iteration has not settled or a value is not finite
 */
export function eigenvalues(a: Float64Array, n: number, re: Float64Array, im: Float64Array): boolean {
  for (let i = 0; i < n * n; i++) if (!Number.isFinite(a[i]!)) return false;
  toHessenberg(a, n);
  let norm = 0;
  for (let i = 0; i < n; i++) for (let j = Math.max(0, i - 1); j < n; j++) norm += Math.abs(a[i * n + j]!);
  let end = n - 1;
  let shift = 0;
  let steps = 0;
  while (end >= 0) {
    const l = deflation(a, n, end, norm);
    let x = a[end * n + end]!;
    if (l === end) {
      re[end] = x + shift;
      im[end--] = 0;
      steps = 0;
      continue;
    }
    let y = a[(end - 1) * n + end - 1]!;
    let w = a[end * n + end - 1]! * a[(end - 1) * n + end]!;
    if (l === end - 1) {
      pair(x, y, w, shift, end, re, im);
      end -= 2;
      steps = 0;
      continue;
    }
    if (steps === MOST_STEPS) return false;
    if (steps % 10 === 9) {
      shift += x;
      for (let i = 0; i <= end; i++) a[i * n + i]! -= x;
      const s = Math.abs(a[end * n + end - 1]!) + Math.abs(a[(end - 1) * n + end - 2]!);
      x = y = 0.75 * s;
      w = -0.4375 * s * s;
    }
    steps++;
    doubleStep(a, n, l, end, x, y, w);
  }
  return true;
}

function toHessenberg(a: Float64Array, n: number): void {
  const v = new Float64Array(n);
  for (let m = 1; m < n - 1; m++) {
    let tail = 0;
    for (let i = m + 1; i < n; i++) tail += a[i * n + m - 1]! * a[i * n + m - 1]!;
    if (tail === 0) continue;
    const head = a[m * n + m - 1]!;
    const size = Math.sqrt(tail + head * head);
    const alpha = head > 0 ? -size : size;
    for (let i = m; i < n; i++) v[i] = a[i * n + m - 1]!;
    v[m] = head - alpha;
    const beta = 1 / (size * size - head * alpha);
    for (let j = m - 1; j < n; j++) {
      let s = 0;
      for (let i = m; i < n; i++) s += v[i]! * a[i * n + j]!;
      s *= beta;
      for (let i = m; i < n; i++) a[i * n + j]! -= s * v[i]!;
    }
    for (let i = 0; i < n; i++) {
      let s = 0;
      for (let j = m; j < n; j++) s += v[j]! * a[i * n + j]!;
      s *= beta;
      for (let j = m; j < n; j++) a[i * n + j]! -= s * v[j]!;
    }
    a[m * n + m - 1] = alpha;
    for (let i = m + 1; i < n; i++) a[i * n + m - 1] = 0;
  }
}

/** Row at which the active block begins: the first from below whose subdiagonal element is lost in rounding. */
function deflation(a: Float64Array, n: number, end: number, norm: number): number {
  let l = end;
  for (; l >= 1; l--) {
    const s = Math.abs(a[(l - 1) * n + l - 1]!) + Math.abs(a[l * n + l]!);
    const scale = s === 0 ? norm : s;
    if (Math.abs(a[l * n + l - 1]!) + scale === scale) {
      a[l * n + l - 1] = 0;
      break;
    }
  }
  return l;
}

/** The two eigenvalues of the last 2×2 block. */
function pair(x: number, y: number, w: number, shift: number, end: number, re: Float64Array, im: Float64Array): void {
  const p = 0.5 * (y - x);
  const q = p * p + w;
  const root = Math.sqrt(Math.abs(q));
  const base = x + shift;
  if (q >= 0) {
    const z = p >= 0 ? p + root : p - root;
    re[end - 1] = base + z;
    re[end] = z !== 0 ? base - w / z : base + z;
    im[end - 1] = im[end] = 0;
  } else {
    re[end - 1] = re[end] = base + p;
    im[end - 1] = root;
    im[end] = -root;
  }
}

/** One implicit double-shift QR step on rows l … end. */
function doubleStep(a: Float64Array, n: number, l: number, end: number, shiftX: number, shiftY: number, w: number): void {
  let p = 0, q = 0, r = 0;
  let m = end - 2;
  for (; m >= l; m--) {
    const z = a[m * n + m]!;
    const dx = shiftX - z;
    const dy = shiftY - z;
    p = (dx * dy - w) / a[(m + 1) * n + m]! + a[m * n + m + 1]!;
    q = a[(m + 1) * n + m + 1]! - z - dx - dy;
    r = a[(m + 2) * n + m + 1]!;
    const s = Math.abs(p) + Math.abs(q) + Math.abs(r);
    p /= s;
    q /= s;
    r /= s;
    if (m === l) break;
    const u = Math.abs(a[m * n + m - 1]!) * (Math.abs(q) + Math.abs(r));
    const v = Math.abs(p) * (Math.abs(a[(m - 1) * n + m - 1]!) + Math.abs(z) + Math.abs(a[(m + 1) * n + m + 1]!));
    if (u + v === v) break;
  }
  for (let i = m + 2; i <= end; i++) {
    a[i * n + i - 2] = 0;
    if (i !== m + 2) a[i * n + i - 3] = 0;
  }
  for (let k = m; k < end; k++) {
    let x = 0;
    const three = k !== end - 1;
    if (k !== m) {
      p = a[k * n + k - 1]!;
      q = a[(k + 1) * n + k - 1]!;
      r = three ? a[(k + 2) * n + k - 1]! : 0;
      x = Math.abs(p) + Math.abs(q) + Math.abs(r);
      if (x === 0) continue;
      p /= x;
      q /= x;
      r /= x;
    }
    const size = Math.sqrt(p * p + q * q + r * r);
    const s = p >= 0 ? size : -size;
    if (s === 0) continue;
    if (k !== m) a[k * n + k - 1] = -s * x;
    else if (l !== m) a[k * n + k - 1] = -a[k * n + k - 1]!;
    p += s;
    x = p / s;
    const y = q / s;
    const z = r / s;
    q /= p;
    r /= p;
    for (let j = k; j <= end; j++) {
      let t = a[k * n + j]! + q * a[(k + 1) * n + j]!;
      if (three) {
        t += r * a[(k + 2) * n + j]!;
        a[(k + 2) * n + j]! -= t * z;
      }
      a[(k + 1) * n + j]! -= t * y;
      a[k * n + j]! -= t * x;
    }
    const last = Math.min(end, k + 3);
    for (let i = l; i <= last; i++) {
      let t = x * a[i * n + k]! + y * a[i * n + k + 1]!;
      if (three) {
        t += z * a[i * n + k + 2]!;
        a[i * n + k + 2]! -= t * r;
      }
      a[i * n + k + 1]! -= t * q;
      a[i * n + k]! -= t;
    }
  }
}
