import { describe, expect, test } from 'vitest';
import type { LocalEstimate } from '#shared/method/chain/estimate-local.ts';
import type { PairEstimate } from '#shared/method/chain/estimate-pair.ts';
import { FIRST, tabulate } from '#shared/method/chain/map-table.ts';
import { RegisterEvaluator } from '#shared/method/chain/register-evaluator.ts';
import { registerMaps } from '#shared/method/chain/register-maps.ts';
import { compileCircuit } from '#shared/method/chain/register-program.ts';
import { idealGateSet } from '#shared/method/gate-set.ts';
import { applyParameters, emptyMaps, layoutOf } from '#shared/method/parameters.ts';
import { embedTransferMatrix } from '#shared/quantum/transfer-matrix.ts';
import { lineGates } from '#tests/shared/method/chain/made-register.ts';
import { normal, seeded } from '#tests/shared/method/made.ts';

/** A register with arbitrary parameters, and what the single pass makes of it by full matrices on all qubits: slow and plain. */
function made(n: number, pairs: number[][]) {
  const gates = lineGates(n);
  const generator = seeded(`register ${n}`);
  const dense = new Map<string, { map: Float64Array; on: number[] }>();
  const states: Float64Array[] = [];
  const effects: Float64Array[][] = [];
  const build = (qubits: number[]) => {
    const set = idealGateSet(gates, qubits);
    const both = new Set(set.labels.flatMap((label, k) => (label.startsWith('cz') ? [k] : [])));
    const layout = layoutOf(set, qubits.length > 1 ? both : undefined);
    const first = Float64Array.from({ length: layout.columns }, () => 0.03 * normal(generator));
    const maps = emptyMaps(set);
    applyParameters(set, layout, first, maps);
    const { D } = set;
    set.labels.forEach((label, k) => {
      if (layout.gateAt[k]! >= 0) dense.set(label, { map: maps.gates.slice(k * D * D, (k + 1) * D * D), on: qubits });
    });
    if (qubits.length === 1) {
      states.push(maps.state);
      effects.push([maps.effects, maps.effects.map((v, a) => (a === 0 ? Math.SQRT2 : 0) - v)]);
    }
    return { set, layout, table: tabulate(set, layout, { e: first, first, settled: true, stopped: false }, null) };
  };
  const locals = new Map(Array.from({ length: n }, (_, q) => {
    const { set, table } = build([q]);
    return [q, { qubit: q, table, problem: { set } } as unknown as LocalEstimate] as const;
  }));
  const maps = registerMaps(gates, locals, pairs.map((qubits) => ({ qubits, ...build(qubits) }) as unknown as PairEstimate));
  const slow = (circuit: { qubits: number[]; gates: string[] }): number[] => {
    const { qubits } = circuit;
    const kron = (all: number[], next: ArrayLike<number>) => all.flatMap((x) => Array.from(next, (y) => x * y));
    let v = qubits.reduce<number[]>((all, q) => kron(all, states[q]!), [1]);
    for (const label of circuit.gates) {
      const { map, on } = dense.get(label)!;
      const whole = embedTransferMatrix(map, on.map((q) => qubits.indexOf(q)), qubits.length);
      v = v.map((_, r) => v.reduce((s, x, c) => s + whole[r * v.length + c]! * x, 0));
    }
    return Array.from({ length: 2 ** qubits.length }, (_, o) => {
      const effect = qubits.reduce<number[]>((all, q, i) => kron(all, effects[q]![(o >> (qubits.length - 1 - i)) & 1]!), [1]);
      return effect.reduce((s, x, a) => s + x * v[a]!, 0);
    });
  };
  return { maps, slow };
}

describe('a circuit over four qubits, evaluated part by part', () => {
  const { maps, slow } = made(4, [[0, 1], [2, 1], [2, 3]]);
  test.each([
    ['without gates', [0, 1, 2, 3], []],
    ['turns only, any order of qubits', [2, 0, 3, 1], ['rx0', 'ry0', 'rx2', 'ry3', 'ry3', 'rx0']],
    ['two parts of two', [3, 0, 2, 1], ['rx0', 'cz01', 'ry2', 'cz23', 'rx3', 'ry1', 'cz01']],
    ['all bound together, a pair patch in falling order', [1, 3, 0, 2], ['rx0', 'ry1', 'cz12', 'ry1', 'cz01', 'rx2', 'ry2', 'cz23', 'ry3', 'rx1', 'cz12', 'ry0']],
    ['a part of the register', [2, 1], ['ry1', 'cz12', 'rx2', 'rx2', 'ry1', 'cz12']],
  ])('%s: equals the product of full matrices to 1e-13', (_, qubits, gates) => {
    const circuit = { qubits, gates };
    const want = slow(circuit);
    const got = new Float64Array(want.length + 3);
    new RegisterEvaluator().run(compileCircuit(maps, circuit), FIRST, got, 2);
    want.forEach((p, o) => expect(Math.abs(got[o + 2]! - p)).toBeLessThan(1e-13));
    expect(Math.abs(got.slice(2, 2 + want.length).reduce((a, b) => a + b, 0) - 1)).toBeLessThan(1e-13);
    expect([got[0], got[1], got[want.length + 2]]).toEqual([0, 0, 0]);
  });

  test('one evaluator serves large and small circuits in turn', () => {
    const evaluator = new RegisterEvaluator();
    for (const circuit of [{ qubits: [0, 1], gates: ['cz01', 'rx0'] }, { qubits: [0, 1, 2, 3], gates: ['ry1', 'cz12', 'cz23', 'rx3'] }, { qubits: [3], gates: ['ry3'] }]) {
      const want = slow(circuit);
      const got = new Float64Array(want.length);
      evaluator.run(compileCircuit(maps, circuit), FIRST, got, 0);
      want.forEach((p, o) => expect(Math.abs(got[o]! - p)).toBeLessThan(1e-13));
    }
  });

  test('kernels give the bits of plain TypeScript, in whatever order qubits and sizes come', () => {
    const [fast, plain] = [new RegisterEvaluator(), new RegisterEvaluator(true)];
    const labels = ['rx0', 'ry0', 'rx1', 'ry1', 'rx2', 'ry2', 'rx3', 'ry3', 'cz01', 'cz12', 'cz23'];
    const g = seeded('register bits');
    for (const qubits of [[0, 1, 2, 3], [3, 1, 0, 2], [1, 2, 0], [2, 3], [0, 1, 2, 3]]) {
      const inside = labels.filter((label) => [...label.slice(2)].every((q) => qubits.includes(Number(q))));
      const gates = Array.from({ length: 40 }, () => inside[Math.floor(g.next() * inside.length)]!);
      const circuit = compileCircuit(maps, { qubits, gates });
      const [p, q] = [new Float64Array(circuit.d), new Float64Array(circuit.d)];
      fast.run(circuit, FIRST, p, 0);
      plain.run(circuit, FIRST, q, 0);
      expect(p).toEqual(q);
      expect(p.some((v) => v === 0)).toBe(false);
    }
  });
});
