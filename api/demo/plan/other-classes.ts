import { story, type Story } from './story.ts';

const cliffordT = 'clifford-t-1q/1';
const halfTurn = 'half-turn-1q/1';
const pair = 'quarter-turn-cz-2q/1';
const chainedTwo = 'chained-cz-2q/1';
const chainedThree = 'chained-cz-3q/1';

/** The other gate classes, and one design of a contributor's own. Every dataset here is frozen in the end. */
export const otherClasses: readonly Story[] = [
  story({ gateClass: halfTurn, device: 'Meadow-5', day: '2025-09-22', title: 'Half turns on q3', notes: 'Run for a partner that uses half turns only.' }),
  story({ gateClass: halfTurn, device: 'Lantern-2', day: '2025-12-01', title: 'Half turns on mode 1', shots: 2000 }),
  story({ gateClass: cliffordT, device: 'Quill-7', day: '2025-12-15', title: 'Clifford and T on q11', exchange: 8 }),
  story({ gateClass: cliffordT, device: 'Sedge-3', day: '2026-02-02', title: 'Clifford and T on the middle dot' }),
  story({ gateClass: cliffordT, device: 'Meadow-5', day: '2026-03-16', title: 'Clifford and T on q3' }),
  story({ gateClass: cliffordT, device: 'Tarn-1', day: '2026-04-20', title: 'Clifford and T on the second ion' }),
  story({ gateClass: pair, device: 'Tarn-1', day: '2026-05-11', title: 'Second and third ion' }),
  story({ gateClass: halfTurn, device: 'Quill-7', day: '2026-05-25', title: 'Half turns on q11' }),
  story({ gateClass: pair, device: 'Meadow-5', day: '2026-06-08', title: 'Pair q2 and q3', exchange: 9 }),
  story({ gateClass: cliffordT, device: 'Lantern-2', day: '2026-07-06', title: 'Clifford and T on mode 1' }),
  story({ gateClass: pair, device: 'Sedge-3', day: '2026-07-20', title: 'First and second dot' }),
  story({ gateClass: pair, device: 'Quill-7', day: '2026-08-17', title: 'Pair q11 and q12' }),
  story({ gateClass: chainedTwo, device: 'Meadow-5', day: '2026-06-22', title: 'q2 and q3 as a register' }),
  story({ gateClass: chainedTwo, device: 'Tarn-1', day: '2026-07-14', title: 'Second and third ion as a register' }),
  story({ gateClass: chainedTwo, device: 'Quill-7', day: '2026-08-03', title: 'q11 and q12 as a register' }),
  story({ gateClass: chainedThree, device: 'Tarn-1', day: '2026-09-01', title: 'Three ions in a row', exchange: 12 }),
  story({ gateClass: chainedThree, device: 'Meadow-5', day: '2026-09-22', title: 'q1 to q3' }),
  story({ gateClass: 'chained-cz-5q/1', device: 'Tarn-1', day: '2026-10-13', title: 'Five ions, the whole chain', notes: 'The first register of five that we ran in one piece.' }),
  story({ gateClass: 'quarter-turn-1q/1', device: 'Weir-11', day: '2026-09-21', title: 'Sequences of our own on q3', ownDesign: true, exchange: 10 }),
];
