import atan2 from '@stdlib/math-base-special-atan2';
import { optimalAssignment } from '#shared/linalg/assignment.ts';
import { eigenvalues } from '#shared/linalg/eigenvalues.ts';

/** Ideal eigenvalues closer than this are one, seen several times; those of an orthogonal matrix are exact to 1e-15. */
const SAME = 1e-9;

/**
 * Gate loss and angle error of one gate from the eigenvalues of its noisy map.
 *
 * Loss: 1 − (1/D) Σ_i Re(μ̄_i λ_i), λ the eigenvalues of the noisy map matched to the ideal μ by the assignment that
 * minimises Σ|λ − μ|². Angle error (radians): arg of μ̄·(mean of the λ matched to μ), μ the ideal eigenvalue of greatest
 * positive imaginary part; positive = over-rotation. Both are the same in every gauge. Cost about 10·D³.
 */
export class GateLoss {
  private readonly D: number;
  private readonly muRe: Float64Array;
  private readonly muIm: Float64Array;
  /** Distinct ideal eigenvalues and how often each occurs. */
  private readonly groups: { re: number; im: number; times: number }[] = [];
  private readonly group: Int32Array;
  private readonly turning: number;
  private readonly block: Float64Array;
  private readonly re: Float64Array;
  private readonly im: Float64Array;
  private readonly place: Int32Array;
  private readonly held: Int32Array;
  private readonly cost: Float64Array;
  /** Results of the last call of `measure`; NaN where the eigenvalues could not be found. */
  loss = NaN;
  angle = NaN;

  /** @param ideal the gate's ideal D×D transfer matrix */
  constructor(ideal: Float64Array, D: number) {
    this.D = D;
    this.block = new Float64Array((D - 1) * (D - 1));
    this.re = new Float64Array(D);
    this.im = new Float64Array(D);
    this.place = new Int32Array(D);
    this.cost = new Float64Array(D * D);
    if (!this.findEigenvalues(ideal, 0)) throw new RangeError('the eigenvalues of an ideal gate could not be found');
    this.muRe = this.re.slice();
    this.muIm = this.im.slice();
    this.group = new Int32Array(D);
    for (let i = 0; i < D; i++) {
      const found = this.groups.findIndex((g) => Math.abs(g.re - this.muRe[i]!) < SAME && Math.abs(g.im - this.muIm[i]!) < SAME);
      if (found >= 0) this.groups[found]!.times++;
      else this.groups.push({ re: this.muRe[i]!, im: this.muIm[i]!, times: 1 });
      this.group[i] = found >= 0 ? found : this.groups.length - 1;
    }
    this.held = new Int32Array(this.groups.length);
    this.turning = this.groups.reduce((best, g, i) => (g.im > SAME && (best < 0 || g.im > this.groups[best]!.im) ? i : best), -1);
  }

  /** Whether the ideal gate has a complex eigenvalue, so that an angle can be read from it. */
  get turns(): boolean {
    return this.turning >= 0;
  }

  /** The distinct ideal eigenvalues, that of the angle first; null where the gate turns nothing. */
  turningSpectrum(): { re: number; im: number; times: number }[] | null {
    if (this.turning < 0) return null;
    return [this.groups[this.turning]!, ...this.groups.filter((_, i) => i !== this.turning)];
  }

  /** Reads the D×D noisy map at `at` of `maps`; sets `loss` and `angle`. */
  measure(maps: Float64Array, at: number): void {
    this.loss = this.angle = NaN;
    if (!this.findEigenvalues(maps, at)) return;
    this.match();
    const { D, groups, place, re, im } = this;
    let kept = 0;
    let turnRe = 0;
    let turnIm = 0;
    for (let i = 0; i < D; i++) {
      const g = groups[place[i]!]!;
      kept += g.re * re[i]! + g.im * im[i]!;
      if (place[i] === this.turning) {
        turnRe += g.re * re[i]! + g.im * im[i]!;
        turnIm += g.re * im[i]! - g.im * re[i]!;
      }
    }
    this.loss = 1 - kept / D;
    if (this.turning >= 0) this.angle = atan2(turnIm, turnRe);
  }

  /** A trace-preserving map has the eigenvalue 1 exactly; the others are those of the block without first row and column. */
  private findEigenvalues(maps: Float64Array, at: number): boolean {
    const m = this.D - 1;
    for (let i = 0; i < m; i++) for (let j = 0; j < m; j++) this.block[i * m + j] = maps[at + (i + 1) * this.D + j + 1]!;
    const found = eigenvalues(this.block, m, this.re, this.im);
    this.re[m] = 1;
    this.im[m] = 0;
    return found;
  }

  /** Gives each λ the group of its μ. Where each is nearest to a μ of its own, that is the optimum; else the assignment is solved. */
  private match(): void {
    const { D, groups, place, held, re, im } = this;
    held.fill(0);
    for (let i = 0; i < D; i++) {
      let best = 0;
      let least = Infinity;
      for (let g = 0; g < groups.length; g++) {
        const dr = re[i]! - groups[g]!.re;
        const di = im[i]! - groups[g]!.im;
        if (dr * dr + di * di < least) {
          least = dr * dr + di * di;
          best = g;
        }
      }
      place[i] = best;
      held[best]!++;
    }
    if (groups.every((g, i) => g.times === held[i])) return;
    for (let i = 0; i < D; i++) {
      for (let j = 0; j < D; j++) {
        const dr = re[i]! - this.muRe[j]!;
        const di = im[i]! - this.muIm[j]!;
        this.cost[i * D + j] = dr * dr + di * di;
      }
    }
    const matched = optimalAssignment(this.cost, D);
    for (let i = 0; i < D; i++) place[i] = this.group[matched[i]!]!;
  }
}
