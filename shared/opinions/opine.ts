import { idealSpam } from '#shared/opinions/ideal-spam.ts';
import { likelihood, positiveLikelihood, type LikelihoodEstimate } from '#shared/opinions/likelihood.ts';
import { patchCases, type PatchCase } from '#shared/opinions/patch-case.ts';
import { readFigures, readSealed, type PatchMaps, type SealedSums } from '#shared/opinions/read-figures.ts';
import { singlePass } from '#shared/opinions/single-pass.ts';
import { structured } from '#shared/opinions/structured.ts';
import type { Convergence, Opinion, OpinionFigure, OpinionInput, OpinionMethod, PredictionComparison } from '#shared/opinions/types.ts';
import { probabilitiesOf } from '#shared/method/readings.ts';

/** What one route found on one patch. */
interface PatchOpinion {
  figures: OpinionFigure[];
  sealed: SealedSums | null;
  convergence: Convergence | null;
  notes: string[];
}

const heldReadout = 'not defined: readout is held at its ideal';
const unsettled = 'The passes have not settled: the last one still moved the predicted probabilities by a tenth of the shot noise or more.';
const gaugeNote = 'Which maps are nearest to being completely positive depends on the gauge, so this constraint moves the figures by more than chance alone would.';

function together(all: readonly Convergence[]): Convergence | null {
  const [first, ...others] = all;
  if (!first) return null;
  return others.reduce((a, b) => ({
    converged: a.converged && b.converged, iterations: Math.max(a.iterations, b.iterations), limit: a.limit, gain: a.gain + b.gain,
    remaining: a.remaining === null || b.remaining === null ? null : Math.max(a.remaining, b.remaining),
  }), first);
}

/** Null where a patch has sealed circuits that are not determined, or none of them has any. */
function compared(parts: readonly (SealedSums | null)[]): PredictionComparison | null {
  const sums = parts.filter((p): p is SealedSums => p !== null);
  const circuits = sums.reduce((n, p) => n + p.circuits, 0);
  if (sums.length < parts.length || circuits === 0) return null;
  const mean = (of: (p: SealedSums) => number): number => sums.reduce((s, p) => s + of(p), 0) / circuits;
  return { value: mean((p) => p.value), official: mean((p) => p.official), ideal: mean((p) => p.ideal), circuits };
}

/**
 * Second opinions on one dataset. Making it poses the problems and runs the official estimate, which all routes start from or are
 * compared with; each route is then asked for by itself, so that the caller can tell how long it takes. Pure: the same input gives
 * the same answers, to the bit.
 */
export class SecondOpinions {
  private readonly input: OpinionInput;
  private readonly cases: PatchCase[];
  private readonly whole: boolean;
  private readonly maxima = new Map<PatchCase, LikelihoodEstimate>();

  constructor(input: OpinionInput) {
    this.input = input;
    this.cases = patchCases(input);
    this.whole = input.dataset.patches.length === 1;
  }

  opine(method: OpinionMethod): Opinion {
    const scope = this.whole ? 'register' : 'one-qubit-patches';
    if (method === 'structured' && !this.whole) return this.refused(method, 'Offered for one qubit only, not for the patches of a register.');
    const parts: PatchOpinion[] = [];
    for (const patch of this.cases) {
      const part = this.onPatch(method, patch);
      if (typeof part === 'string') return this.refused(method, part);
      parts.push(part);
    }
    const notes = [...new Set(parts.flatMap((p) => p.notes))];
    if (!this.whole) notes.push('Each qubit is taken by itself; entangling gates and the register as a whole are left out.');
    return {
      method, reason: null, scope, figures: parts.flatMap((p) => p.figures), prediction: compared(parts.map((p) => p.sealed)),
      convergence: together(parts.flatMap((p) => (p.convergence ? [p.convergence] : []))), notes,
    };
  }

  private refused(method: OpinionMethod, reason: string): Opinion {
    return { method, reason, scope: this.whole ? 'register' : 'one-qubit-patches', figures: [], prediction: null, convergence: null, notes: [] };
  }

  private onPatch(method: OpinionMethod, patch: PatchCase): PatchOpinion | string {
    const { problem } = patch;
    switch (method) {
      case 'single-pass': return this.read(patch, { maps: singlePass(patch), problem, readout: null });
      case 'ideal-spam': {
        const found = idealSpam(patch);
        return this.read(patch, { maps: found.maps, problem: found.problem, readout: heldReadout }, { notes: found.passes.settled ? [] : [unsettled] });
      }
      case 'likelihood': return this.likely(patch, this.maximum(patch));
      case 'likelihood-positive': return this.likely(patch, positiveLikelihood(patch, this.maximum(patch)), [gaugeNote]);
      case 'structured': {
        const answer = structured(patch);
        if (!answer.ok) return answer.reason;
        const { maps, sealed } = answer.estimate;
        // The circuits determine every sequence and block, so every figure of the gates is determined.
        const complete = { ...problem, complete: true };
        return { ...this.read(patch, { maps, problem: complete, readout: null }), sealed: sealed && readSealed(patch, complete, sealed) };
      }
    }
  }

  private maximum(patch: PatchCase): LikelihoodEstimate {
    const known = this.maxima.get(patch) ?? likelihood(patch);
    this.maxima.set(patch, known);
    return known;
  }

  private likely(patch: PatchCase, { maps, convergence }: LikelihoodEstimate, notes: string[] = []): PatchOpinion {
    const ended = convergence.converged ? [] : [`Did not converge: ended after ${convergence.iterations} of at most ${convergence.limit} iterations.`];
    return this.read(patch, { maps, problem: patch.problem, readout: null }, { convergence, notes: [...ended, ...notes] });
  }

  private read(patch: PatchCase, found: PatchMaps, more: Partial<PatchOpinion> = {}): PatchOpinion {
    const { set } = found.problem;
    return {
      figures: readFigures(patch, found, this.input.official),
      sealed: readSealed(patch, found.problem, probabilitiesOf(set, patch.sealed.circuits, found.maps)), convergence: null, notes: [], ...more,
    };
  }
}
