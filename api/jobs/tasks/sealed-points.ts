import type { SealedPoint } from '#shared/contracts/entries.ts';
import type { Dataset, Prediction } from '#shared/formats/types.ts';

/** Sealed circuits, predicted and observed: for one qubit the outcome 1, for more the outcome that was predicted likeliest. */
export const sealedPointsOf = (dataset: Dataset, sealed: ReadonlySet<string>, predictions: readonly Prediction[]): SealedPoint[] => {
  const predicted = new Map(predictions.map((p) => [p.id, p.probabilities]));
  return dataset.patches.flatMap(({ circuits, qubits }) =>
    circuits.flatMap(({ id, gates, shots, counts }) => {
      const told = predicted.get(id);
      if (!sealed.has(id) || !told) return [];
      const [outcome] = qubits.length === 1 ? ['1'] : Object.keys(told).sort((a, b) => (told[b] ?? 0) - (told[a] ?? 0) || (a < b ? -1 : 1));
      if (outcome === undefined) return [];
      return [{ id, length: gates.length, shots, outcome, predicted: told[outcome] ?? 0, observed: (counts[outcome] ?? 0) / shots }];
    }));
};
