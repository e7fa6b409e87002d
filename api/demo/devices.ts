import type { DemoDevice } from '#api/demo/device-types.ts';

const oneQubit = (position = 0): Record<string, number[]> => ({ 'quarter-turn-1q/1': [position], 'clifford-t-1q/1': [position] });
const line = (from: number, size: number): number[] => Array.from({ length: size }, (_, i) => from + i);
const labels = (from: number, size: number): string[] => line(from, size).map((i) => `q${i}`);

/** The invented devices of the demo registry: seven providers and an independent laboratory, thirteen devices, six modalities. */
export const demoDevices: readonly DemoDevice[] = [
  {
    provider: 'Fellside Ion Works', name: 'Tarn-1', modality: 'trapped-ion', qubits: ['ion1', 'ion2', 'ion3', 'ion4', 'ion5'],
    registers: { ...oneQubit(1), 'quarter-turn-cz-2q/1': [1, 2], 'chained-cz-2q/1': [1, 2], 'chained-cz-3q/1': [0, 1, 2], 'chained-cz-5q/1': line(0, 5) },
    firmware: [['2024-07-15', '4.0'], ['2025-08-10', '4.1'], ['2026-07-12', '5.0']], shotsPerSecond: 220, software: 'Tarn control 7',
    profile: {
      angleScale: 0.006, tilt: 0.004, detuning: 0.003, flip: 1.5e-4, dephasing: 7e-4, damping: 0, preparation: 0.001, zeroAsOne: 0.002, oneAsZero: 0.005,
      pair: { angle: 0.02, phase: 0.01, depolarising: 0.002, duration: 2, stray: 0.0004 },
    },
    change: { start: 1.5, period: 0.9, swing: 0.06 },
  },
  {
    provider: 'Larkspur Quantics', name: 'Meadow-5', modality: 'superconducting', qubits: labels(0, 5),
    registers: { ...oneQubit(3), 'half-turn-1q/1': [3], 'quarter-turn-cz-2q/1': [2, 3], 'chained-cz-2q/1': [2, 3], 'chained-cz-3q/1': [1, 2, 3], 'chained-cz-5q/1': line(0, 5) },
    firmware: [['2024-09-04', '2.0'], ['2025-05-18', '2.1'], ['2026-01-07', '2.2'], ['2026-09-02', '2.3']], shotsPerSecond: 4000, software: 'Meadow bench 3.2',
    profile: {
      angleScale: 0.008, tilt: 0.005, detuning: 0.004, flip: 1e-4, dephasing: 3e-4, damping: 0.0011, preparation: 0.002, zeroAsOne: 0.002, oneAsZero: 0.005,
      pair: { angle: 0.025, phase: 0.015, depolarising: 0.0025, duration: 1.5, stray: 0.0006 },
    },
    change: { start: 2.1, period: 0.7, swing: 0.08 },
  },
  {
    provider: 'Osierbank Devices', name: 'Sedge-3', modality: 'spin', qubits: ['dot1', 'dot2', 'dot3'],
    registers: { ...oneQubit(1), 'quarter-turn-cz-2q/1': [0, 1], 'chained-cz-3q/1': [0, 1, 2] },
    firmware: [['2024-11-20', '0.9'], ['2025-10-14', '1.0']], shotsPerSecond: 900, software: 'Sedge sequencer 1.8',
    profile: {
      angleScale: -0.007, tilt: 0.006, detuning: 0.006, flip: 1.2e-4, dephasing: 9e-4, damping: 1e-4, preparation: 0.004, zeroAsOne: 0.004, oneAsZero: 0.006,
      pair: { angle: -0.03, phase: 0.02, depolarising: 0.003, duration: 2, stray: 0.0008 },
    },
    change: { start: 2.6, period: 1.1, swing: 0.07 },
  },
  {
    provider: 'Pellmere Instruments', name: 'Quill-7', modality: 'superconducting', qubits: labels(9, 5),
    registers: { ...oneQubit(2), 'half-turn-1q/1': [2], 'quarter-turn-cz-2q/1': [2, 3], 'chained-cz-2q/1': [2, 3], 'chained-cz-3q/1': [1, 2, 3] },
    firmware: [['2024-08-12', '6.3'], ['2025-07-20', '6.4'], ['2026-06-01', '7.0']], shotsPerSecond: 5200, software: 'Quill runner 6',
    profile: {
      angleScale: 0.011, tilt: 0.006, detuning: 0.005, flip: 3e-4, dephasing: 7e-4, damping: 0.0018, preparation: 0.001, zeroAsOne: 0.0008, oneAsZero: 0.0022,
      pair: { angle: 0.035, phase: 0.02, depolarising: 0.004, duration: 1.5, stray: 0.0008 },
    },
    change: { start: 1.3, period: 0.8, swing: 0.06 },
  },
  {
    provider: 'Saltmarsh Atoms', name: 'Marl-4', modality: 'neutral-atom', qubits: ['a1', 'a2', 'a3', 'a4'],
    registers: { ...oneQubit(0), 'quarter-turn-cz-2q/1': [0, 1], 'chained-cz-2q/1': [0, 1], 'chained-cz-3q/1': [0, 1, 2] },
    firmware: [['2024-12-03', '1.2'], ['2025-09-17', '1.3'], ['2026-08-09', '1.4']], shotsPerSecond: 60, software: 'Marl array control 2',
    profile: {
      angleScale: 0.009, tilt: 0.007, detuning: 0.006, flip: 3e-4, dephasing: 0.0013, damping: 6e-4, preparation: 0.004, zeroAsOne: 0.005, oneAsZero: 0.011,
      pair: { angle: 0.03, phase: 0.02, depolarising: 0.004, duration: 1, stray: 0 },
    },
    change: { start: 2.2, period: 1.2, swing: 0.08 },
  },
  {
    provider: 'Larkspur Quantics', name: 'Copse-9', modality: 'superconducting', qubits: ['q4'], registers: oneQubit(0),
    firmware: [['2024-09-04', '2.0'], ['2026-01-07', '2.2']], shotsPerSecond: 3800, software: 'Meadow bench 3.1',
    profile: {
      angleScale: 0.007, tilt: 0.004, detuning: 0.004, flip: 3e-4, dephasing: 5e-4, damping: 0.0012, preparation: 0.002, zeroAsOne: 0.003, oneAsZero: 0.006,
      leakage: { out: 0.012, back: 0.002 },
    },
    change: { start: 1.2, period: 1, swing: 0.05 }, remark: 'leaks to a third level that reads out as 1: the misfit should show it',
  },
  {
    provider: 'Tolland Vale Photonics', name: 'Lantern-2', modality: 'photonic', qubits: ['mode1'], registers: { ...oneQubit(0), 'half-turn-1q/1': [0] },
    firmware: [['2025-02-26', '0.6'], ['2026-03-15', '0.7']], shotsPerSecond: 20000, software: 'Lantern optics bench 0.7',
    profile: { angleScale: -0.012, tilt: 0.009, detuning: 0.007, flip: 5e-4, dephasing: 0.0013, damping: 0, preparation: 0.006, zeroAsOne: 0.009, oneAsZero: 0.011 },
    change: { start: 1.9, period: 0.6, swing: 0.1 },
  },
  {
    provider: 'Brackenholt Spin Works', name: 'Thistle-6', modality: 'spin', qubits: ['s6'], registers: oneQubit(0),
    firmware: [['2024-10-22', '3.0'], ['2026-04-06', '3.1']], shotsPerSecond: 700, software: 'Thistle lab 12',
    profile: { angleScale: 0.004, tilt: 0.006, detuning: 0.006, flip: 4e-4, dephasing: 0.0016, damping: 2e-4, preparation: 0.003, zeroAsOne: 0.005, oneAsZero: 0.007, drift: 0.018 },
    change: { start: 1.4, period: 0.9, swing: 0.06 }, remark: 'its rotation angle drifts during a run: the misfit and the blocks should show it',
  },
  {
    provider: 'Pellmere Instruments', name: 'Weir-11', modality: 'superconducting', qubits: labels(3, 2), registers: { ...oneQubit(0), 'quarter-turn-cz-2q/1': [0, 1] },
    firmware: [['2024-08-12', '6.3'], ['2025-07-20', '6.4']], shotsPerSecond: 5000, software: 'Quill runner 5',
    profile: {
      angleScale: 0.014, tilt: 0.008, detuning: 0.008, flip: 5e-4, dephasing: 0.0012, damping: 0.0024, preparation: 0.003, zeroAsOne: 0.003, oneAsZero: 0.008,
      pair: { angle: 0.05, phase: 0.03, depolarising: 0.007, duration: 2, stray: 0.002 },
    },
    change: { start: 0.75, period: 0.8, swing: 0.07, repair: { on: '2025-06-09', by: 1.7 } }, remark: 'ages: worse at the end than after its repair',
  },
  {
    provider: 'Saltmarsh Atoms', name: 'Pebble-2', modality: 'neutral-atom', qubits: ['a1'], registers: { 'quarter-turn-1q/1': [0] },
    firmware: [['2024-12-03', '1.0'], ['2025-11-12', '1.1']], shotsPerSecond: 40, software: 'Marl array control 1',
    profile: { angleScale: 0.012, tilt: 0.01, detuning: 0.009, flip: 6e-4, dephasing: 0.0026, damping: 8e-4, preparation: 0.006, zeroAsOne: 0.008, oneAsZero: 0.014 },
    change: { start: 1.6, period: 1.3, swing: 0.08 },
  },
  {
    provider: 'Brackenholt Spin Works', name: 'Ferry-3', modality: 'spin', qubits: ['s3'], registers: oneQubit(0),
    firmware: [['2024-10-22', '2.4'], ['2026-04-06', '3.1']], shotsPerSecond: 650, software: 'Thistle lab 11',
    profile: { angleScale: 0.015, tilt: 0.012, detuning: 0.01, flip: 7e-4, dephasing: 0.003, damping: 3e-4, preparation: 0.006, zeroAsOne: 0.009, oneAsZero: 0.012 },
    change: { start: 1.8, period: 0.9, swing: 0.09 },
  },
  {
    provider: 'Osierbank Devices', name: 'Hedge-1', modality: 'spin', qubits: ['dot1'], registers: { 'quarter-turn-1q/1': [0] },
    firmware: [['2025-03-02', '0.3'], ['2025-12-23', '0.4']], shotsPerSecond: 400, software: 'Sedge sequencer 1.1',
    profile: { angleScale: 0.13, tilt: 0.06, detuning: 0.04, flip: 0.004, dephasing: 0.01, damping: 0.008, preparation: 0.02, zeroAsOne: 0.03, oneAsZero: 0.05 },
    change: { start: 1.3, period: 1, swing: 0.05 }, remark: 'about 4 % gate error, most of it coherent: far outside the method’s domain, so the estimate does not settle and it must not be ranked',
  },
  {
    provider: 'Withy Lane Laboratory', name: 'Plumbline-1', modality: 'simulated', qubits: ['q1'], registers: oneQubit(0),
    firmware: [['2025-01-13', '1.0'], ['2026-03-09', '1.1']], shotsPerSecond: 60000, software: 'Plumbline 1',
    profile: { angleScale: 0.003, tilt: 0.002, detuning: 0.002, flip: 1e-4, dephasing: 2e-4, damping: 2e-4, preparation: 0.001, zeroAsOne: 0.001, oneAsZero: 0.002 },
    change: { start: 1, period: 1, swing: 0 }, remark: 'the laboratory’s own simulated device: does not change',
  },
];
