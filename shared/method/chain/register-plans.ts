import { matchGates } from '#shared/formats/match-gates.ts';
import type { Dataset, GateClass } from '#shared/formats/types.ts';
import { retainedSignal } from '#shared/method/bench-plans.ts';
import { IDEAL } from '#shared/method/chain/map-table.ts';
import { RegisterEvaluator } from '#shared/method/chain/register-evaluator.ts';
import { reasonAgainstCircuit, type RegisterMaps } from '#shared/method/chain/register-maps.ts';
import { compileCircuit, type RegisterCircuit } from '#shared/method/chain/register-program.ts';
import { BENCH_DEPTHS, EXTRAPOLATION, LARGEST_REGISTER } from '#shared/method/constants.ts';
import { planFigure, type FigurePlan } from '#shared/method/figure-plan.ts';
import { frequenciesOf, type Frequencies } from '#shared/method/frequencies.ts';
import { meanTotalVariation } from '#shared/stats/distance.ts';

interface Wanted {
  qubits: readonly number[];
  gates: readonly string[];
}

/** Circuits over the whole register that figures are read on. */
export class RegisterReadings {
  readonly d: number;
  readonly circuits: RegisterCircuit[] = [];
  private readonly evaluator = new RegisterEvaluator();
  private readonly maps: RegisterMaps;

  constructor(maps: RegisterMaps, qubits: number) {
    this.maps = maps;
    this.d = 2 ** qubits;
  }

  /** Adds circuits; returns the row at which they begin. */
  add(circuits: readonly Wanted[]): number {
    const from = this.circuits.length;
    for (const c of circuits) this.circuits.push(compileCircuit(this.maps, c));
    return from;
  }

  /** Probabilities of circuits from … on at a row of the tables, circuits × d. */
  read(row: number, out: Float64Array, from = 0): void {
    for (let c = from; c < this.circuits.length; c++) this.evaluator.run(this.circuits[c]!, row, out, (c - from) * this.d);
  }

  /** Adds circuits and gives their ideal probabilities. */
  addWithIdeal(circuits: readonly Wanted[]): { from: number; ideal: Float64Array } {
    const from = this.add(circuits);
    const ideal = new Float64Array(circuits.length * this.d);
    this.read(IDEAL, ideal, from);
    return { from, ideal };
  }
}

/** Why figures of these circuits are null, or null; `kind` names them in the sentence. */
function reasonAgainst(maps: RegisterMaps, register: readonly string[], circuits: readonly Wanted[], kind: string): string | null {
  const against = circuits.flatMap((c) => reasonAgainstCircuit(maps, register, c) ?? []);
  const first = against[0];
  if (first === undefined) return null;
  return circuits.length === 1 ? first : `${first} (${against.length} of ${circuits.length} ${kind})`;
}

export interface RegisterPlans {
  retained: FigurePlan[];
  output: FigurePlan[];
  readout: FigurePlan;
}

/** Retained signal and output error over the whole register at every bench depth, and readout loss from its empty circuit. */
export function planRegisterFigures(maps: RegisterMaps, dataset: Dataset, gateClass: GateClass | null, longest: number, readings: RegisterReadings): RegisterPlans {
  const { register, gates } = dataset;
  const qubits = [...register.keys()];
  const tooLarge = qubits.length > LARGEST_REGISTER ? 'register too large' : null;
  const labels = gateClass ? matchGates(gateClass.gates, gates).labels : new Map<string, string>();
  const retained: FigurePlan[] = [];
  const output: FigurePlan[] = [];
  for (const depth of BENCH_DEPTHS) {
    const bench = gateClass?.bench.find((b) => b.depth === depth)?.circuits ?? [];
    const wanted = bench.map((c) => ({ qubits: c.qubits, gates: c.gates.map((label) => labels.get(label) ?? label) }));
    const common = { qubits, depth, extrapolated: depth > EXTRAPOLATION * longest };
    const reason = tooLarge ?? (wanted.length === 0 ? 'no bench circuits' : reasonAgainst(maps, register, wanted, 'bench circuits'));
    if (reason !== null) {
      retained.push(planFigure({ ...common, key: 'retained-signal', reason }));
      output.push(planFigure({ ...common, key: 'output-error', reason, distance: true }));
      continue;
    }
    const { from, ideal } = readings.addWithIdeal(wanted);
    retained.push(planFigure({ ...common, key: 'retained-signal', read: (c) => retainedSignal(ideal, c.probabilities, from, readings.d) }));
    output.push(planFigure({ ...common, key: 'output-error', distance: true, read: (c) => meanTotalVariation(c.probabilities, from, ideal, 0, wanted.length, readings.d) }));
  }
  const empty = [{ qubits, gates: [] }];
  const reason = tooLarge ?? reasonAgainst(maps, register, empty, 'bench circuits');
  if (reason !== null) return { retained, output, readout: planFigure({ key: 'readout-loss', qubits, reason }) };
  const { from, ideal } = readings.addWithIdeal(empty);
  return { retained, output, readout: planFigure({ key: 'readout-loss', qubits, read: (c) => 1 - retainedSignal(ideal, c.probabilities, from, readings.d) }) };
}

export interface SealedPlan {
  plan: FigurePlan;
  /** Row of the first sealed circuit among the readings. */
  from: number;
  counts: Frequencies;
  ideal: Float64Array;
}

/** Prediction error: sealed circuits of the patches that are the whole register, each over its patch's qubits in their order. */
export function planRegisterSealed(maps: RegisterMaps, dataset: Dataset, sealed: ReadonlySet<string>, readings: RegisterReadings): SealedPlan {
  const { register, patches } = dataset;
  const qubits = [...register.keys()];
  const whole = patches.filter((p) => p.qubits.length === register.length);
  const circuits = whole.flatMap((p) => p.circuits.filter((c) => sealed.has(c.id)).map((c) => ({ ...c, qubits: p.qubits })));
  let reason: string | null = null;
  if (qubits.length > LARGEST_REGISTER) reason = 'register too large';
  else if (circuits.length === 0) reason = 'no sealed circuits';
  else reason = reasonAgainst(maps, register, circuits, 'sealed circuits');
  const common = { key: 'prediction-error', qubits, reason, distance: true } as const;
  if (reason !== null) return { plan: planFigure(common), from: 0, counts: frequenciesOf([], 1), ideal: new Float64Array(0) };
  const { from, ideal } = readings.addWithIdeal(circuits);
  const counts = frequenciesOf(circuits, register.length);
  return { plan: planFigure({ ...common, read: (c) => meanTotalVariation(c.probabilities, from, counts.observed, 0, circuits.length, readings.d) }), from, counts, ideal };
}
