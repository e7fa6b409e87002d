/**
 * Writes the shipped gate classes to schema/gate-class/<name>/<version>.json.
 * The files are immutable: a file that exists and differs is never overwritten, it stops the command.
 * `tsx api/cli/make-gate-classes.ts` writes what is missing and checks the rest.
 */
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { shippedClasses, type ClassPlan } from '#api/lib/gate-class-plans.ts';
import { idealProbabilities } from '#api/lib/state-vector.ts';
import type { GateClass, PlainCircuit } from '#shared/formats/types.ts';

const depths = [4, 8, 16, 32, 64];
const circuitsPerDepth = 40;

/** Uniform integers below `bound` from SHA-256(`<seed>|<counter>`), first four bytes, with rejection. */
function seededIntegers(seed: string): (bound: number) => number {
  let counter = 0;
  return (bound) => {
    const limit = 2 ** 32 - (2 ** 32 % bound);
    for (;;) {
      const word = createHash('sha256').update(`${seed}|${counter++}`).digest().readUInt32BE(0);
      if (word < limit) return word % bound;
    }
  };
}

/** A bench circuit is kept only if its outcome distribution is far enough from uniform: sum of (p - 1/d)^2 at least (d-1)/(2d(d+1)). */
export function carriesSignal(probabilities: readonly number[]): boolean {
  const d = probabilities.length;
  const signal = probabilities.reduce((sum, p) => sum + (p - 1 / d) ** 2, 0);
  return signal >= (d - 1) / (2 * d * (d + 1));
}

function benchOf(plan: ClassPlan): GateClass['bench'] {
  const labels = plan.gates.map((gate) => gate.label);
  const qubits = Array.from({ length: plan.registerSize }, (_, q) => q);
  const name = (depth: number, index: number) => `d${String(depth).padStart(2, '0')}-${String(index + 1).padStart(2, '0')}`;
  const bench: GateClass['bench'] = [
    { depth: 0, circuits: [{ id: name(0, 0), qubits, gates: [] }] },
    { depth: 1, circuits: labels.map((label, i) => ({ id: name(1, i), qubits, gates: [label] })) },
  ];
  for (const depth of depths) {
    const draw = seededIntegers(`evenbeam bench ${plan.id} depth ${depth}`);
    const circuits: PlainCircuit[] = [];
    while (circuits.length < circuitsPerDepth) {
      const gates = Array.from({ length: depth }, () => labels[draw(labels.length)] ?? '');
      if (carriesSignal(idealProbabilities(plan.gates, plan.registerSize, gates))) circuits.push({ id: name(depth, circuits.length), qubits, gates });
    }
    bench.push({ depth, circuits });
  }
  return bench;
}

export function makeGateClass(plan: ClassPlan): GateClass {
  return { format: 'evenbeam.gate-class', formatVersion: '1.0.0', ...plan, bench: benchOf(plan) };
}

/** One line a gate and one line a circuit, so that a reader can follow the file and a comparison stays short. */
export function gateClassText(gateClass: GateClass): string {
  const { bench, gates, ...head } = gateClass;
  const lines = Object.entries(head).map(([key, value]) => `  ${JSON.stringify(key)}: ${JSON.stringify(value)}`);
  const list = (items: readonly unknown[], indent: string) => items.map((item) => `${indent}${JSON.stringify(item)}`).join(',\n');
  const depthBlocks = bench.map(({ depth, circuits }) => `    { "depth": ${depth}, "circuits": [\n${list(circuits, '      ')}\n    ] }`);
  return `{\n${lines.join(',\n')},\n  "gates": [\n${list(gates, '    ')}\n  ],\n  "bench": [\n${depthBlocks.join(',\n')}\n  ]\n}\n`;
}

/** Returns what was done, a line a class; throws when a file that exists says something else. */
export function writeGateClasses(folder: string): string[] {
  return shippedClasses().map((plan) => {
    const path = join(folder, `${plan.id}.json`);
    const text = gateClassText(makeGateClass(plan));
    if (!existsSync(path)) {
      mkdirSync(dirname(path), { recursive: true });
      writeFileSync(path, text);
      return `${plan.id}: written`;
    }
    if (readFileSync(path, 'utf8') !== text) throw new Error(`${path} differs from what would be written. A gate class never changes: make a new version.`);
    return `${plan.id}: as written before`;
  });
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  try {
    const folder = fileURLToPath(new URL('../../schema/gate-class/', import.meta.url));
    process.stdout.write(`${writeGateClasses(folder).join('\n')}\n`);
  } catch (error) {
    process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
    process.exitCode = 1;
  }
}
