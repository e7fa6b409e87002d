import type { DemoDevice, DemoRun, SlowChange } from '#api/demo/device-types.ts';
import type { DeviceModel, PairNoise, QubitNoise } from '#api/demo/simulator/device-model.ts';
import { createGenerator, type Generator } from '#api/demo/simulator/generator.ts';
import { AppError } from '#shared/errors/app-error.ts';

/** The two years that the demo registry lives through. */
export const demoStart = new Date('2024-12-01T00:00:00Z');
export const demoEnd = new Date('2026-12-01T00:00:00Z');
const yearMs = 365.25 * 86_400_000;

/** Strengths on `date` relative to the end of the demo; `phase` sets where the slow swing stands. */
function strength(change: SlowChange, date: Date, phase: number): number {
  const years = (date.getTime() - demoStart.getTime()) / yearMs;
  const left = Math.min(1, Math.max(0, 1 - years / 2));
  const trend = change.start ** left * (1 + change.swing * Math.sin((2 * Math.PI * years) / change.period + 2 * Math.PI * phase));
  return change.repair && date < new Date(`${change.repair.on}T00:00:00Z`) ? trend * change.repair.by : trend;
}

/** Within a quarter of `typical`, drawn once for each qubit and property. */
function near(typical: number, stream: Generator): number {
  return typical * (0.75 + 0.5 * stream.next());
}

/** The hidden truth of the whole device on a date. Random numbers are drawn in a fixed order, so only the date moves it. */
export function truthOn(device: DemoDevice, date: Date): DeviceModel {
  const stream = createGenerator(`device:${device.provider}/${device.name}`);
  const { profile, change } = device;
  const qubits = device.qubits.map((): QubitNoise => {
    const s = strength(change, date, stream.next());
    const slower = Math.sqrt(s);
    const side = (): number => (stream.next() < 0.3 ? -1 : 1);
    return {
      angleScale: { x: near(profile.angleScale, stream) * slower * side(), y: near(profile.angleScale, stream) * slower * side(), z: near(profile.angleScale / 2, stream) * slower * side() },
      tilt: near(profile.tilt, stream) * slower, detuning: near(profile.detuning, stream) * slower * side(),
      flips: { x: near(profile.flip, stream) * s, y: near(profile.flip, stream) * s, z: near(profile.dephasing, stream) * s },
      damping: near(profile.damping, stream) * s, preparation: near(profile.preparation, stream) * slower,
      readout: { zeroAsOne: near(profile.zeroAsOne, stream) * slower, oneAsZero: near(profile.oneAsZero, stream) * slower },
      drift: profile.drift ?? 0, ...(profile.leakage ? { leakage: { out: profile.leakage.out * s, back: profile.leakage.back } } : {}),
    };
  });
  const { pair } = profile;
  const pairs = pair ? device.qubits.slice(1).map((_, i): PairNoise => {
    const s = strength(change, date, stream.next());
    const slower = Math.sqrt(s);
    return {
      qubits: [i, i + 1], angle: near(pair.angle, stream) * slower, phases: [near(pair.phase, stream) * slower, -near(pair.phase, stream) * slower],
      depolarising: near(pair.depolarising, stream) * s, duration: pair.duration, stray: near(pair.stray, stream),
    };
  }) : [];
  return { qubits, pairs };
}

/** The part of a device that a register uses, its positions counted anew. Neighbours left out rest and are forgotten. */
export function selectRegister(model: DeviceModel, positions: readonly number[]): DeviceModel {
  const pairs = model.pairs.filter((p) => p.qubits.every((q) => positions.includes(q)));
  return {
    qubits: positions.map((q) => model.qubits[q]!),
    pairs: pairs.map((p) => ({ ...p, qubits: [positions.indexOf(p.qubits[0]), positions.indexOf(p.qubits[1])] })),
  };
}

/** What a run of a gate class on a device needs: labels, truth on that day, firmware, end time. */
export function planRun(device: DemoDevice, gateClass: string, startedAt: Date): DemoRun {
  const positions = device.registers[gateClass];
  if (!positions) throw new AppError('invalid-request', `${device.name} is not measured in gate class “${gateClass}”.`);
  const day = startedAt.toISOString().slice(0, 10);
  const firmware = device.firmware.filter(([from]) => from <= day).at(-1)?.[1];
  return {
    device: { provider: device.provider, name: device.name, modality: device.modality, ...(firmware ? { firmware } : {}) },
    register: positions.map((q) => device.qubits[q]!),
    model: selectRegister(truthOn(device, startedAt), positions),
    endedAt: (shots) => new Date(startedAt.getTime() + 300_000 + (1000 * shots) / device.shotsPerSecond),
  };
}
