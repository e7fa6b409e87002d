import type { PlainCircuit, Prediction } from '#shared/formats/types.ts';
import { ESTIMATE, REPLICATES } from '#shared/method/chain/map-table.ts';
import { RegisterEvaluator } from '#shared/method/chain/register-evaluator.ts';
import { reasonAgainstCircuit, type RegisterMaps } from '#shared/method/chain/register-maps.ts';
import { compileCircuit } from '#shared/method/chain/register-program.ts';
import { LARGE_REGISTER, LARGE_REPLICATES, LARGEST_REGISTER } from '#shared/method/constants.ts';
import { outcomeLabels } from '#shared/method/frequencies.ts';
import { droppedReason } from '#shared/method/patch-report.ts';
import { percentileInterval } from '#shared/stats/bootstrap-intervals.ts';

/** How many of the replicates circuits over n qubits are read from. */
export function replicatesRead(n: number, count: number): number {
  return n >= LARGE_REGISTER ? Math.min(count, LARGE_REPLICATES) : count;
}

/** Outcome probabilities of circuits over any qubits of the register, in any order, with 95 % percentile intervals, unclipped. */
export function predictRegister(maps: RegisterMaps, register: readonly string[], count: number, circuits: readonly PlainCircuit[]): Prediction[] {
  const evaluator = new RegisterEvaluator();
  return circuits.map((circuit) => {
    const n = circuit.qubits.length;
    const refused = (reason: string): Prediction => ({ id: circuit.id, determined: false, reason, firstOrderOnly: false, probabilities: null, intervals: null });
    const against = n > LARGEST_REGISTER ? 'register too large' : reasonAgainstCircuit(maps, register, circuit);
    if (against !== null) return refused(against);
    const program = compileCircuit(maps, circuit);
    const read = replicatesRead(n, count);
    const { d } = program;
    const estimate = new Float64Array(d);
    evaluator.run(program, ESTIMATE, estimate, 0);
    const rows = new Float64Array(read * d);
    for (let b = 0; b < read; b++) evaluator.run(program, REPLICATES + b, rows, b * d);
    const probabilities: Record<string, number> = {};
    const intervals: Record<string, [number, number]> = {};
    let kept = read;
    outcomeLabels(n).forEach((label, o) => {
      const sorted = Float64Array.from({ length: read }, (_, b) => rows[b * d + o]!).filter((v) => Number.isFinite(v)).sort();
      kept = Math.min(kept, sorted.length);
      probabilities[label] = estimate[o]!;
      if (sorted.length === 0) return;
      const { low, high } = percentileInterval(sorted, 0.95);
      intervals[label] = [low, high];
    });
    const dropped = droppedReason(read - kept, read);
    if (dropped !== null) return refused(dropped);
    return { id: circuit.id, determined: true, reason: null, firstOrderOnly: false, probabilities, intervals: kept > 0 ? intervals : null };
  });
}
