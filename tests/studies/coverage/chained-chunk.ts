import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex, utf8ToBytes } from '@noble/hashes/utils.js';
import type { Dataset, DatasetCircuit, GateClass } from '#shared/formats/types.ts';
import { estimate } from '#shared/method/estimate.ts';
import { retainedSignal } from '#shared/method/bench-plans.ts';
import { GateLoss } from '#shared/method/gate-loss.ts';
import { ErrorPerGate } from '#shared/method/error-per-gate.ts';
import { idealGateSet } from '#shared/method/gate-set.ts';
import type { Xoshiro256 } from '#shared/random/xoshiro256.ts';
import { drawCircuits } from '#shared/runsheet/draw-circuits.ts';
import { isSound } from '#shared/runsheet/draw-patch.ts';
import { patchPlans, type PatchPlan } from '#shared/runsheet/sheet-plan.ts';
import { meanTotalVariation } from '#shared/stats/distance.ts';
import { seedText, type Cell } from '#tests/studies/coverage/cells.ts';
import type { Found } from '#tests/studies/coverage/chunk.ts';
import { makeDevice, type Device } from '#tests/studies/coverage/device.ts';
import { exactOn, exactProbabilities } from '#tests/studies/coverage/exact.ts';
import { Tally, type FigureName } from '#tests/studies/coverage/tally.ts';
import { drawCounts } from '#tests/shared/method/made.ts';

/** A patch of the sheet: its circuits, the sealed ones last. */
interface DrawnPatch {
  plan: PatchPlan;
  circuits: { id: string; gates: string[] }[];
  exact: Float64Array;
}

function drawPatches(gateClass: GateClass, device: Device, generator: Xoshiro256): DrawnPatch[] {
  return patchPlans(gateClass, gateClass.floor.circuits, true).map((plan, p) => {
    for (;;) {
      const circuits = drawCircuits(generator, plan.estimated + plan.sealed, plan.lengths, plan.labels).map((gates, c) => ({ id: `p${p}c${c}`, gates }));
      if (!isSound(plan, gateClass.gates, circuits.slice(0, plan.estimated))) continue;
      return { plan, circuits, exact: exactProbabilities(exactOn(device, gateClass.gates, plan.qubits), circuits.map((c) => c.gates)) };
    }
  });
}

/** The figures' true values, by name: from exact maps of the patches and exact probabilities over the register. */
function truthsOf(gateClass: GateClass, device: Device): (name: FigureName) => number {
  const { gates } = gateClass;
  const whole = exactOn(device, gates, Array.from({ length: gateClass.registerSize }, (_, q) => q));
  const ideal = perfect(device, gateClass);
  const made = new Map<string, number>();
  for (const { depth, circuits } of gateClass.bench) {
    const labels = circuits.map((c) => c.gates);
    const p = exactProbabilities(ideal, labels);
    const q = exactProbabilities(whole, labels);
    made.set(`retained-signal ${depth}`, retainedSignal(p, q, 0, whole.d));
    made.set(`output-error ${depth}`, meanTotalVariation(q, 0, p, 0, labels.length, whole.d));
  }
  made.set('readout-loss', 1 - retainedSignal(exactProbabilities(ideal, [[]]), exactProbabilities(whole, [[]]), 0, whole.d));
  return ({ key, depth, gate, qubits }) => {
    if (key === 'retained-signal' || key === 'output-error') return made.get(`${key} ${depth}`) ?? NaN;
    if (key === 'readout-loss') return made.get(key)!;
    const set = idealGateSet(gates, qubits);
    const own = exactOn(device, gates, qubits).maps.gates;
    if (key === 'error-per-gate') return new ErrorPerGate(set).measure(own);
    const k = set.labels.indexOf(gate ?? '');
    if (k < 0) return NaN;
    const meter = new GateLoss(set.gates[k]!, set.D);
    meter.measure(own, k * set.D * set.D);
    return key === 'gate-loss' ? meter.loss : key === 'angle-error' ? meter.angle : NaN;
  };
}

function perfect(device: Device, gateClass: GateClass) {
  const qubits = Array.from({ length: gateClass.registerSize }, (_, q) => q);
  const set = idealGateSet(gateClass.gates, qubits);
  const exact = exactOn(device, gateClass.gates, qubits);
  const gates = new Float64Array(exact.maps.gates.length);
  set.gates.forEach((g, k) => gates.set(g, k * set.D * set.D));
  return { ...exact, maps: { gates, state: set.state, effects: exact.maps.effects }, allEffects: [...set.effects] };
}

/** Trials of a chained register: whole datasets through the method's one entry function. */
export function runChainedChunk(cell: Cell, gateClass: GateClass, generator: Xoshiro256, chunk: number): Found {
  const { gates, registerSize } = gateClass;
  const register = Array.from({ length: registerSize }, (_, q) => `q${q}`);
  const device = makeDevice(gates, registerSize, cell.noise, cell.coherent, generator);
  const patches = drawPatches(gateClass, device, generator);
  const truthAt = truthsOf(gateClass, device);
  const truths = new Map<string, number>();
  const sealed = patches.flatMap(({ plan, circuits }) => circuits.slice(plan.estimated).map((c) => c.id));
  const tally = new Tally();
  const found: Found = { trials: cell.chunk, settled: 0, stopped: 0, passed: 0, loss: Math.max(...lossNames(gateClass).map((name) => truthAt(name))), figures: [] };
  for (let trial = 0; trial < cell.chunk; trial++) {
    const measured = patches.map(({ plan, circuits, exact }) => drawCounts(circuits, exact, plan.qubits.length, cell.shots, generator));
    const dataset = datasetOf(gateClass, register, patches, measured);
    const contentId = bytesToHex(sha256(utf8ToBytes(`${seedText(cell, chunk)}, trial ${trial}`)));
    const seal = { format: 'evenbeam.seal' as const, formatVersion: '1.0.0' as const, runSheet: 'RS-000000', secret: '00'.repeat(32), sealSha256: '00'.repeat(32), sealed };
    const { result, replicates } = estimate({ dataset, contentId, gateClass, seal, replicates: cell.replicates });
    const settled = result.patches.every((p) => p.settled);
    if (settled) found.settled++;
    if (result.warnings.some((w) => w.includes('stopped'))) found.stopped++;
    if (result.sealedCheck?.passed) found.passed++;
    result.figures.forEach((figure, i) => {
      if (figure.value === null) return;
      const id = JSON.stringify([figure.key, figure.depth, figure.gate, figure.qubits]);
      if (figure.key !== 'prediction-error' && !truths.has(id)) truths.set(id, truthAt(figure));
      const truth = figure.key === 'prediction-error' ? sealedTruth(patches, measured, registerSize) : truths.get(id)!;
      const distance = figure.key === 'output-error' || figure.key === 'prediction-error';
      tally.add(figure, truth, figure.value, replicates.values.subarray(i * cell.replicates, (i + 1) * cell.replicates), distance, settled);
    });
  }
  return { ...found, figures: tally.figures };
}

const lossNames = (gateClass: GateClass): FigureName[] => gateClass.gates.map((g) => ({ key: 'gate-loss', depth: null, gate: g.label, qubits: g.targets }));

/** Distance of the exact probabilities from what was counted on the sealed circuits over the whole register. */
function sealedTruth(patches: readonly DrawnPatch[], measured: readonly DatasetCircuit[][], registerSize: number): number {
  const p = patches.findIndex(({ plan }) => plan.qubits.length === registerSize);
  const { plan, exact } = patches[p]!;
  const d = 2 ** registerSize;
  const circuits = measured[p]!.slice(plan.estimated);
  const observed = new Float64Array(circuits.length * d);
  circuits.forEach((c, i) => {
    for (let o = 0; o < d; o++) observed[i * d + o] = (c.counts[o.toString(2).padStart(registerSize, '0')] ?? 0) / c.shots;
  });
  return meanTotalVariation(exact, plan.estimated, observed, 0, circuits.length, d);
}

function datasetOf(gateClass: GateClass, register: string[], patches: readonly DrawnPatch[], measured: DatasetCircuit[][]): Dataset {
  return {
    format: 'evenbeam.dataset', formatVersion: '1.0.0', title: 'Coverage study', gateClass: gateClass.id, device: { provider: 'Pellmere Instruments', name: 'Reed-1', modality: 'simulated' },
    register, gates: gateClass.gates, patches: patches.map(({ plan }, p) => ({ qubits: plan.qubits, circuits: measured[p]! })),
    acquisition: { startedAt: '2026-01-01T00:00:00Z', endedAt: '2026-01-01T01:00:00Z', software: 'coverage study' }, contributors: [{ name: 'A. Example' }], licence: 'CC-BY-4.0',
  };
}
