import { lossDetermined } from '#shared/method/determined.ts';
import { ErrorPerGate } from '#shared/method/error-per-gate.ts';
import { planFigure, type FigurePlan } from '#shared/method/figure-plan.ts';
import { GateLoss } from '#shared/method/gate-loss.ts';
import type { GateSet } from '#shared/method/gate-set.ts';
import type { PatchProblem } from '#shared/method/patch-problem.ts';

/** Gate loss and angle error of gate k, read from the maps of a context. `unknown`: why neither is determined, or null. */
export function planGate(set: GateSet, k: number, qubits: readonly number[], unknown: string | null): { loss: FigurePlan; angle: FigurePlan } {
  const gate = set.labels[k]!;
  const meter = new GateLoss(set.gates[k]!, set.D);
  return {
    loss: planFigure({
      key: 'gate-loss', gate, qubits, reason: unknown,
      read: (c) => {
        meter.measure(c.maps.gates, k * set.D * set.D);
        return meter.loss;
      },
    }),
    angle: planFigure({
      key: 'angle-error', gate, qubits,
      reason: meter.turns ? unknown : 'not defined: the ideal gate has no complex eigenvalue, so no angle can be read from it',
      // Losses are read before angles, so the meter holds this context's eigenvalues.
      read: () => meter.angle,
    }),
  };
}

/** Error per gate of the patch, and gate loss and angle error of each of its gates. */
export function planGateFigures(problem: PatchProblem, qubits: readonly number[]): { error: FigurePlan; loss: FigurePlan[]; angle: FigurePlan[] } {
  const { set } = problem;
  const loss: FigurePlan[] = [];
  const angle: FigurePlan[] = [];
  set.labels.forEach((_, k) => {
    const own = planGate(set, k, qubits, lossDetermined(problem, [k]) ? null : 'not determined by this gate set');
    loss.push(own.loss);
    angle.push(own.angle);
  });
  const all = set.gates.map((_, k) => k);
  const meter = new ErrorPerGate(set);
  let reason: string | null = null;
  if (!meter.defined) reason = 'not defined: random circuits over these gates do not mix every error into one decay';
  else if (!lossDetermined(problem, all)) reason = 'not determined by this gate set';
  const error = planFigure({ key: 'error-per-gate', qubits, reason, read: (c) => meter.measure(c.maps.gates) });
  return { error, loss, angle };
}
