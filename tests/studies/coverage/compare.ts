/**
 * What changes of the method would do to coverage: `npm run study:coverage:compare -- "<part of a cell's name>" <chunks>` estimates
 * datasets of the study's devices and sheets by M1, by more passes, by 2,000 replicates, and with other intervals of distances. Prints only.
 */
import { setPriority } from 'node:os';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { cellId, cells, chunkStream } from '#tests/studies/coverage/cells.ts';
import { runJointChunk } from '#tests/studies/coverage/joint-chunk.ts';
import { proposals } from '#tests/studies/coverage/proposals.ts';
import type { studyIntervals } from '#tests/studies/coverage/read-interval.ts';
import { Tally, type FigureName } from '#tests/studies/coverage/tally.ts';

/** Counts by every proposal at once. */
class EveryTally extends Tally {
  readonly each = new Map(Object.entries(proposals).map(([name, intervals]) => [name, new Tally(intervals as typeof studyIntervals)]));
  override add(...given: Parameters<Tally['add']>): void {
    for (const tally of this.each.values()) tally.add(...given);
  }
}

const shown: readonly FigureName[] = [
  ...[4, 16, 64].map((depth): FigureName => ({ key: 'retained-signal', depth, gate: null, qubits: [] })),
  ...[4, 16, 64].map((depth): FigureName => ({ key: 'output-error', depth, gate: null, qubits: [] })),
  { key: 'error-per-gate', depth: null, gate: null, qubits: [] }, { key: 'prediction-error', depth: null, gate: null, qubits: [] },
];

setPriority(15);
const [part = '', chunks = '4', ...which] = process.argv.slice(2);
const cell = cells.find((c) => cellId(c).includes(part));
const gateClass = cell && gateClassById(cell.gateClass);
if (!cell || gateClass?.kind !== 'joint') throw new RangeError(`no cell of a joint class is named like "${part}"`);
console.log(cellId(cell), `${chunks} × ${cell.chunk} trials, coverage at 95 %, all trials and settled ones`);
console.log(shown.map((f) => `${f.key} ${f.depth ?? ''}`.trim()).join(' | '));
for (const [label, passes, replicates] of [['8 passes', 8, cell.replicates], ['16 passes', 16, cell.replicates], ['40 passes', 40, cell.replicates], ['2,000 replicates', 8, 2000]] as const) {
  if (which.length > 0 && !which.includes(label)) continue;
  const tally = new EveryTally();
  let settled = 0;
  for (let chunk = 0; chunk < Number(chunks); chunk++) settled += runJointChunk({ ...cell, replicates }, gateClass, chunkStream(cell, chunk), chunk, { passes, tally }).settled;
  for (const [name, own] of tally.each) {
    const row = shown.map((f) => {
      const found = own.figures.find((g) => g.key === f.key && g.depth === f.depth);
      return found ? `${((100 * found.inside[2]) / found.trials).toFixed(1)} (${((100 * found.settled[1]) / found.settled[0]).toFixed(1)})` : '–';
    });
    console.log(`${label}, settled ${settled}, ${name}: ${row.join(' | ')}`);
  }
}
