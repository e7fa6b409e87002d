import { describe, expect, test } from 'vitest';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { emptyGradients, FunctionalGradient } from '#shared/method/chain/functional-gradient.ts';
import { forecastChain } from '#shared/method/chain/forecast-chain.ts';
import { designMatrix } from '#shared/method/design.ts';
import { estimate } from '#shared/method/estimate.ts';
import { idealGateSet, indexCircuits } from '#shared/method/gate-set.ts';
import { layoutOf } from '#shared/method/parameters.ts';
import { simulateDataset } from '#api/demo/simulator/simulate-dataset.ts';
import { drawSheet } from '#shared/runsheet/draw-sheet.ts';
import { perfectPair, perfectQubit } from '#api/demo/simulator/device-model.ts';
import { drawCircuits, seeded } from '#tests/shared/method/made.ts';

const gateClass = gateClassById('chained-cz-3q/1')!;

const posed = (qubits: number[]) => {
  const set = idealGateSet(gateClass.gates, qubits);
  const entangling = new Set(set.labels.flatMap((l, k) => (l.startsWith('cz') ? [k] : [])));
  return { qubits, set, layout: layoutOf(set, qubits.length > 1 ? entangling : undefined) };
};

describe('derivatives over a register', () => {
  const register = { locals: [[0], [1], [2]].map(posed), pairs: [[0, 1], [1, 2]].map(posed) };

  test('on one qubit and for the entangling gates of a pair they are the rows of the patch’s own design, to 1e-13', () => {
    const g = seeded('rows');
    for (const [patch, which] of [[register.locals[1]!, 'locals'], [register.pairs[0]!, 'pairs']] as const) {
      const inside = gateClass.gates.filter((x) => x.targets.every((t) => patch.qubits.includes(t)));
      const circuits = drawCircuits(inside, [0, 3, 7], 12, g);
      const weights = circuits.map(() => Float64Array.from({ length: patch.set.d }, () => g.next() - 0.5));
      const gradient = new FunctionalGradient(register, patch.qubits);
      const found = emptyGradients(register);
      circuits.forEach((c, i) => gradient.add(c.gates, weights[i]!, found));
      const rows = designMatrix(patch.set, patch.layout, indexCircuits(patch.set, circuits));
      const wanted = new Float64Array(patch.layout.columns);
      circuits.forEach((_, c) => {
        for (let o = 0; o < patch.set.d - 1; o++) {
          const r = c * (patch.set.d - 1) + o;
          for (let e = rows.start[r]!; e < rows.start[r + 1]!; e++) wanted[rows.index[e]!]! += (weights[c]![o]! - weights[c]![patch.set.d - 1]!) * rows.value[e]!;
        }
      });
      const got = found[which][which === 'locals' ? 1 : 0]!;
      wanted.forEach((v, i) => expect(Math.abs(got[i]! - v)).toBeLessThan(1e-13));
    }
  });

  test('a change of a neighbour’s gate, preparation and effect moves a pair’s probabilities as told (central differences, 1e-8)', () => {
    const circuit = ['rx0', 'cz01', 'ry1', 'cz12', 'rx2', 'cz01', 'ry0', 'id1', 'cz12', 'rx1'];
    const g = seeded('differences');
    const weights = Float64Array.from({ length: 8 }, () => g.next() - 0.5);
    const found = emptyGradients(register);
    new FunctionalGradient(register, [0, 1, 2]).add(circuit, weights, found);
    const local = register.locals[1]!;
    const k = local.set.labels.indexOf('ry1');
    const at = (step: number, what: 'gate' | 'state' | 'effect'): number => {
      const set = { ...local.set, gates: local.set.gates.map((m) => m.slice()), state: local.set.state.slice(), effects: local.set.effects.map((m) => m.slice()) };
      if (what === 'gate') for (let j = 0; j < 4; j++) set.gates[k]![4 + j]! += step * local.set.gates[k]![12 + j]!;
      if (what === 'state') set.state[2]! += step;
      if (what === 'effect') { set.effects[0]![1]! += step; set.effects[1]![1]! -= step; }
      const moved = { ...register, locals: register.locals.map((p, q) => (q === 1 ? { ...p, set } : p)) };
      return new FunctionalGradient(moved, [0, 1, 2]).probabilities(circuit).reduce((s, p, o) => s + weights[o]! * p, 0);
    };
    const slope = (what: 'gate' | 'state' | 'effect'): number => (at(1e-4, what) - at(-1e-4, what)) / 2e-4;
    const { layout } = local;
    // Row 1 (X) of the error map, column 3 (Z).
    expect(Math.abs(slope('gate') - found.locals[1]![layout.gateAt[k]! + 3]!)).toBeLessThan(1e-8);
    expect(Math.abs(slope('state') - found.locals[1]![layout.stateAt + 1]!)).toBeLessThan(1e-8);
    expect(Math.abs(slope('effect') - found.locals[1]![layout.effectAt + 1]!)).toBeLessThan(1e-8);
  });
});

test('a forecast of three qubits meets the standard errors of a nearly ideal device within a fifth, and halves with four times the shots', () => {
  const quiet = { ...perfectQubit, flips: { x: 1e-4, y: 1e-4, z: 1e-4 }, readout: { zeroAsOne: 0.01, oneAsZero: 0.01 } };
  const model = { qubits: [quiet, quiet, quiet], pairs: [perfectPair(0, 1), perfectPair(1, 2)].map((p) => ({ ...p, depolarising: 5e-4 })) };
  const { sheet } = drawSheet({ gateClass, register: ['a', 'b', 'c'], circuits: 600, shots: 1000, seed: '0f', issued: null, newSecret: null });
  const dataset = simulateDataset({
    sheet, sheetSha256: null, model, seed: 'forecast of three', title: 'forecast of three', device: { provider: 'Pellmere Instruments', name: 'Reed-1', modality: 'simulated' },
    startedAt: new Date('2026-01-01T00:00:00Z'), endedAt: new Date('2026-01-01T01:00:00Z'), software: 'test', contributors: [{ name: 'A. Example' }],
  });
  const { result } = estimate({ dataset, contentId: 'forecast of three', gateClass, replicates: 500 });
  const input = {
    gates: gateClass.gates, registerSize: 3, bench: gateClass.bench, readoutError: 0.01, shots: 1000,
    locals: dataset.patches.slice(0, 3), pairs: dataset.patches.slice(3),
  };
  const told = forecastChain(input);
  expect(told.figures.length).toBe(7 + 3 * (1 + 3 + 2) + 2 + 1);
  for (const f of told.figures) {
    const found = result.figures.find((x) => x.key === f.key && x.gate === f.gate && x.depth === f.depth && x.qubits.join() === f.qubits.join())!;
    expect(found.reason, `${f.key} ${f.depth} ${f.gate}`).toBeNull();
    const ratio = f.standardError! / found.standardError!;
    expect(ratio, `${f.key} ${f.gate} ${f.depth}`).toBeGreaterThan(0.8);
    expect(ratio, `${f.key} ${f.gate} ${f.depth}`).toBeLessThan(1.25);
  }
  const four = forecastChain({ ...input, shots: 4000 });
  four.figures.forEach((f, i) => expect(f.standardError! * 2).toBeCloseTo(told.figures[i]!.standardError!, 12));
});
