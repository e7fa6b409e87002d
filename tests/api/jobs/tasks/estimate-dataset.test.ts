import { beforeAll, describe, expect, it } from 'vitest';
import { simulateDataset } from '#api/demo/simulator/simulate-dataset.ts';
import { estimateDataset, type EstimateDatasetOutput, type EstimateReport } from '#api/jobs/tasks/estimate-dataset.ts';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { contentIdOf } from '#shared/formats/canonical-json.ts';
import { readDataset } from '#shared/formats/read-dataset.ts';
import type { Dataset, Result, Seal } from '#shared/formats/types.ts';
import { drawSheet } from '#shared/runsheet/draw-sheet.ts';
import { matchSheet } from '#shared/runsheet/match-sheet.ts';
import { checkSeal, openSeal } from '#shared/runsheet/seal.ts';
import { lineModel } from '#tests/shared/method/chain/made-register.ts';

/** From a sealed sheet of the class through a simulated device to the registry's own estimate. */
function run(classId: string, size: number, circuits: number) {
  const gateClass = gateClassById(classId)!;
  const { sheet, secret, designs } = drawSheet({
    gateClass, register: Array.from({ length: size }, (_, q) => `q${q}`), circuits, shots: 1000, seed: '5a',
    issued: { id: 'RS-000009', device: { provider: 'Fellside Ion Works', name: 'Gantry-3' }, drawnAt: '2026-05-01T00:00:00Z' }, newSecret: () => new Uint8Array(32).fill(7),
  });
  const seal = openSeal(sheet, secret!);
  const dataset = simulateDataset({
    sheet, sheetSha256: contentIdOf(sheet), model: lineModel(size), seed: classId, title: 'Spring run', device: { provider: 'Fellside Ion Works', name: 'Gantry-3', modality: 'trapped-ion' },
    startedAt: new Date('2026-05-04T08:00:00Z'), endedAt: new Date('2026-05-04T10:00:00Z'), software: 'test', contributors: [{ name: 'A. Example' }],
  });
  const reports: EstimateReport[] = [];
  const output = estimateDataset({ bytes: new TextEncoder().encode(JSON.stringify(dataset)), seal, replicates: 60 }, (r) => reports.push(r));
  return { sheet, seal, dataset, designs, output, reports };
}

describe.each([['chained-cz-2q/1', 2, 3], ['chained-cz-3q/1', 3, 6]] as const)('the registry\'s estimate of a sealed sheet of %s', (classId, size, patches) => {
  let made: ReturnType<typeof run>;
  let dataset: Dataset;
  let seal: Seal;
  let output: EstimateDatasetOutput;
  let result: Result;
  beforeAll(() => {
    made = run(classId, size, 600);
    ({ dataset, seal, output } = made);
    result = JSON.parse(new TextDecoder().decode(output.result)) as Result;
  }, 120_000);

  it('the sheet has a patch for each qubit and pair (and the whole), and the dataset matches it', () => {
    expect(made.sheet.patches).toHaveLength(patches);
    expect(readDataset(new TextEncoder().encode(JSON.stringify(dataset)))).toMatchObject({ ok: true });
    expect(matchSheet(dataset, made.sheet)).toEqual([]);
    expect(checkSeal(seal, made.sheet)).toEqual([]);
    expect(made.designs.every((d) => d.conditionRatio >= 0.01)).toBe(true);
  });

  it('every estimated patch is sound and settled; bench figures over the whole register are there', () => {
    expect(result.patches).toHaveLength(2 * size - 1);
    expect(result.patches.every((p) => p.sound && p.settled && p.complete)).toBe(true);
    for (const depth of [0, 1, 4, 8, 16, 32, 64]) {
      const figure = result.figures.find((f) => f.key === 'retained-signal' && f.depth === depth)!;
      expect(figure).toMatchObject({ determined: true, qubits: Array.from({ length: size }, (_, q) => q), extrapolated: depth > 32 });
    }
    expect(result.sealed).toBe(seal.sealed.length);
  });

  it('the sealed circuits of the whole register are predicted better than by the ideal model, and the check passes', () => {
    const whole = dataset.patches.find((p) => p.qubits.length === size)!;
    expect(whole.circuits.filter((c) => seal.sealed.includes(c.id))).toHaveLength(size === 2 ? 150 : 40);
    expect(result.sealedCheck).toMatchObject({ passed: true });
    expect(result.sealedCheck!.value).toBeLessThan(result.sealedCheck!.ideal);
    expect(result.figures.find((f) => f.key === 'prediction-error')!.value).toBe(result.sealedCheck!.value);
  });

  it('drift is tested in eight blocks over all estimated patches, and none is far on a steady device', () => {
    expect(output.drift.map((b) => b.block)).toEqual([1, 2, 3, 4, 5, 6, 7, 8]);
    expect(output.drift.reduce((sum, b) => sum + b.circuits, 0)).toBe(dataset.patches.flatMap((p) => p.circuits).length - seal.sealed.length);
    for (const block of output.drift) expect(Math.abs(block.sigmas)).toBeLessThan(4);
  });

  it('each sealed circuit has its point, told in the outcomes of its own patch', () => {
    expect(output.sealedPoints.map((p) => p.id).sort()).toEqual([...seal.sealed].sort());
    const width = new Map(dataset.patches.flatMap((p) => p.circuits.map((c) => [c.id, p.qubits.length] as const)));
    for (const point of output.sealedPoints) {
      expect(point.outcome).toHaveLength(width.get(point.id)!);
      expect(Math.abs(point.predicted - point.observed)).toBeLessThan(0.15);
    }
  });

  it('the counts of every patch are told: what was estimated from and what was sealed', () => {
    expect(output.summary.counts.map((c) => [c.qubits.length, c.estimated])).toEqual(dataset.patches.map((p) => [p.qubits.length, p.qubits.length === 1 ? 200 : p.qubits.length === 2 ? 600 : 0]));
  });

  it('progress never falls', () => {
    const fractions = made.reports.map((r) => r.fraction);
    expect(fractions.every((f, i) => i === 0 || f >= fractions[i - 1]!)).toBe(true);
    expect(fractions.length).toBeGreaterThan(5);
  });
});
