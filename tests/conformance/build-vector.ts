import { sha256 } from '@noble/hashes/sha2.js';
import { utf8ToBytes } from '@noble/hashes/utils.js';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { contentIdOf } from '#shared/formats/canonical-json.ts';
import type { CircuitsFile, Dataset, RunSheet, Seal, SheetCircuit } from '#shared/formats/types.ts';
import { isCompleteAndSound, judgeDesign } from '#shared/method/judge-design.ts';
import { Xoshiro256 } from '#shared/random/xoshiro256.ts';
import { drawCircuits } from '#shared/runsheet/draw-circuits.ts';
import { commitmentOf, openSeal, sealedIds } from '#shared/runsheet/seal.ts';
import { run } from './device.ts';
import { vectorSpecs, type PatchSpec, type VectorSpec } from './specs.ts';

export interface VectorInput {
  dataset: Dataset;
  sheet: RunSheet | null;
  seal: Seal | null;
  circuits: CircuitsFile;
}

const bytesOf = (text: string): Uint8Array => sha256(utf8ToBytes(`evenbeam conformance: ${text}`));
const drawn = '2026-01-12T08:00:00Z';
const mostDraws = 400;

/** Circuits whose unsealed part is sound, where soundness is to be had; the incomplete vectors take the first draw. */
const drawPatch = (spec: VectorSpec, { qubits, circuits, sealed, lengths, labels }: PatchSpec, prefix: string, secret: Uint8Array, random: Xoshiro256): SheetCircuit[] => {
  const incomplete = spec.name === 'half-turn' || spec.name === 'one-length';
  const pairOfChain = spec.patches.length > 1 && qubits.length === 2;
  for (let i = 0; i < mostDraws; i++) {
    const patch = drawCircuits(random, circuits + sealed, lengths, labels).map((gates, c): SheetCircuit => ({ id: `${prefix}${String(c + 1).padStart(4, '0')}`, gates }));
    const hidden = new Set(sealedIds(secret, patch, sealed));
    const input = { gates: spec.gates, qubits, circuits: patch.filter(({ id }) => !hidden.has(id)), pairOfChain };
    if (incomplete || (qubits.length === 1 ? judgeDesign(input).sound() : isCompleteAndSound(input))) return patch;
  }
  throw new Error(`${spec.name}: none of ${mostDraws} draws was sound.`);
};

const sheetOf = (spec: VectorSpec, number: number, secret: Uint8Array, patches: RunSheet['patches']): RunSheet => ({
  format: 'evenbeam.run-sheet', formatVersion: '1.0.0', id: `RS-${900_000 + number}`, gateClass: spec.gateClass, device: { provider: 'Conformance vectors', name: spec.name }, register: spec.register,
  gates: structuredClone([...spec.gates]), shots: spec.shots[0]!, seed: '00', sealSha256: commitmentOf(secret), patches, drawnAt: drawn,
});

/** Draws and runs one vector: a pure function of its specification. */
export function buildVector(spec: VectorSpec): VectorInput {
  if (spec.gateClass !== 'custom' && !gateClassById(spec.gateClass)) throw new Error(`${spec.name} names the gate class ${spec.gateClass}, which is not shipped.`);
  const random = new Xoshiro256(bytesOf(spec.name));
  const secret = bytesOf(`${spec.name}, secret`);
  const patches = spec.patches.map((patch, p) => ({ qubits: patch.qubits, sealed: patch.sealed, circuits: drawPatch(spec, patch, spec.patches.length > 1 ? `${'abc'[p]}` : 'c', secret, random) }));
  const sealed = patches.some((patch) => patch.sealed > 0);
  const sheet = sealed ? sheetOf(spec, vectorSpecs.indexOf(spec) + 1, secret, patches) : null;
  const dataset: Dataset = {
    format: 'evenbeam.dataset', formatVersion: '1.0.0', title: `Conformance vector ${spec.name}`, gateClass: spec.gateClass,
    runSheet: sheet?.id ? { id: sheet.id, sha256: contentIdOf(sheet) } : null, device: { provider: 'Conformance vectors', name: spec.name, modality: 'simulated' },
    register: spec.register, gates: structuredClone([...spec.gates]), patches: patches.map((patch) => run(spec.gates, patch, spec.shots, spec.faults, random, spec.sparse)),
    acquisition: { startedAt: drawn, endedAt: '2026-01-12T09:00:00Z', software: 'simulated' }, contributors: [{ name: 'Conformance vectors' }], licence: 'CC0-1.0',
  };
  const circuits: CircuitsFile = { format: 'evenbeam.circuits', formatVersion: '1.0.0', circuits: spec.predict.map((circuit, i) => ({ id: `t${i + 1}`, ...circuit })) };
  return { dataset, sheet, seal: sheet ? openSeal(sheet, secret) : null, circuits };
}
