import { describe, expect, it } from 'vitest';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import type { GateDeclaration } from '#shared/formats/types.ts';
import { gaugeDirections } from '#shared/method/gauge.ts';
import { idealGateSet } from '#shared/method/gate-set.ts';
import { judgeDesign } from '#shared/method/judge-design.ts';
import { layoutOf } from '#shared/method/parameters.ts';
import { drawCircuits, one, pairGates, QUARTER, seeded } from '#tests/shared/method/made.ts';
import { rankRows } from '#web/features/method/rank-table.ts';

const mixed = [2, 4, 8, 16];
const sets: Readonly<Record<string, [GateDeclaration[], number[]]>> = {
  'identity, rx(π/2), ry(π/2)': [one('id', ['rx', QUARTER], ['ry', QUARTER]), mixed],
  'rx(π/2), ry(π/2)': [one(['rx', QUARTER], ['ry', QUARTER]), mixed],
  'identity, h, t': [one('id', 'h', 't'), mixed],
  'identity, h, t, with circuits of length 8 only': [one('id', 'h', 't'), [8]],
  'x, y, z': [one('x', 'y', 'z'), mixed],
  'rx(π/2) alone': [one(['rx', QUARTER]), [1, 2, 3, 4, 5, 6, 7, 8]],
};

describe('the rank table of the method page', () => {
  it.each(rankRows.filter((row) => row.gates in sets))('$gates: what the page prints is what the method finds', (row) => {
    const [gates, lengths] = sets[row.gates]!;
    const found = judgeDesign({ gates, qubits: [0], circuits: drawCircuits(gates, lengths, 250, seeded(`page ${row.gates}`)) });
    expect([found.columns, found.gaugeDimension, found.rank, found.complete]).toEqual([row.columns, row.gauge, row.rank, row.complete]);
  });

  it('has no other rows than these and the two pairs, whose columns and gauge follow from the gates and whose rank is the gate class’s', () => {
    const pairs = rankRows.filter((row) => !(row.gates in sets));
    expect(pairs).toHaveLength(2);
    pairs.forEach((row, i) => {
      const set = idealGateSet(pairGates(i === 0 ? 'cz' : 'cx'), [0, 1]);
      const layout = layoutOf(set);
      expect([layout.columns, gaugeDirections(set, layout).dimension]).toEqual([row.columns, row.gauge]);
      expect(row.rank).toBe(gateClassById('quarter-turn-cz-2q/1')?.expectedRank);
    });
  });
});
