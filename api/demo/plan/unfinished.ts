import { story, type Story } from './story.ts';

const quarterTurn = 'quarter-turn-1q/1';
const cliffordT = 'clifford-t-1q/1';

/** Datasets that are on their way, or that never became entries: one for every state in which a submission can rest. */
export const unfinished: readonly Story[] = [
  story({ gateClass: quarterTurn, device: 'Sedge-3', day: '2026-03-23', title: 'Middle dot, March', end: { kind: 'cancelled', message: 'The run was made with the settings of the third dot. We cancel it and measure again in August.' } }),
  story({
    gateClass: quarterTurn, device: 'Pebble-2', day: '2026-07-06', title: 'Single atom, July', circuits: 200, runNotes: 'Circuits that looked wrong were run a second time, and the better run was kept.',
    end: { kind: 'declined', reason: 'The notes say that circuits were run twice and the better run was kept. Counts that were chosen after they were looked at are not a sample of what the device does, and no estimate can repair that. A new sheet, with every circuit run once and kept, is welcome.' },
  }),
  story({
    gateClass: quarterTurn, device: 'Thistle-6', day: '2026-10-19', title: 'Qubit s6, October', flaw: 'drift',
    end: { kind: 'returned', reason: 'The misfit by block rises from the middle of the run to its ends, more than in your run of August. Please let us know whether the drive was calibrated between the blocks, and send a run in which it was; the same sheet may be used.' },
  }),
  story({ gateClass: cliffordT, device: 'Tarn-1', day: '2026-10-26', title: 'Second ion, before the upgrade', embargoUntil: '2027-04-26', notes: 'Under embargo until the upgrade is announced.' }),
  story({ gateClass: quarterTurn, device: 'Lantern-2', day: '2026-11-02', title: 'Mode 3, first run', flaw: 'unknown-device', end: { kind: 'blocked' } }),
  story({ gateClass: quarterTurn, device: 'Plumbline-1', day: '2026-11-03', title: 'Reference device, new noise', end: { kind: 'in-review', claimed: false } }),
  story({ gateClass: quarterTurn, device: 'Marl-4', day: '2026-11-05', title: 'Atom a1, November', end: { kind: 'in-review', claimed: false } }),
  story({ gateClass: cliffordT, device: 'Quill-7', day: '2026-11-17', title: 'Clifford and T on q11, second run', end: { kind: 'in-review', claimed: true }, exchange: 11 }),
  story({ gateClass: cliffordT, device: 'Meadow-5', day: '2026-11-11', title: 'Clifford and T on q3, autumn', end: { kind: 'in-review', claimed: false } }),
  story({ gateClass: cliffordT, device: 'Ferry-3', day: '2026-11-16', title: 'Clifford and T on s3', end: { kind: 'in-review', claimed: false } }),
  story({ gateClass: quarterTurn, device: 'Tarn-1', day: '2026-11-18', title: 'Second ion, November', end: { kind: 'ready' } }),
  story({ gateClass: quarterTurn, device: 'Copse-9', day: '2026-11-23', title: 'Qubit q4, held at checking to show that state', end: { kind: 'checking' } }),
];
