import { describe, expect, test } from 'vitest';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { readRunSheet } from '#shared/formats/read-run-sheet.ts';
import type { GateClass } from '#shared/formats/types.ts';
import { judgeDesign } from '#shared/method/judge-design.ts';
import { drawCircuits, sheetStream } from '#shared/runsheet/draw-circuits.ts';
import { drawSheet, type DrawProgress } from '#shared/runsheet/draw-sheet.ts';
import { openSeal } from '#shared/runsheet/seal.ts';
import { patchPlans } from '#shared/runsheet/sheet-plan.ts';
import { bytesOf } from '../formats/samples.ts';

function shipped(id: string): GateClass {
  const gateClass = gateClassById(id);
  if (!gateClass) throw new Error(`${id} is shipped`);
  return gateClass;
}

/** Secrets that differ from draw to draw but not from run to run. */
function secrets(): () => Uint8Array {
  let n = 0;
  return () => new Uint8Array(32).fill(++n);
}

function draw(id: string, circuits: number, options: { seed?: string; seal?: boolean; onProgress?: (progress: DrawProgress) => void } = {}) {
  const gateClass = shipped(id);
  const seal = options.seal ?? true;
  return drawSheet({
    gateClass, register: Array.from({ length: gateClass.registerSize }, (_, q) => `q${q}`), circuits, shots: gateClass.floor.shots, seed: options.seed ?? '0a',
    issued: seal ? { id: 'RS-000123', device: { provider: 'Fellside Ion Works', name: 'Tarn-2' }, drawnAt: '2026-05-01T08:00:00Z' } : null, newSecret: seal ? secrets() : null, onProgress: options.onProgress,
  });
}

describe('the circuits of a sheet', () => {
  test('lengths and gates are uniform over their lists', () => {
    const drawn = drawCircuits(sheetStream('00'), 20_000, [2, 4, 8, 16], ['a', 'b', 'c']);
    for (const length of [2, 4, 8, 16]) expect(Math.abs(drawn.filter((circuit) => circuit.length === length).length - 5000)).toBeLessThan(4 * Math.sqrt(20_000 * 0.25 * 0.75));
    const gates = drawn.flat();
    for (const label of ['a', 'b', 'c']) expect(Math.abs(gates.filter((gate) => gate === label).length / gates.length - 1 / 3)).toBeLessThan(4 * Math.sqrt(2 / 9 / gates.length));
  });

  test('the same seed gives the same circuits, another seed others', () => {
    const [a, b, c] = [draw('quarter-turn-1q/1', 60), draw('quarter-turn-1q/1', 60), draw('quarter-turn-1q/1', 60, { seed: '0b' })];
    expect(a.sheet).toEqual(b.sheet);
    expect(c.sheet.patches).not.toEqual(a.sheet.patches);
  });
});

describe.each([['quarter-turn-1q/1', 200], ['clifford-t-1q/1', 200], ['half-turn-1q/1', 61], ['chained-cz-3q/1', 600]])('a sheet of %s with %i circuits to estimate from', (id, circuits) => {
  const drawn = draw(id, circuits);

  test('reads back without a fault', () => {
    const reading = readRunSheet(bytesOf(drawn.sheet));
    expect(reading.ok ? [] : reading.errors).toEqual([]);
  });

  test('has the circuits asked for, and a quarter more sealed', () => {
    expect(drawn.circuits).toBe(circuits);
    expect(drawn.sheet.patches.map(({ qubits, sealed, circuits: all }) => [qubits.length, all.length - sealed, sealed])).toEqual(
      id.startsWith('chained')
        ? [...[0, 1, 2].map(() => [1, 200, 50]), ...[0, 1].map(() => [2, 600, 150]), [3, 0, 40]]
        : [[1, circuits, Math.ceil(circuits / 4)]],
    );
  });

  test('is sound by its unsealed circuits alone, judged afresh', () => {
    const gateClass = shipped(id);
    const sealed = new Set(openSeal(drawn.sheet, drawn.secret ?? new Uint8Array()).sealed);
    for (const { qubits, circuits: all } of drawn.sheet.patches.filter((patch) => patch.qubits.length < 3)) {
      const pairOfChain = gateClass.kind === 'chained' && qubits.length === 2;
      const judged = judgeDesign({ gates: gateClass.gates, qubits, circuits: all.filter((circuit) => !sealed.has(circuit.id)), pairOfChain });
      expect(judged.sound(gateClass.kind === 'joint' || pairOfChain ? gateClass.expectedRank : undefined)).toBe(true);
    }
  });

  test('draws only gates of the lists, at the lengths of the lists', () => {
    const gateClass = shipped(id);
    const plans = patchPlans(gateClass, circuits, true);
    drawn.sheet.patches.forEach((patch, p) => {
      expect(new Set(patch.circuits.map(({ gates }) => gates.length))).toEqual(new Set(plans[p]?.lengths));
      expect(new Set(patch.circuits.flatMap(({ gates }) => gates))).toEqual(new Set(plans[p]?.labels));
    });
  });
});

describe('plans of chained sheets (method M1, run sheets)', () => {
  test('a pair patch draws no id, a one-qubit patch every gate of its qubit, the whole register every gate', () => {
    const plans = patchPlans(shipped('chained-cz-3q/1'), 900, true);
    expect(plans.map(({ labels }) => labels.join(' '))).toEqual(['id0 rx0 ry0', 'id1 rx1 ry1', 'id2 rx2 ry2', 'rx0 ry0 rx1 ry1 cz01', 'rx1 ry1 rx2 ry2 cz12', shipped('chained-cz-3q/1').gates.map(({ label }) => label).join(' ')]);
    expect(plans.map(({ estimated, sealed }) => [estimated, sealed])).toEqual([[300, 75], [300, 75], [300, 75], [900, 225], [900, 225], [0, 40]]);
    expect(plans.map(({ lengths }) => lengths)).toEqual([...[0, 1, 2].map(() => [2, 4, 8, 16]), ...[0, 1, 2].map(() => [4, 8, 12, 16])]);
  });

  test('in a register of two the pair itself is the whole register: no second patch of it', () => {
    expect(patchPlans(shipped('chained-cz-2q/1'), 600, true).map(({ qubits }) => qubits)).toEqual([[0], [1], [0, 1]]);
  });

  test('without a seal nothing is drawn beyond what is estimated', () => {
    expect(patchPlans(shipped('chained-cz-3q/1'), 600, false).map(({ estimated, sealed }) => [estimated, sealed])).toEqual([[200, 0], [200, 0], [200, 0], [600, 0], [600, 0]]);
  });
});

describe('sheets that fail', () => {
  test('too few circuits: N is raised by tenths to the first that is sound, after 200 draws where any could be', () => {
    const seen: DrawProgress[] = [];
    const drawn = draw('clifford-t-1q/1', 31, { onProgress: (progress) => seen.push(progress) });
    expect(drawn.circuits).toBeGreaterThan(31);
    expect(seen.filter(({ circuits }) => circuits === 31)).toHaveLength(200);
    const raised = [...new Set(seen.map(({ circuits }) => circuits))];
    expect(raised.slice(0, 4)).toEqual([31, 35, 38, 41].slice(0, raised.length));
    for (const circuits of raised.slice(1, -1)) expect(seen.filter((progress) => progress.circuits === circuits)).toHaveLength(20);
    expect(drawn.circuits).toBe(raised.at(-1));
    expect(drawn.draws).toBe(seen.length);
    expect(seen.every(({ fraction }) => fraction >= 0 && fraction < 1)).toBe(true);
  });

  test('draws that are bound to fail are not judged, and yet count: the sheet is the one that judging every draw gives', () => {
    const gateClass = shipped('clifford-t-1q/1');
    const generator = sheetStream('0a');
    const slow = (() => {
      for (let raised = 0, draws = 0; ; raised++) {
        const count = Math.ceil((20 * (10 + raised)) / 10);
        for (let i = 0; i < (raised === 0 ? 200 : 20); i++) {
          draws++;
          const circuits = drawCircuits(generator, count, gateClass.lengths, gateClass.drawing).map((gates) => ({ gates }));
          if (judgeDesign({ gates: gateClass.gates, qubits: [0], circuits }).sound(31)) return { count, draws, circuits };
        }
      }
    })();
    const drawn = draw('clifford-t-1q/1', 20, { seal: false });
    expect([drawn.circuits, drawn.draws]).toEqual([slow.count, slow.draws]);
    expect(drawn.sheet.patches[0]!.circuits.map(({ gates }) => ({ gates }))).toEqual(slow.circuits);
    expect(drawn.circuits).toBeGreaterThanOrEqual(31);
  });

  test('a class that asks for a rank its gates cannot have is given up with a sentence', () => {
    const impossible = { ...shipped('half-turn-1q/1'), expectedRank: 8 };
    expect(() => drawSheet({ gateClass: impossible, register: ['q0'], circuits: 20, shots: 1, seed: '00', issued: null, newSecret: null })).toThrow(expect.objectContaining({ code: 'design-unsound' }) as Error);
  });

  test('a register of another size is refused', () => {
    expect(() => drawSheet({ gateClass: shipped('quarter-turn-1q/1'), register: ['a', 'b'], circuits: 200, shots: 1, seed: '00', issued: null, newSecret: null })).toThrow('register of 1; 2 names');
  });
});

test('a new secret is taken for each draw', () => {
  const taken: Uint8Array[] = [];
  const next = secrets();
  const drawn = drawSheet({ gateClass: shipped('clifford-t-1q/1'), register: ['q0'], circuits: 50, shots: 1, seed: '0c', issued: null, newSecret: () => { const secret = next(); taken.push(secret); return secret; } });
  expect(taken).toHaveLength(drawn.draws);
  expect(drawn.secret).toBe(taken.at(-1));
});
