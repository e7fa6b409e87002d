import { identity, multiply, type Matrix } from '#api/demo/simulator/complex-matrix.ts';
import type { QubitNoise } from '#api/demo/simulator/device-model.ts';
import { turn } from '#api/demo/simulator/standard-unitaries.ts';

type Axis = [number, number, number];

/** Axis n and angle θ in [0, π] of a one-qubit unitary u = e^{iφ} exp(−iθ/2 n·σ); a zero angle has no axis. */
export function axisAndAngle(u: Matrix): { axis: Axis; angle: number } | null {
  const [a, b, c, d] = [0, 1, 2, 3].map((i): [number, number] => [u.re[i]!, u.im[i]!]) as [[number, number], [number, number], [number, number], [number, number]];
  const detRe = a[0] * d[0] - a[1] * d[1] - b[0] * c[0] + b[1] * c[1];
  const detIm = a[0] * d[1] + a[1] * d[0] - b[0] * c[1] - b[1] * c[0];
  const half = -Math.atan2(detIm, detRe) / 2;
  const [pr, pi] = [Math.cos(half), Math.sin(half)];
  const turned = (z: [number, number]): [number, number] => [z[0] * pr - z[1] * pi, z[0] * pi + z[1] * pr];
  const [ta, tb, tc, td] = [turned(a), turned(b), turned(c), turned(d)];
  const cosine = (ta[0] + td[0]) / 2;
  const sign = cosine < 0 ? -1 : 1;
  const s: Axis = [(-sign * (tb[1] + tc[1])) / 2, (sign * (tc[0] - tb[0])) / 2, (sign * (td[1] - ta[1])) / 2];
  const sine = Math.hypot(...s);
  if (sine < 1e-12) return null;
  return { axis: [s[0] / sine, s[1] / sine, s[2] / sine], angle: 2 * Math.atan2(sine, Math.abs(cosine)) };
}

/** The axis leant by `tilt` radians towards Z, or towards X where it lies near Z. */
function lean(axis: Axis, tilt: number): Axis {
  const towards: Axis = Math.abs(axis[2]) < 0.9 ? [0, 0, 1] : [1, 0, 0];
  const along = axis.reduce((sum, x, i) => sum + x * towards[i]!, 0);
  const across = towards.map((x, i) => x - along * axis[i]!);
  const length = Math.hypot(...across);
  const [c, s] = [Math.cos(tilt), Math.sin(tilt)];
  return axis.map((x, i) => c * x + (s * across[i]!) / length) as Axis;
}

function overRotation(axis: Axis, { angleScale: { x, y, z } }: QubitNoise): number {
  return axis[0] ** 2 * x + axis[1] ** 2 * y + axis[2] ** 2 * z;
}

/** The unitary that a device makes of an ideal one-qubit gate; `moment` −1 … 1 is the place in the run. */
export function noisyTurn(ideal: Matrix, noise: QubitNoise, moment: number): Matrix {
  const found = axisAndAngle(ideal);
  const made = found ? turn(lean(found.axis, noise.tilt), found.angle * (1 + overRotation(found.axis, noise) + noise.drift * moment)) : identity(2);
  return multiply(turn([0, 0, 1], noise.detuning), made);
}
