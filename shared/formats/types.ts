/**
 * The open file formats as TypeScript types. The JSON Schemas in schema/ are the authority;
 * a test checks that these types and the schemas name the same properties.
 */

export type Modality = 'superconducting' | 'trapped-ion' | 'neutral-atom' | 'photonic' | 'spin' | 'simulated' | 'other';

/** A complex matrix, row-major, each element [re, im]. */
export type ComplexMatrix = [number, number][][];

/** An OpenQASM 3 standard gate with its angles in radians, or a unitary written out. */
export type IdealGate = { gate: string; params?: number[] } | { unitary: ComplexMatrix };

/** `targets` index the register; the first target is the most significant qubit of the gate's matrix. */
export interface GateDeclaration {
  label: string;
  targets: number[];
  ideal: IdealGate;
}

export interface DatasetCircuit {
  id: string;
  /** Labels in order of time; empty = depth 0. */
  gates: string[];
  shots: number;
  /** Bit strings over the patch's qubits, leftmost = first; absent keys are zero. */
  counts: Record<string, number>;
  block?: number;
}

export interface DatasetPatch {
  /** Indices into the register, in the order of the bit strings. */
  qubits: number[];
  circuits: DatasetCircuit[];
}

export interface Dataset {
  format: 'evenbeam.dataset';
  formatVersion: '1.0.0';
  title: string;
  gateClass: string;
  runSheet?: { id: string; sha256: string } | null;
  device: { provider: string; name: string; modality: Modality; firmware?: string };
  register: string[];
  gates: GateDeclaration[];
  patches: DatasetPatch[];
  acquisition: { startedAt: string; endedAt: string; software: string; notes?: string };
  contributors: { name: string; orcid?: string }[];
  licence: string;
  extra?: Record<string, unknown>;
}

export interface PlainCircuit {
  id: string;
  qubits: number[];
  gates: string[];
}

export interface CircuitsFile {
  format: 'evenbeam.circuits';
  formatVersion: '1.0.0';
  circuits: PlainCircuit[];
}

/** A gate class as shipped in schema/gate-class/<id>/<version>.json: immutable, complete. */
export interface GateClass {
  format: 'evenbeam.gate-class';
  formatVersion: '1.0.0';
  /** "quarter-turn-1q/1" */
  id: string;
  /** "Quarter turns on one qubit" */
  title: string;
  registerSize: number;
  kind: 'joint' | 'chained';
  ranked: boolean;
  /** Rank a sound joint design must have; for chained classes that of one pair patch (240 per entangling gate). */
  expectedRank: number;
  gates: GateDeclaration[];
  /** Circuit lengths a run sheet draws from; for chained classes those of the pair patches. */
  lengths: number[];
  /** Chained classes only: lengths of the one-qubit patches, which draw from every gate of their qubit. */
  localLengths?: number[];
  /** Labels a run sheet draws from; for chained classes those of the pair patches. */
  drawing: string[];
  /** Conditions for ranking, not for validity: circuits to estimate from, shots of each. */
  floor: { circuits: number; shots: number };
  /** Fixed public circuits at depths 0, 1, 4, 8, 16, 32, 64. */
  bench: { depth: number; circuits: PlainCircuit[] }[];
}

/** A circuit of a run sheet: what to run, no counts yet. */
export interface SheetCircuit {
  id: string;
  gates: string[];
}

export interface RunSheet {
  format: 'evenbeam.run-sheet';
  formatVersion: '1.0.0';
  /** "RS-000123"; null for a sheet drawn offline. */
  id: string | null;
  gateClass: string;
  device: { provider: string; name: string } | null;
  register: string[];
  gates: GateDeclaration[];
  shots: number;
  /** Hex seed of the stream the circuits were drawn from. */
  seed: string;
  /** SHA-256 of the secret that chooses the sealed circuits; null for an offline sheet. */
  sealSha256: string | null;
  /** How many circuits of each patch are sealed; which ones stays secret. */
  patches: { qubits: number[]; sealed: number; circuits: SheetCircuit[] }[];
  drawnAt: string | null;
}

/** Opens the seal of a run sheet: the secret and the circuits it chose. Checked against the sheet's commitment. */
export interface Seal {
  format: 'evenbeam.seal';
  formatVersion: '1.0.0';
  runSheet: string;
  /** 32 random bytes, hex. */
  secret: string;
  /** SHA-256 of the secret's bytes, hex: the commitment printed on the sheet. */
  sealSha256: string;
  /** Ids of the sealed circuits: the ones with smallest HMAC-SHA256(secret, id) of each patch. */
  sealed: string[];
}

export type FigureKey = 'retained-signal' | 'output-error' | 'error-per-gate' | 'gate-loss' | 'angle-error' | 'readout-loss' | 'prediction-error';

export interface Interval {
  level: number;
  low: number;
  high: number;
}

export interface Figure {
  key: FigureKey;
  depth: number | null;
  gate: string | null;
  qubits: number[];
  value: number | null;
  standardError: number | null;
  /** 50, 80, 95 %; null where there is none beside a value or no value. */
  intervals: Interval[] | null;
  firstOrder: number | null;
  determined: boolean;
  reason: string | null;
  extrapolated: boolean;
  firstOrderOnly: boolean;
  replicates: number;
}

export interface Misfit {
  residualSum: number;
  expected: number;
  sigmas: number;
  pValue: number;
}

export interface PatchResult {
  qubits: number[];
  columns: number;
  gaugeDimension: number;
  rank: number;
  conditionRatio: number;
  rankAmbiguous: boolean;
  complete: boolean;
  sound: boolean;
  settled: boolean;
  spectrum: number[];
  misfit: Misfit | null;
  /** In the minimum-norm gauge: not figures, not invariant. Row-major error map E_k and the smallest Choi eigenvalue. */
  gateMaps: { gate: string; errorMap: number[]; smallestChoiEigenvalue: number }[];
}

export interface SealedCheck {
  value: number;
  ideal: number;
  noise: number;
  z: number;
  low99: number;
  high99: number;
  passed: boolean;
}

export interface Prediction {
  id: string;
  determined: boolean;
  reason: string | null;
  firstOrderOnly: boolean;
  probabilities: Record<string, number> | null;
  intervals: Record<string, [number, number]> | null;
}

/** A pure function of dataset, seal and method: no time and no machine in it. */
export interface Result {
  format: 'evenbeam.result';
  formatVersion: '1.0.0';
  method: string;
  datasetSha256: string;
  replicates: number;
  sealed: number;
  patches: PatchResult[];
  figures: Figure[];
  sealedCheck: SealedCheck | null;
  predictions: Prediction[];
  warnings: string[];
}
