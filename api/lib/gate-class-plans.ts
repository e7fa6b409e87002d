import type { GateClass, GateDeclaration } from '#shared/formats/types.ts';

/** A gate class before its bench circuits are drawn. */
export type ClassPlan = Omit<GateClass, 'format' | 'formatVersion' | 'bench'>;

const quarter = Math.PI / 2;
const countWords = ['', 'one qubit', 'two qubits', 'three qubits', 'four qubits', 'five qubits'];

function gate(label: string, targets: number[], name: string, params?: number[]): GateDeclaration {
  return { label, targets, ideal: params ? { gate: name, params } : { gate: name } };
}

/** One qubit: 200 circuits of 500 shots at lengths 2, 4, 8, 16. */
function oneQubit(id: string, title: string, gates: GateDeclaration[], expectedRank: number, ranked: boolean): ClassPlan {
  const drawing = gates.map((g) => g.label);
  return { id, title, registerSize: 1, kind: 'joint', ranked, expectedRank, gates, lengths: [2, 4, 8, 16], drawing, floor: { circuits: 200, shots: 500 } };
}

/** Joint pair: 1,200 circuits of 1,000 shots. Shorter lengths leave three draws in four unsound. */
function jointPair(): ClassPlan {
  const gates = [0, 1].flatMap((q) => [gate(`rx${q}`, [q], 'rx', [quarter]), gate(`ry${q}`, [q], 'ry', [quarter])]);
  gates.push(gate('cz01', [0, 1], 'cz'));
  return {
    id: 'quarter-turn-cz-2q/1', title: 'Quarter turns and CZ on two qubits', registerSize: 2, kind: 'joint', ranked: true, expectedRank: 1023, gates,
    lengths: [4, 8, 12, 16], drawing: gates.map((g) => g.label), floor: { circuits: 1200, shots: 1000 },
  };
}

/** Chained register: local gates on each qubit, cz on neighbours. Pair patches draw no id; one-qubit patches draw every gate of their qubit. */
function chained(size: number): ClassPlan {
  const locals = Array.from({ length: size }, (_, q) => [gate(`id${q}`, [q], 'id'), gate(`rx${q}`, [q], 'rx', [quarter]), gate(`ry${q}`, [q], 'ry', [quarter])]).flat();
  const pairs = Array.from({ length: size - 1 }, (_, q) => gate(`cz${q}${q + 1}`, [q, q + 1], 'cz'));
  const gates = [...locals, ...pairs];
  return {
    id: `chained-cz-${size}q/1`, title: `Chained CZ, ${countWords[size]}`, registerSize: size, kind: 'chained', ranked: true, expectedRank: 240, gates,
    lengths: [4, 8, 12, 16], localLengths: [2, 4, 8, 16], drawing: gates.map((g) => g.label).filter((label) => !label.startsWith('id')),
    floor: { circuits: 600, shots: 1000 },
  };
}

/** The classes that the registry ships with, in the order in which it lists them. */
export function shippedClasses(): ClassPlan[] {
  const quarterTurns = [gate('id', [0], 'id'), gate('rx', [0], 'rx', [quarter]), gate('ry', [0], 'ry', [quarter])];
  const cliffordT = [gate('id', [0], 'id'), gate('h', [0], 'h'), gate('t', [0], 't')];
  const halfTurns = [gate('x', [0], 'x'), gate('y', [0], 'y'), gate('z', [0], 'z')];
  return [
    oneQubit('quarter-turn-1q/1', 'Quarter turns on one qubit', quarterTurns, 31, true),
    oneQubit('clifford-t-1q/1', 'Clifford and T on one qubit', cliffordT, 31, true),
    oneQubit('half-turn-1q/1', 'Half turns on one qubit', halfTurns, 7, false),
    jointPair(),
    ...[2, 3, 4, 5].map(chained),
  ];
}
