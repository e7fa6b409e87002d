/** What is wrong with one qubit. Every strength is that of one gate time unless it says otherwise. */
export interface QubitNoise {
  /** Relative over-rotation for turns about X, Y and Z: θ becomes θ(1 + s), s weighted by the squares of the axis. */
  angleScale: { x: number; y: number; z: number };
  /** Radians by which every rotation axis leans: towards Z, or towards X for an axis near Z. */
  tilt: number;
  /** Radians turned about Z after each gate, the identity included: a detuned drive. */
  detuning: number;
  /** Probabilities of an X, Y or Z flip after a gate. */
  flips: { x: number; y: number; z: number };
  /** Probability that |1⟩ falls to |0⟩ during a gate. */
  damping: number;
  /** Probabilities |1⟩ → third level and back; absent = the qubit has two levels. The third level reads out as 1. */
  leakage?: { out: number; back: number };
  /** Population of |1⟩ when a circuit starts. */
  preparation: number;
  /** Readout: probability to report 1 for |0⟩, and 0 for |1⟩. */
  readout: { zeroAsOne: number; oneAsZero: number };
  /** Each angleScale moves linearly from −drift to +drift about its mean while a dataset is taken. */
  drift: number;
}

/** What is wrong between two qubits of a register. */
export interface PairNoise {
  /** Positions in the register. */
  qubits: [number, number];
  /** Radians of exp(−i·angle/2·Z⊗Z) after the entangling gate: for a cz, half of its error in conditional phase. */
  angle: number;
  /** Radians turned about Z on each qubit after the entangling gate. */
  phases: [number, number];
  /** ρ → (1 − p)ρ + p·I/4 after the entangling gate. */
  depolarising: number;
  /** Gate times that the entangling gate lasts: damping and flips of both qubits act that much longer. */
  duration: number;
  /** Radians of Z⊗Z per gate time while one of the two is driven; an idle neighbour outside a circuit stays in |0⟩. */
  stray: number;
}

/** The hidden truth of a device at one moment. */
export interface DeviceModel {
  /** In the order of the register. */
  qubits: QubitNoise[];
  pairs: PairNoise[];
}

export const perfectQubit: QubitNoise = {
  angleScale: { x: 0, y: 0, z: 0 }, tilt: 0, detuning: 0, flips: { x: 0, y: 0, z: 0 }, damping: 0, preparation: 0, readout: { zeroAsOne: 0, oneAsZero: 0 }, drift: 0,
};

export function perfectPair(first: number, second: number): PairNoise {
  return { qubits: [first, second], angle: 0, phases: [0, 0], depolarising: 0, duration: 1, stray: 0 };
}
