import { describe, expect, it } from 'vitest';
import { driftOf, normalScore } from '#api/jobs/tasks/drift.ts';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { contentIdOf } from '#shared/formats/canonical-json.ts';
import type { Dataset, PlainCircuit } from '#shared/formats/types.ts';
import { estimate } from '#shared/method/estimate.ts';
import { moments } from '#shared/stats/moments.ts';
import { drawCircuits, takeCounts } from '#tests/support/record.ts';

const gateClass = gateClassById('quarter-turn-1q/1')!;
const datasetOf = (seed: number, change: (circuits: Dataset['patches'][0]['circuits']) => void = () => undefined): Dataset => {
  const circuits = takeCounts(drawCircuits(240, seed), 1000, seed + 500);
  change(circuits);
  return {
    format: 'evenbeam.dataset', formatVersion: '1.0.0', title: 't', gateClass: gateClass.id, device: { provider: 'Larkspur Quantics', name: 'Meadow-5', modality: 'simulated' }, register: ['q0'], gates: structuredClone(gateClass.gates),
    patches: [{ qubits: [0], circuits }], acquisition: { startedAt: '2026-05-03T08:00:00Z', endedAt: '2026-05-03T09:00:00Z', software: 'x' }, contributors: [], licence: 'CC-BY-4.0',
  };
};
const driftIn = (dataset: Dataset) => {
  const contentId = contentIdOf(dataset);
  const circuits: PlainCircuit[] = dataset.patches.flatMap(({ qubits, circuits: list }) => list.map(({ id, gates }) => ({ id, qubits, gates })));
  const { result } = estimate({ dataset, contentId, gateClass, replicates: 2, predict: { format: 'evenbeam.circuits', formatVersion: '1.0.0', circuits } });
  return driftOf(dataset, contentId, new Set(), result, result.predictions);
};

describe('drift between blocks', () => {
  it('is a standard score on honest data: over 20 datasets of 8 blocks the mean is 0 and the spread 1, within three standard errors', () => {
    const scores = Array.from({ length: 20 }, (_, i) => driftIn(datasetOf(i + 1)).map((b) => b.sigmas)).flat();
    expect(scores).toHaveLength(160);
    const { mean, deviation } = moments(Float64Array.from(scores));
    // sd of the mean 1/√160 = 0.079; sd of the spread about 0.06 for scores with the skew of a sum of some 30 squares.
    expect(Math.abs(mean)).toBeLessThan(0.24);
    expect(Math.abs(deviation - 1)).toBeLessThan(0.2);
    // A standardised sum of squares would have skewness 0.6; the standard error of 160 normal values is √(6/160) = 0.19.
    expect(Math.abs(scores.reduce((sum, z) => sum + ((z - mean) / deviation) ** 3, 0) / scores.length)).toBeLessThan(0.5);
  });

  it('singles out the block in which the readout moved', () => {
    const dataset = datasetOf(31, (circuits) => {
      for (const c of circuits.filter((circuit) => circuit.block === 5)) {
        const ones = Math.min(c.shots, Math.round((c.counts['1'] ?? 0) + 0.06 * c.shots));
        c.counts = { '0': c.shots - ones, '1': ones };
      }
    });
    const blocks = driftIn(dataset);
    const far = [...blocks].sort((a, b) => b.sigmas - a.sigmas)[0];
    expect(far?.block).toBe(5);
    expect(far?.sigmas).toBeGreaterThan(5);
    expect(blocks.map((b) => b.block)).toEqual([1, 2, 3, 4, 5, 6, 7, 8]);
    expect(blocks.map((b) => b.circuits)).toEqual(Array.from({ length: 8 }, () => 30));
  });

  it('gives the same scores for the same data, none for sealed circuits or circuits without a block', () => {
    const dataset = datasetOf(40);
    expect(driftIn(dataset)).toEqual(driftIn(dataset));
    for (const c of dataset.patches[0]!.circuits) delete c.block;
    expect(driftIn(dataset)).toEqual([]);
  });
});

describe('the normal score of a sum of squares', () => {
  // Quantiles of chi-square with 30 degrees of freedom at 1, 50 and 99 %: 14.953, 29.336, 50.892 (printed tables; from memory).
  it.each([[14.953, -2.326], [29.336, 0], [50.892, 2.326]])('of %d from chi-square with 30 degrees of freedom is %d', (x, z) => {
    expect(Math.abs(normalScore(x, 30, Math.sqrt(60)) - z)).toBeLessThan(0.01);
  });
});
