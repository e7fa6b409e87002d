import type { DeviceModel } from '#api/demo/simulator/device-model.ts';
import type { Dataset, Modality } from '#shared/formats/types.ts';

/** Typical strengths on one device today; each qubit's own lie within a quarter of them. See QubitNoise and PairNoise. */
export interface NoiseProfile {
  angleScale: number;
  tilt: number;
  detuning: number;
  /** Probability of an X flip after a gate, and the same again for Y. */
  flip: number;
  dephasing: number;
  damping: number;
  preparation: number;
  zeroAsOne: number;
  oneAsZero: number;
  drift?: number;
  leakage?: { out: number; back: number };
  pair?: { angle: number; phase: number; depolarising: number; duration: number; stray: number };
}

/** How a device changes over the two years of the demo. */
export interface SlowChange {
  /** Error strengths at the start of the demo, relative to its end; between them they move geometrically. */
  start: number;
  /** Years of a slow swing about that trend, and its relative height. */
  period: number;
  swing: number;
  /** A repair: before this date, strengths are larger by `by`. */
  repair?: { on: string; by: number };
}

/** An invented device with a known truth. */
export interface DemoDevice {
  provider: string;
  name: string;
  modality: Modality;
  /** Labels of its qubits in a line; neighbours can be entangled if the profile has a pair. */
  qubits: string[];
  /** Gate classes that it is measured in, each with the positions of the register it uses. */
  registers: Record<string, number[]>;
  /** First day of each firmware. */
  firmware: [from: string, version: string][];
  shotsPerSecond: number;
  software: string;
  profile: NoiseProfile;
  change: SlowChange;
  /** What is special about it, for those who build the demo; never shown as a figure. */
  remark?: string;
}

export interface DemoRun {
  device: Dataset['device'];
  /** Labels of the register, for the run sheet. */
  register: string[];
  model: DeviceModel;
  /** When the last shot would be done. */
  endedAt(shots: number): Date;
}
