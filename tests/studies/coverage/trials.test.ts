import { describe, expect, it } from 'vitest';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { GateLoss } from '#shared/method/gate-loss.ts';
import { idealGateSet, indexCircuits } from '#shared/method/gate-set.ts';
import { probabilitiesOf } from '#shared/method/readings.ts';
import { idealTransferMatrix } from '#shared/quantum/ideal-gate.ts';
import { cells, cellId, chunkStream, seedText } from '#tests/studies/coverage/cells.ts';
import { runChunk } from '#tests/studies/coverage/chunk.ts';
import { makeDevice } from '#tests/studies/coverage/device.ts';
import { dampingMap, flipMap, infidelity, pairErrorMap, rotationMap } from '#tests/studies/coverage/error-maps.ts';
import { exactOn, exactProbabilities } from '#tests/studies/coverage/exact.ts';
import { multiply } from '#tests/shared/method/made.ts';

const cellOf = (part: string) => ({ ...cells.find((c) => cellId(c).includes(part))!, chunk: 2, replicates: 20 });

describe('made devices', () => {
  it('rotate as the standard gates do, and shrink as flips and damping do (amplitude damping 0.1: F_e by hand)', () => {
    const turn = (gate: string, angle: number) => Array.from(idealTransferMatrix({ gate, params: [angle] }), (v) => expect.closeTo(v, 12));
    expect(Array.from(rotationMap([1, 0, 0], 0.3))).toEqual(turn('rx', 0.3));
    expect(Array.from(rotationMap([0, 1, 0], 0.3))).toEqual(turn('ry', 0.3));
    expect(Array.from(rotationMap([0, 0, 1], 0.3))).toEqual(turn('rz', 0.3));
    expect(infidelity(flipMap([0.01, 0.02, 0.03]), 4)).toBeCloseTo(0.06, 12);
    expect(infidelity(dampingMap(0.1), 4)).toBeCloseTo(1 - (1 + Math.sqrt(0.9)) ** 2 / 4, 12);
    expect(infidelity(rotationMap([0.6, 0, 0.8], 0.1), 4)).toBeCloseTo(Math.sin(0.05) ** 2, 12);
  });

  it('ZZ over-rotation 0.05: 1 − F_avg = 4.99895842013e-4 (recomputed with numpy), and it is orthogonal', () => {
    const map = pairErrorMap(0.05, 0);
    expect((infidelity(map, 16) * 4) / 5).toBeCloseTo(4.99895842013e-4, 14);
    const transposed = Float64Array.from({ length: 256 }, (_, i) => map[(i % 16) * 16 + Math.floor(i / 16)]!);
    multiply(map, transposed, 16).forEach((v, i) => expect(v).toBeCloseTo(i % 17 === 0 ? 1 : 0, 12));
  });

  it.each(['quarter-turn-1q/1', 'clifford-t-1q/1', 'quarter-turn-cz-2q/1', 'chained-cz-3q/1'])('%s: the worst gate has the infidelity asked for, whatever its coherent share, and every map preserves the trace', (id) => {
    const { gates, registerSize } = gateClassById(id)!;
    for (const coherent of [0, 0.5, 1]) {
      const device = makeDevice(gates, registerSize, 0.003, coherent, chunkStream(cells[0]!, 7));
      const losses = gates.map((g) => {
        const ideal = idealTransferMatrix(g.ideal);
        const noisy = device.gates.get(g.label)!;
        const D = g.targets.length === 1 ? 4 : 16;
        expect(noisy[0]).toBeCloseTo(1, 12);
        for (let j = 1; j < D; j++) expect(noisy[j]).toBeCloseTo(0, 12);
        return 1 - ideal.reduce((sum, v, i) => sum + v * noisy[i]!, 0) / D;
      });
      expect(Math.max(...losses)).toBeGreaterThan(0.0029);
      expect(Math.max(...losses)).toBeLessThan(0.0031);
    }
  });

  it('a pure over-rotation has the gate loss of its infidelity, so that the truth and the figure are the same thing', () => {
    const ideal = idealTransferMatrix({ gate: 'rx', params: [Math.PI / 2] });
    const meter = new GateLoss(ideal, 4);
    meter.measure(multiply(rotationMap([1, 0, 0], 0.1), ideal, 4), 0);
    expect(meter.loss).toBeCloseTo(Math.sin(0.05) ** 2, 12);
    expect(meter.angle).toBeCloseTo(0.1, 12);
  });

  it('exact probabilities agree with the method’s evaluator and sum to one', () => {
    for (const id of ['quarter-turn-1q/1', 'quarter-turn-cz-2q/1']) {
      const { gates, registerSize, bench } = gateClassById(id)!;
      const qubits = Array.from({ length: registerSize }, (_, q) => q);
      const exact = exactOn(makeDevice(gates, registerSize, 0.01, 0.5, chunkStream(cells[0]!, 3)), gates, qubits);
      const circuits = bench.find((b) => b.depth === 16)!.circuits.map((c) => c.gates);
      const slow = exactProbabilities(exact, circuits);
      const set = idealGateSet(gates, qubits);
      probabilitiesOf(set, indexCircuits(set, circuits.map((g) => ({ gates: g }))), exact.maps).forEach((p, i) => expect(slow[i]).toBeCloseTo(p, 12));
      for (let c = 0; c < circuits.length; c++) expect(slow.slice(c * exact.d, (c + 1) * exact.d).reduce((a, b) => a + b)).toBeCloseTo(1, 12);
    }
  });
});

describe('a chunk of trials', () => {
  it.each(['quarter-turn-1q/1 noise=0.001 coherent=0 shots=500', 'half-turn-1q/1'])('%s: the same numbers give the same counts, another chunk others', (part) => {
    const cell = cellOf(part);
    const strip = (chunk: number) => ({ ...runChunk(cell, chunk), seconds: 0, chunk: 0 });
    const first = strip(0);
    expect(strip(0)).toEqual(first);
    expect(strip(1)).not.toEqual(first);
    expect(first.trials).toBe(2);
    for (const f of first.figures) {
      expect(f.inside[0]).toBeLessThanOrEqual(f.inside[1]);
      expect(f.inside[1]).toBeLessThanOrEqual(f.inside[2]);
      expect(f.inside[2] + f.below + f.above).toBe(f.trials);
      expect(f.settled[0]).toBeLessThanOrEqual(f.trials);
    }
  });

  it('counts every figure of its class once', () => {
    const { figures } = runChunk(cellOf('quarter-turn-1q/1 noise=0.001 coherent=0 shots=500'), 0);
    const names = figures.map((f) => `${f.key} ${f.depth ?? f.gate ?? ''}`.trim());
    expect(new Set(names).size).toBe(names.length);
    expect(names).toEqual([
      ...['retained-signal', 'output-error'].flatMap((key) => [0, 1, 4, 8, 16, 32, 64].map((d) => `${key} ${d}`)), 'readout-loss', 'error-per-gate',
      'gate-loss id', 'gate-loss rx', 'gate-loss ry', 'angle-error rx', 'angle-error ry', 'prediction 4', 'prediction 16', 'prediction 32', 'prediction-error',
    ]);
  });

  it('a chained chunk runs whole datasets and knows the truth of every figure it finds', () => {
    const { figures, trials } = runChunk({ ...cellOf('chained-cz-2q/1 noise=0.01'), chunk: 1 }, 0);
    expect(trials).toBe(1);
    expect(figures.map((f) => f.key)).toContain('prediction-error');
    for (const f of figures) expect(Math.abs(f.z), `${f.key} ${f.gate}`).toBeLessThan(12);
  });

  it('its seed is the committed rule', () => {
    expect(seedText(cells[0]!, 3)).toBe('coverage study 1: quarter-turn-1q/1 noise=0.0001 coherent=0 shots=500, chunk 3');
  });
});
