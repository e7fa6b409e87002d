import { gateClassById } from '#shared/domain/gate-classes.ts';
import type { Dataset, GateClass } from '#shared/formats/types.ts';
import { idealGateSet } from '#shared/method/gate-set.ts';
import { dataset, drawCircuits, drawCounts, makeNoisy, seeded, slowProbabilities } from '#tests/shared/method/made.ts';

export interface BenchJob {
  name: string;
  dataset: Dataset;
  gateClass: GateClass;
}

/** A simulated device of a shipped joint class: error of a few tenths of a percent, 1,000 shots a circuit, always the same counts. */
export function benchJob(classId: string, count: number): BenchJob {
  const gateClass = gateClassById(classId);
  if (!gateClass) throw new Error(`no gate class ${classId}`);
  const qubits = Array.from({ length: gateClass.registerSize }, (_, q) => q);
  const generator = seeded(`bench ${classId}`);
  const set = idealGateSet(gateClass.gates, qubits);
  const circuits = drawCircuits(gateClass.gates, gateClass.lengths, count, generator);
  const size = set.n === 1 ? 0.03 : 0.01;
  const probabilities = slowProbabilities(set, makeNoisy(set, size, size / 10, 0.02, generator), circuits);
  return { name: `${classId}, ${count} circuits`, gateClass, dataset: dataset([...gateClass.gates], drawCounts(circuits, probabilities, set.n, 1000, generator), classId) };
}
