import { describe, expect, it } from 'vitest';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { patchPlans } from '#shared/runsheet/sheet-plan.ts';
import { gateClassAnswer } from '#tests/support/fixtures/desk-people.ts';
import { cheapestPlan, circuitsToForecast, headlineWidth, plannerCurves } from '#web/features/run-sheets/plan-forecast.ts';
import { forecastRows, gateListWords, timeWords, widthWords } from '#web/features/run-sheets/plan-words.ts';
import { sheetSize, totalShots } from '#web/features/run-sheets/sheet-size.ts';
import { circuitsOf } from '#web/features/run-sheets/sheet-words.ts';
import { unitForecast, type UnitForecast } from '#web/features/run-sheets/unit-forecast.ts';

const classOf = (id: string) => {
  const found = gateClassAnswer.items.find((c) => c.id === id);
  if (!found) throw new Error(`no fixture for ${id}`);
  return found;
};
const quarter = classOf('quarter-turn-1q/1');
const unit = (circuits: number, atOneShot: number | null): UnitForecast =>
  ({ circuits, rank: 31, conditionRatio: 0.15, figures: [{ key: 'retained-signal', depth: 16, gate: null, halfWidth: atOneShot === null ? null : { typical: atOneShot, least: 0.8 * atOneShot, most: 1.3 * atOneShot } }] });

describe('the size of a sheet', () => {
  it('adds a quarter of sealed circuits, rounded up', () => {
    expect(sheetSize(quarter, 230)).toEqual({ open: 230, sealed: 58 });
    expect(totalShots(quarter, 230, 1000)).toBe(288_000);
  });
  it('counts patches of a chained register: pairs, single qubits of at least 200, and 40 circuits over all', () => {
    // three qubits, two pairs, 600 circuits: 2·600 + 3·200 open; 2·150 + 3·50 + 40 sealed (method M1, run sheets)
    expect(sheetSize(classOf('chained-cz-3q/1'), 600)).toEqual({ open: 1800, sealed: 490 });
    expect(sheetSize(classOf('chained-cz-2q/1'), 1200)).toEqual({ open: 1200 + 2 * 400, sealed: 300 + 2 * 100 });
    // in a register of two the pair is the whole register
    for (const id of ['chained-cz-2q/1', 'chained-cz-3q/1', 'chained-cz-5q/1', 'quarter-turn-cz-2q/1']) {
      const plans = patchPlans(gateClassById(id)!, 777, true);
      const sum = (of: 'estimated' | 'sealed') => plans.reduce((s, p) => s + p[of], 0);
      expect(sheetSize(gateClassById(id)!, 777), id).toEqual({ open: sum('estimated'), sealed: sum('sealed') });
    }
  });
});

describe('the circuits of a drawn sheet', () => {
  it('are read from the shots, since a chained sheet counts those of each pair only', () => {
    // three qubits, 600 a pair: 2·600 + 3·200 to estimate from, 2·150 + 3·50 + 40 sealed
    expect(circuitsOf({ circuits: 600, sealed: 490, shots: 1000, totalShots: 2_290_000 })).toEqual({ all: 2290, open: 1800 });
    expect(circuitsOf({ circuits: 230, sealed: 58, shots: 500, totalShots: 144_000 })).toEqual({ all: 288, open: 230 });
    expect(circuitsOf({ circuits: null, sealed: null, shots: 500, totalShots: null })).toBeNull();
  });
});

describe('the cheapest plan', () => {
  it('has the fewest shots in all among those that reach the width, and keeps the floors', () => {
    const units = [unit(200, 0.2), unit(400, 0.12), unit(800, 0.02)];
    // 200: (0.2/0.003)² = 4 445 → 4 450 × 250; 400: 1 600 × 500; 800: 45 → floor 500 × 1 000
    expect(cheapestPlan(quarter, units, 0.003)).toMatchObject({ circuits: 800, shotsEach: 500, shots: 500_000 });
    expect(cheapestPlan(quarter, units.slice(0, 2), 0.003)).toMatchObject({ circuits: 400, shotsEach: 1600, shots: 800_000 });
  });
  it('really reaches the width it promises', () => {
    for (const wanted of [0.001, 0.0037, 0.02]) expect(cheapestPlan(quarter, [unit(200, 0.2)], wanted)?.halfWidth).toBeLessThanOrEqual(wanted);
  });
  it('is none where nothing is determined, or where ten million shots a circuit do not suffice', () => {
    expect(cheapestPlan(quarter, [unit(200, null)], 0.003)).toBeNull();
    expect(cheapestPlan(quarter, [unit(200, 100)], 0.003)).toBeNull();
  });
});

describe('the drawing', () => {
  it('starts each curve at its floor of shots and falls as one over the root of the shots', () => {
    const units = new Map([[300, unit(300, 0.15)], [1200, unit(1200, 0.06)]]);
    const [own, more] = plannerCurves(quarter, units, { circuits: 300, shots: 1000 });
    expect([own?.name, own?.main, more?.main]).toEqual(['300 circuits', true, false]);
    expect(own?.points[0]).toEqual({ shots: 375 * 500, halfWidth: 0.15 / Math.sqrt(500) });
    expect(own?.points.at(-1)?.shots).toBe(3_750_000);
    for (const p of own?.points ?? []) expect(p.halfWidth * Math.sqrt(p.shots)).toBeCloseTo(0.15 * Math.sqrt(375), 3);
  });
  it('asks for the plan’s own number first, and each number once', () => {
    expect(circuitsToForecast(quarter, 400)).toEqual([400, 1600, 200, 300, 600, 800, 1200]);
  });
});

describe('a forecast on sample sheets', () => {
  const gateClass = gateClassById('quarter-turn-1q/1');
  if (!gateClass) throw new Error('the class is not shipped');
  const seen = unitForecast(gateClass, 200, 0.01);
  it('is the same every time, with full rank', () => {
    expect(unitForecast(gateClass, 200, 0.01)).toEqual(seen);
    expect(seen.rank).toBe(gateClass.expectedRank);
  });
  it('names the spread of single sheets round the typical width', () => {
    const width = headlineWidth(seen, 1000);
    expect(width?.least).toBeLessThan(width?.typical ?? 0);
    expect(width?.most).toBeGreaterThan(width?.typical ?? 0);
  });
  it('gives rows in words, angle error only where there is an angle', () => {
    const names = forecastRows(seen, 1000, quarter.gates).map((row) => row.name);
    expect(names).toContain('Gate loss, identity');
    expect(names).toContain('Angle error, rx(π/2)');
    expect(names).not.toContain('Angle error, identity');
    expect(names.filter((n) => n.startsWith('Retained signal'))).toEqual(['Retained signal, depth 16']);
  });
  it('says so where the gate set does not determine a figure', () => {
    const half = gateClassById('half-turn-1q/1');
    if (!half) throw new Error('the class is not shipped');
    const rows = forecastRows(unitForecast(half, 200, 0.01), 1000, classOf('half-turn-1q/1').gates);
    expect(rows.find((row) => row.name === 'Error per gate')?.width).toBeNull();
    expect(rows.find((row) => row.headline)?.width).toMatch(/^±0\.00/);
  });
});

describe('a forecast of several qubits', () => {
  it.each([['quarter-turn-cz-2q/1', 1200, 1023, 0.012], ['chained-cz-3q/1', 600, 240, 0.006]] as const)('%s: one row for each gate however many qubits have it, and the headline width at 1,000 shots', (id, circuits, rank, most) => {
    const several = unitForecast(gateClassById(id)!, circuits, 0.01);
    expect(several.rank).toBe(rank);
    expect(headlineWidth(several, 1000)?.typical).toBeGreaterThan(most / 4);
    expect(headlineWidth(several, 1000)?.typical).toBeLessThan(most);
    const rows = forecastRows(several, 1000, classOf(id).gates);
    expect(new Set(rows.map((row) => row.name)).size).toBe(rows.length);
    expect(rows.filter((row) => row.name.startsWith('Gate loss')).map((row) => row.name)).toContain('Gate loss, cz');
    expect(rows.find((row) => row.name === 'Gate loss, rx(π/2)')?.width).toMatch(/^±0\.00\d+ to ±0\.00\d+$/);
  });
});

describe('words of a plan', () => {
  it('writes widths with two digits and times as people say them', () => {
    expect(widthWords(0.00371)).toBe('±0.0037');
    expect([60_000, 288_000, 36_000_000].map(timeWords)).toEqual(['about 60 seconds', 'about 5 minutes', 'about 10 hours']);
  });
  it('lists the gates of a register without repeating them for each qubit', () => {
    expect(gateListWords(quarter)).toBe('identity, rx(π/2), ry(π/2)');
    expect(gateListWords(classOf('chained-cz-3q/1'))).toBe('identity, rx(π/2), ry(π/2) on each qubit; cz on 0 and 1, 1 and 2');
  });
});
