import { describe, expect, it } from 'vitest';
import { createGenerator } from '#api/demo/simulator/generator.ts';
import { demoDevices } from '#api/demo/devices.ts';
import { planRun } from '#api/demo/device-truth.ts';
import { perfectQubit } from '#api/demo/simulator/device-model.ts';
import { simulateDataset } from '#api/demo/simulator/simulate-dataset.ts';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { readDataset } from '#shared/formats/read-dataset.ts';
import type { Dataset, RunSheet } from '#shared/formats/types.ts';

const startedAt = new Date('2026-05-04T08:00:00Z');

/** A small sheet with every patch that its class asks for; ten circuits a patch are enough to try the file. */
function sheetFor(classId: string, register: string[], id: string | null = null): RunSheet {
  const gateClass = gateClassById(classId)!;
  const stream = createGenerator(`sheet ${classId}`);
  const all = register.map((_, q) => q);
  const sets = gateClass.kind === 'joint' ? [all] : [...all.map((q) => [q]), ...all.slice(1).map((q) => [q - 1, q]), ...(all.length > 2 ? [all] : [])];
  const patches = sets.map((qubits, k) => {
    const labels = gateClass.gates.filter((g) => g.targets.every((t) => qubits.includes(t))).map((g) => g.label);
    const circuits = Array.from({ length: 24 }, (_, i) => ({ id: `c${k}-${i}`, gates: i === 0 ? [...labels] : Array.from({ length: 4 }, () => labels[Math.floor(stream.next() * labels.length)]!) }));
    return { qubits, sealed: 0, circuits };
  });
  return { format: 'evenbeam.run-sheet', formatVersion: '1.0.0', id, gateClass: classId, device: null, register, gates: gateClass.gates, shots: 1000, seed: '00', sealSha256: null, patches, drawnAt: null };
}

function simulate(name: string, classId: string, seed = 'a', sheetSha256: string | null = null): { sheet: RunSheet; dataset: Dataset } {
  const device = demoDevices.find((d) => d.name === name)!;
  const run = planRun(device, classId, startedAt);
  const sheet = sheetFor(classId, run.register, sheetSha256 ? 'RS-000001' : null);
  const dataset = simulateDataset({
    sheet, sheetSha256, model: run.model, seed, title: 'Spring run', device: run.device, startedAt, endedAt: run.endedAt(24_000), software: device.software,
    contributors: [{ name: 'A. Example' }],
  });
  return { sheet, dataset };
}

describe('simulateDataset', () => {
  const measured = demoDevices.flatMap((d) => Object.keys(d.registers).map((id) => [d.name, id] as const));

  it.each(measured)('makes of %s in %s a file that the registry reads without a fault', (name, classId) => {
    const reading = readDataset(new TextEncoder().encode(JSON.stringify(simulate(name, classId).dataset)));
    expect(reading).toMatchObject({ ok: true });
  });

  it('runs every circuit of the sheet once, in its order, in eight blocks of equal size', () => {
    const { sheet, dataset } = simulate('Meadow-5', 'chained-cz-3q/1');
    dataset.patches.forEach((patch, k) => {
      expect(patch.circuits.map(({ id, gates }) => ({ id, gates }))).toEqual(sheet.patches[k]!.circuits);
      expect(patch.circuits.map((c) => c.block)).toEqual(Array.from({ length: 24 }, (_, i) => 1 + Math.floor(i / 3)));
    });
  });

  it('names the run sheet where it has a number, and none otherwise', () => {
    const digest = 'ab'.repeat(32);
    expect(simulate('Meadow-5', 'quarter-turn-1q/1', 'a', digest).dataset.runSheet).toEqual({ id: 'RS-000001', sha256: digest });
    expect(simulate('Meadow-5', 'quarter-turn-1q/1').dataset.runSheet).toBeNull();
  });

  it('gives the same counts for the same seed and others for another', () => {
    const counts = (seed: string): unknown => simulate('Tarn-1', 'quarter-turn-1q/1', seed).dataset.patches;
    expect(counts('a')).toEqual(counts('a'));
    expect(counts('a')).not.toEqual(counts('b'));
  });

  it('lets the rotation angle drift from −drift in the first block to +drift in the last', () => {
    const sheet = sheetFor('quarter-turn-1q/1', ['q']);
    const sixteen = Array.from({ length: 16 }, () => 'rx');
    const [patch] = sheet.patches;
    patch!.circuits = Array.from({ length: 8 }, (_, i) => ({ id: `d${i}`, gates: [...sixteen, 'rx'] }));
    const model = { qubits: [{ ...perfectQubit, drift: 0.02 }], pairs: [] };
    const shots = 1_000_000;
    const { patches } = simulateDataset({ sheet: { ...sheet, shots }, sheetSha256: null, model, seed: 'drift', title: 't', device: { provider: 'P', name: 'N', modality: 'simulated' }, startedAt, endedAt: startedAt, software: 's', contributors: [{ name: 'A' }] });
    patches[0]!.circuits.forEach((c, i) => {
      const angle = 17 * (Math.PI / 2) * (1 + 0.02 * ((2 * i + 1) / 8 - 1));
      const expected = Math.sin(angle / 2) ** 2;
      expect(Math.abs((c.counts['1'] ?? 0) / shots - expected)).toBeLessThan(5 * Math.sqrt(0.25 / shots));
    });
  });
});
