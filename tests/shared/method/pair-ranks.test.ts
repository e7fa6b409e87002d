import { readFileSync } from 'node:fs';
import { gunzipSync } from 'node:zlib';
import { describe, expect, test } from 'vitest';
import { designMatrix } from '#shared/method/design.ts';
import { gaugeDirections } from '#shared/method/gauge.ts';
import { idealGateSet, indexCircuits } from '#shared/method/gate-set.ts';
import { judgeDesign } from '#shared/method/judge-design.ts';
import { layoutOf } from '#shared/method/parameters.ts';
import { pairGates } from '#tests/shared/method/made.ts';

interface RankCase { entangling: string; chained: boolean; lengths: number[]; columns: number; gauge: number; rank: number; ratio: number; ambiguous: boolean; largest: number; circuits: string[] }

/** Made by tests/reference/independent/make_ranks.py: full SVD of numpy 2.4.6, cut 1e-9, circuits of its own (seed 20261204). */
const { cases } = JSON.parse(gunzipSync(readFileSync(new URL('../../reference/independent/ranks.json.gz', import.meta.url))).toString('utf8')) as { cases: RankCase[] };

/** Letters a … e stand for the five gates in declared order. */
const circuitsOf = ({ entangling, circuits }: RankCase) => {
  const labels = pairGates(entangling).map((g) => g.label);
  return circuits.map((word) => ({ gates: [...word].map((letter) => labels['abcde'.indexOf(letter)]!) }));
};

test('the cases are the pair of five gates with cz and with cx, their chained pairs, and five deficient designs of one length', () => {
  expect(cases.map((c) => [c.entangling, c.columns, c.gauge, c.rank])).toEqual([
    ['cz', 1263, 240, 1023], ['cz', 240, 0, 240], ['cx', 1263, 240, 1023], ['cx', 240, 0, 240], ['cz', 240, 0, 208], ['cz', 240, 0, 218], ['cz', 240, 0, 236], ['cx', 240, 0, 214], ['cx', 240, 0, 239],
  ]);
});

describe.each(cases.map((c) => ({ ...c, count: c.circuits.length, all: c })))('$count circuits with $entangling of lengths $lengths, chained: $chained', ({ all }) => {
  test(`rank ${all.rank} of ${all.columns}, gauge ${all.gauge}, and the ratio to 1e-9, as numpy's SVD finds them`, () => {
    const judged = judgeDesign({ gates: pairGates(all.entangling), qubits: [0, 1], circuits: circuitsOf(all), pairOfChain: all.chained });
    expect([judged.columns, judged.gaugeDimension, judged.rank, judged.rankAmbiguous]).toEqual([all.columns, all.gauge, all.rank, all.ambiguous]);
    expect(Math.abs(judged.conditionRatio / all.ratio - 1)).toBeLessThan(1e-9);
    expect(judged.sound(all.chained ? 240 : 1023)).toBe(all.rank === all.columns - all.gauge);
  });
});

test.each(cases.filter((c) => !c.chained))('a pair with $entangling: the design annihilates all 240 gauge directions to 1e-12 of its largest singular value', (found) => {
  const set = idealGateSet(pairGates(found.entangling), [0, 1]);
  const layout = layoutOf(set);
  const design = designMatrix(set, layout, indexCircuits(set, circuitsOf(found)));
  const { basis, dimension } = gaugeDirections(set, layout);
  expect(dimension).toBe(240);
  let worst = 0;
  for (let q = 0; q < dimension; q++) {
    let squares = 0;
    for (let i = 0; i < design.rows; i++) {
      let s = 0;
      for (let e = design.start[i]!; e < design.start[i + 1]!; e++) s += design.value[e]! * basis[q * layout.columns + design.index[e]!]!;
      squares += s * s;
    }
    worst = Math.max(worst, Math.sqrt(squares));
  }
  expect(worst).toBeLessThan(1e-12 * found.largest);
});
