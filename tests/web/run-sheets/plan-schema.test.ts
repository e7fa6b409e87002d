import { describe, expect, it } from 'vitest';
import { planSchema, resizedRegister, type PlanFields } from '#web/features/run-sheets/plan-schema.ts';
import { gateClassAnswer } from '#tests/support/fixtures/desk-people.ts';

const good: PlanFields = { device: 'd', gateClass: 'quarter-turn-1q/1', register: ['q3'], kind: 'random', circuits: '230', shots: '1 000', readoutError: '0.010', wanted: '0.0030' };
const classOf = (id: string) => gateClassAnswer.items.find((c) => c.id === id);
const schema = planSchema(classOf(good.gateClass));
const faults = (change: Partial<PlanFields>): Record<string, string> => {
  const fields = { ...good, ...change };
  const parsed = planSchema(classOf(fields.gateClass)).safeParse(fields);
  return parsed.success ? {} : Object.fromEntries(parsed.error.issues.map((issue) => [issue.path.join('.'), issue.message]));
};

describe('the rules of a plan', () => {
  it('reads numbers with any kind of space between thousands', () => {
    for (const shots of ['1000', '1 000', '1\u202f000', '1\u00a0000']) expect(schema.parse({ ...good, shots }).shots).toBe(1000);
  });

  it('names the floor of the class and the value given', () => {
    expect(faults({ circuits: '120' })).toEqual({ circuits: '120 is below the floor of 200 for this gate class.' });
    expect(faults({ shots: '499' })).toEqual({ shots: '499 is below the floor of 500 for this gate class.' });
    expect(faults({ circuits: '200', shots: '500' })).toEqual({});
  });

  it('offers structured circuits for one qubit; chosen before a change to a pair, the kind is left behind', () => {
    expect(schema.parse({ ...good, kind: 'structured' }).kind).toBe('structured');
    const pair = { ...good, gateClass: 'quarter-turn-cz-2q/1', register: ['q1', 'q2'], circuits: '1200', kind: 'structured' as const };
    expect(planSchema(classOf(pair.gateClass)).parse(pair).kind).toBe('random');
  });

  it('tells all faults at once', () => {
    expect(faults({ circuits: '120', shots: '1.5', register: [''], device: '' })).toEqual({
      circuits: '120 is below the floor of 200 for this gate class.', shots: 'Give a whole number of shots; 1.5 is not one.', 'register.0': 'Name this qubit as your control software does.', device: 'Choose a device.',
    });
  });

  it('takes the floors from the class chosen', () => {
    expect(faults({ gateClass: 'quarter-turn-cz-2q/1', register: ['q1', 'q2'] }).circuits).toBe('230 is below the floor of 1200 for this gate class.');
  });

  it.each([['1.5', 'Give a whole number of circuits; 1.5 is not one.'], ['-3', 'Give a whole number of circuits; -3 is not one.'], ['1e3', 'Give a whole number of circuits; 1e3 is not one.'],
    ['', 'Give the number of circuits.'], ['20001', '20001 is above the circuits a sheet may have, 20000.']])('refuses %j circuits by name', (circuits, sentence) => {
    expect(faults({ circuits }).circuits).toBe(sentence);
  });

  it('names each qubit that is missing or named twice, at its place', () => {
    expect(faults({ gateClass: 'quarter-turn-cz-2q/1', circuits: '1200', shots: '1000', register: ['q1', ' q1 '] })).toEqual({ 'register.1': 'q1 is named twice.' });
    expect(faults({ register: ['  '] })).toEqual({ 'register.0': 'Name this qubit as your control software does.' });
  });

  it('keeps the assumed readout error within 0 and below one half', () => {
    expect(schema.parse({ ...good, readoutError: '0' }).readoutError).toBe(0);
    expect(faults({ readoutError: '0.5' }).readoutError).toContain('0.5 is not one');
    expect(faults({ readoutError: 'x' }).readoutError).toContain('x is not one');
  });

  it('takes an empty wanted width as none, and no other nonsense', () => {
    expect(schema.parse({ ...good, wanted: ' ' }).wanted).toBeNull();
    expect(faults({ wanted: '0' }).wanted).toContain('0 is not one');
  });

  it('resizes the register without losing names', () => {
    expect(resizedRegister(['a', 'b'], 3)).toEqual(['a', 'b', '']);
    expect(resizedRegister(['a', 'b'], 1)).toEqual(['a']);
  });
});
