import type { ChainEstimate } from '#shared/method/chain/estimate-chain.ts';
import { firstReplicates, type LocalEstimate } from '#shared/method/chain/estimate-local.ts';
import type { PairEstimate } from '#shared/method/chain/estimate-pair.ts';
import { patchContext, readRows, type ReadFigure } from '#shared/method/chain/read-rows.ts';
import type { FigurePlan } from '#shared/method/figure-plan.ts';
import { planGate, planGateFigures } from '#shared/method/gate-plans.ts';

export interface GateFigures {
  error: ReadFigure[];
  loss: ReadFigure[];
  angle: ReadFigure[];
}

/** Error per gate of each one-qubit patch; gate loss and angle error of every gate. Patches in file order. */
export function readGateFigures({ locals, pairs }: ChainEstimate, count: number): GateFigures {
  const out: GateFigures = { error: [], loss: [], angle: [] };
  const parts = [
    ...locals.map((l) => ({ place: l.patch, read: () => readLocal(l, count) })),
    ...pairs.map((p) => ({ place: p.patch, read: () => readPair(p, count) })),
  ].sort((a, b) => a.place - b.place);
  for (const figure of parts.flatMap((part) => part.read())) {
    const { key } = figure.plan;
    out[key === 'error-per-gate' ? 'error' : key === 'gate-loss' ? 'loss' : 'angle'].push(figure);
  }
  return out;
}

const refuse = (plans: readonly FigurePlan[], reason: string | null): FigurePlan[] => plans.map((p) => (reason === null ? p : { ...p, reason }));

function readLocal({ qubit, problem, passes, replicates, blocked }: LocalEstimate, count: number): ReadFigure[] {
  const { error, loss, angle } = planGateFigures(problem, [qubit]);
  return readRows(refuse([error, ...loss, ...angle], blocked), count, count, patchContext(problem, passes, firstReplicates(replicates, count)));
}

function readPair({ set, layout, qubits, blocked, fit }: PairEstimate, count: number): ReadFigure[] {
  const gates = [...layout.gateAt.keys()].filter((k) => layout.gateAt[k]! >= 0).map((k) => planGate(set, k, qubits, null));
  const plans = refuse([...gates.map((g) => g.loss), ...gates.map((g) => g.angle)], blocked);
  return readRows(plans, count, count, fit ? patchContext(fit.problem, fit.passes, fit.replicates) : () => null);
}
