import { dampingOver, flipsOver, leakageOperators, pairDepolarisingChannel, unitaryChannel, type Channel } from '#api/demo/simulator/channels.ts';
import { kron, multiply, zeros, type Matrix } from '#api/demo/simulator/complex-matrix.ts';
import type { DeviceModel, PairNoise } from '#api/demo/simulator/device-model.ts';
import { noisyTurn } from '#api/demo/simulator/noisy-turn.ts';
import { idealUnitary, turn } from '#api/demo/simulator/standard-unitaries.ts';
import { AppError } from '#shared/errors/app-error.ts';
import type { GateDeclaration } from '#shared/formats/types.ts';

/** One map of a noisy gate: Kraus operators on positions within the circuit's qubits. */
export interface Step {
  targets: number[];
  operators: Matrix[];
}

/** exp(−i·angle/2·Z⊗Z). */
function zz(angle: number): Matrix {
  const out = zeros(4);
  for (let i = 0; i < 4; i += 1) {
    const sign = i === 0 || i === 3 ? 1 : -1;
    out.re[i * 5] = Math.cos(angle / 2);
    out.im[i * 5] = -sign * Math.sin(angle / 2);
  }
  return out;
}

/** A qubit operator carried to systems with a third level: `beyond` times the identity outside the qubit states. */
export function lift(matrix: Matrix, beyond: number, levels: readonly number[]): Matrix {
  if (levels.every((l) => l === 2)) return matrix;
  const states = levels.reduce<number[][]>((all, l) => all.flatMap((s) => Array.from({ length: l }, (_, k) => [...s, k])), [[]]);
  const index = (s: number[]): number => (s.some((k) => k > 1) ? -1 : s.reduce((n, k) => 2 * n + k, 0));
  const out = zeros(states.length);
  states.forEach((row, i) => states.forEach((column, j) => {
    const [a, b] = [index(row), index(column)];
    if (a >= 0 && b >= 0) {
      out.re[i * states.length + j] = matrix.re[a * matrix.columns + b]!;
      out.im[i * states.length + j] = matrix.im[a * matrix.columns + b]!;
    } else if (i === j) out.re[i * states.length + j] = beyond;
  }));
  return out;
}

/**
 * What a device does when asked for a gate, in this order: the turned unitary, stray coupling, flips, damping, leakage.
 * `qubits`: register positions of the circuit's qubits; `moment` −1 … 1: the place in the run.
 */
export function gateSteps(model: DeviceModel, gate: GateDeclaration, qubits: readonly number[], moment: number): Step[] {
  const levels = levelsOf(model, gate.targets);
  const where = gate.targets.map((t) => qubits.indexOf(t));
  const on = (channel: Channel, positions = where, at = levels): Step => ({ targets: positions, operators: channel.map((k) => lift(k.matrix, k.beyond, at)) });
  const ideal = idealUnitary(gate.ideal);
  const steps: Step[] = [];
  let duration = 1;
  if (gate.targets.length === 1) {
    steps.push(on(unitaryChannel(noisyTurn(ideal, model.qubits[gate.targets[0]!]!, moment))));
    steps.push(...straySteps(model, gate.targets[0]!, qubits));
  } else {
    const pair = pairOf(model, gate);
    const [a, b] = pair.qubits[0] === gate.targets[0] ? pair.phases : [pair.phases[1], pair.phases[0]];
    const local = kron(turn([0, 0, 1], a), turn([0, 0, 1], b));
    steps.push(on(unitaryChannel(multiply(local, multiply(zz(pair.angle), ideal)))));
    if (pair.depolarising > 0) steps.push(on(pairDepolarisingChannel(pair.depolarising)));
    duration = pair.duration;
  }
  gate.targets.forEach((q, i) => {
    const noise = model.qubits[q]!;
    const [position, own] = [[where[i]!], [levels[i]!]];
    steps.push(on(flipsOver(noise.flips, duration), position, own), on(dampingOver(noise.damping, duration), position, own));
    if (noise.leakage) steps.push({ targets: position, operators: leakageOperators(noise.leakage) });
  });
  return steps;
}

export function levelsOf(model: DeviceModel, qubits: readonly number[]): number[] {
  return qubits.map((q) => (model.qubits[q]?.leakage ? 3 : 2));
}

function pairOf(model: DeviceModel, gate: GateDeclaration): PairNoise {
  const found = model.pairs.find((p) => gate.targets.length === 2 && gate.targets.every((t) => p.qubits.includes(t)));
  if (!found) throw new AppError('invalid-request', `The device model has no coupling for gate “${gate.label}” on register positions ${gate.targets.join(', ')}.`);
  return found;
}

/** Coupling to each neighbour while one qubit is driven; a neighbour outside the circuit is in |0⟩ and only turns the qubit about Z. */
function straySteps(model: DeviceModel, driven: number, qubits: readonly number[]): Step[] {
  return model.pairs.filter((p) => p.stray !== 0 && p.qubits.includes(driven)).map((p) => {
    const other = p.qubits[0] === driven ? p.qubits[1] : p.qubits[0];
    const inside = qubits.includes(other);
    const targets = inside ? [driven, other] : [driven];
    const matrix = inside ? zz(p.stray) : turn([0, 0, 1], p.stray);
    return { targets: targets.map((t) => qubits.indexOf(t)), operators: [lift(matrix, 1, levelsOf(model, targets))] };
  });
}
