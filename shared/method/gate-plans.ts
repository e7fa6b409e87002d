import { lossDetermined } from '#shared/method/determined.ts';
import { ErrorPerGate } from '#shared/method/error-per-gate.ts';
import { planFigure, type FigurePlan } from '#shared/method/figure-plan.ts';
import { GateLoss } from '#shared/method/gate-loss.ts';
import type { PatchProblem } from '#shared/method/patch-problem.ts';

/** Error per gate of the patch, and gate loss and angle error of each of its gates. */
export function planGateFigures(problem: PatchProblem, qubits: readonly number[]): { error: FigurePlan; loss: FigurePlan[]; angle: FigurePlan[] } {
  const { set } = problem;
  const size = set.D * set.D;
  const loss: FigurePlan[] = [];
  const angle: FigurePlan[] = [];
  set.labels.forEach((gate, k) => {
    const meter = new GateLoss(set.gates[k]!, set.D);
    const unknown = lossDetermined(problem, [k]) ? null : 'not determined by this gate set';
    loss.push(planFigure({
      key: 'gate-loss', gate, qubits, reason: unknown,
      read: (c) => {
        meter.measure(c.maps.gates, k * size);
        return meter.loss;
      },
    }));
    angle.push(planFigure({
      key: 'angle-error', gate, qubits,
      reason: meter.turns ? unknown : 'not defined: the ideal gate has no complex eigenvalue, so no angle can be read from it',
      // Losses are read before angles, so the meter holds this context's eigenvalues.
      read: () => meter.angle,
    }));
  });
  const all = set.gates.map((_, k) => k);
  const meter = new ErrorPerGate(set);
  let reason: string | null = null;
  if (!meter.defined) reason = 'not defined: random circuits over these gates do not mix every error into one decay';
  else if (!lossDetermined(problem, all)) reason = 'not determined by this gate set';
  const error = planFigure({ key: 'error-per-gate', qubits, reason, read: (c) => meter.measure(c.maps.gates) });
  return { error, loss, angle };
}
