import { story, type Story } from './story.ts';

type Told = Omit<Parameters<typeof story>[0], 'device' | 'gateClass' | 'day' | 'title'>;
const run = (device: string, day: string, title: string, more: Told = {}): Story => story({ gateClass: 'quarter-turn-1q/1', device, day, title, ...more });

const wrongThreshold = 'The readout threshold was that of the evening before. Gate figures are not touched by it, but the readout loss is about four times too high; a second version follows.';

/** Quarter turns on one qubit: the board with most rows, two years long. Every dataset here is frozen in the end. */
export const quarterTurns: readonly Story[] = [
  run('Meadow-5', '2024-12-02', 'First run on the left half', { exchange: 0 }),
  run('Tarn-1', '2025-01-13', 'Second ion, winter', { circuits: 200 }),
  run('Quill-7', '2025-02-03', 'After firmware 6.3, qubit q11'),
  run('Sedge-3', '2025-03-10', 'Middle dot, first run', { exchange: 1 }),
  run('Lantern-2', '2025-04-07', 'Mode 1, spring', { shots: 2000, runNotes: 'Source power held at 0.8 of its maximum for the whole run.' }),
  run('Marl-4', '2025-05-12', 'Atom a1, May', { circuits: 200, exchange: 2 }),
  run('Weir-11', '2025-06-16', 'Qubit q3 after the repair', { flaw: 'drift', end: { kind: 'run-again', reason: 'The misfit by block rises from the middle of the run to its ends, as it does when a setting moves while circuits are run. Was the drive calibrated within the day? Please run the same sheet again in one piece, and say in the notes when the calibration was made.' }, runNotes: 'One run, without a pause.' }),
  run('Meadow-5', '2025-07-21', 'After firmware 2.1', { runNotes: 'Neighbours of q3 idle in |0⟩ and not driven.' }),
  run('Thistle-6', '2025-08-11', 'Qubit s6, long run', { exchange: 3 }),
  run('Pebble-2', '2025-09-08', 'Single atom, first run', { circuits: 200, shots: 500, exchange: 4 }),
  run('Tarn-1', '2025-10-06', 'Second ion, autumn'),
  run('Plumbline-1', '2025-10-20', 'Reference device, known noise', { notes: 'A simulated device of the laboratory. Its noise is fixed; it serves to check the registry’s figures from outside.' }),
  run('Quill-7', '2025-11-10', 'Qubit q11, one year on'),
  run('Sedge-3', '2025-12-08', 'After firmware 1.0'),
  run('Ferry-3', '2026-01-19', 'Qubit s3, first run', { circuits: 280 }),
  run('Meadow-5', '2026-02-16', 'Before the change of wiring', { shots: 2000 }),
  run('Marl-4', '2026-03-09', 'Atom a1, March', { flaw: 'readout', notes: wrongThreshold }),
  run('Lantern-2', '2026-04-13', 'Mode 1 with the new source', { shots: 2000 }),
  run('Marl-4', '2026-05-04', 'Atom a1, May, threshold set anew', { corrects: 'marl-4-quarter-turn-1q-1-2026-03-09', notes: 'Corrects version 1, whose readout threshold was wrong.' }),
  run('Hedge-1', '2026-05-18', 'A first look at dot1', { exchange: 5 }),
  run('Weir-11', '2026-06-01', 'Qubit q3, eighteen months after the repair'),
  run('Quill-7', '2026-06-15', 'Qubit q11 on firmware 7.0', { flaw: 'readout', notes: wrongThreshold }),
  run('Copse-9', '2026-06-29', 'Qubit q4', { exchange: 6 }),
  run('Quill-7', '2026-07-13', 'Qubit q11, measured again', { corrects: 'quill-7-quarter-turn-1q-1-2026-06-15', notes: 'Corrects version 1, whose readout threshold was wrong.' }),
  run('Tarn-1', '2026-07-27', 'Second ion on firmware 5.0', { shots: 2000 }),
  run('Thistle-6', '2026-08-10', 'Qubit s6 on firmware 3.1'),
  run('Sedge-3', '2026-08-24', 'Middle dot, late summer'),
  run('Meadow-5', '2026-09-07', 'On firmware 2.3', { shots: 2000, exchange: 7 }),
  run('Plumbline-1', '2026-09-14', 'Reference device, a year later'),
  run('Ferry-3', '2026-09-28', 'Qubit s3 after the move', { embargoUntil: '2026-11-16' }),
  run('Marl-4', '2026-10-05', 'Atom a1 after the lasers were set', { corrects: 'marl-4-quarter-turn-1q-1-2026-03-09' }),
  run('Pebble-2', '2026-10-12', 'Single atom, second run', { circuits: 200 }),
];
