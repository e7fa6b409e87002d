import { describe, expect, it } from 'vitest';
import ranksFile from '#shared/studies/ranks.json' with { type: 'json' };
import coverageFile from '#shared/studies/coverage.json' with { type: 'json' };
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { figureDomains } from '#shared/domain/figure-domains.ts';
import { coverageStudySchema } from '#shared/studies/coverage-study.ts';
import { rankStudySchema } from '#shared/studies/rank-study.ts';
import { cells, cellId, SEED_RULE } from '#tests/studies/coverage/cells.ts';
import { scenarios } from '#tests/studies/ranks/scenarios.ts';

describe('the committed coverage study', () => {
  const study = coverageStudySchema.parse(coverageFile);

  it('has cells of the grid only, each with the seed rule of the code, and counts that add up', () => {
    expect(study.seedRule).toBe(SEED_RULE);
    const known = new Set(cells.map(cellId));
    for (const cell of study.cells) {
      expect(known.has(`${cell.gateClass} noise=${cell.noise} coherent=${cell.coherent} shots=${cell.shots}`)).toBe(true);
      expect(gateClassById(cell.gateClass)).not.toBeNull();
      expect(cell.settled).toBeLessThanOrEqual(cell.trials);
      for (const f of cell.figures) {
        expect(f.trials).toBeLessThanOrEqual(cell.trials);
        expect(f.inside[2] + f.below + f.above).toBe(f.trials);
      }
    }
  });

  it('keeps the headline of every ranked class: retained signal at depth 16 has a domain that begins at nothing', () => {
    for (const id of ['quarter-turn-1q/1', 'clifford-t-1q/1', 'quarter-turn-cz-2q/1', 'chained-cz-2q/1', 'chained-cz-3q/1', 'chained-cz-4q/1', 'chained-cz-5q/1']) {
      const own = figureDomains.filter((d) => d.gateClass === id && d.key === 'retained-signal' && d.depth === 16);
      expect(own.length, id).toBeGreaterThan(0);
      for (const d of own) expect(d.gateLoss.from, id).toBe(0);
    }
  });
});

describe('the committed rank study', () => {
  const study = rankStudySchema.parse(ranksFile);

  it('has every scenario of the code with its devices and shots', () => {
    expect(study.scenarios.map(({ id, offsets, shots }) => ({ id, offsets, shots }))).toEqual(scenarios.map(({ id, offsets, shots }) => ({ id, offsets, shots })));
  });

  it('holds jointly at its level in every scenario, to three standard errors; the percentile interval of the rank does not', () => {
    for (const { id, boards, covered } of study.scenarios) {
      expect(boards).toBeGreaterThanOrEqual(2000);
      expect(covered / boards, id).toBeGreaterThan(study.level - 3 * Math.sqrt((study.level * (1 - study.level)) / boards));
    }
    expect(study.scenarios[0]!.naiveCovered / study.scenarios[0]!.boards).toBeLessThan(0.3);
  });
});
