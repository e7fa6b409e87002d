import { describe, expect, it } from 'vitest';
import { demoEnd, demoStart, planRun, truthOn } from '#api/demo/device-truth.ts';
import { demoDevices } from '#api/demo/devices.ts';
import { trueGateLoss, trueRetainedSignal } from '#api/demo/simulator/truth.ts';
import { gateClassById } from '#shared/domain/gate-classes.ts';

const oneQubit = gateClassById('quarter-turn-1q/1')!;
const lossOf = (name: string, date: Date): number => {
  const { model } = planRun(demoDevices.find((d) => d.name === name)!, oneQubit.id, date);
  return oneQubit.gates.reduce((sum, g) => sum + trueGateLoss(model, g), 0) / oneQubit.gates.length;
};

describe('the demo devices', () => {
  it('come from at least five providers, are at least nine, and bear names of their own', () => {
    expect(new Set(demoDevices.map((d) => d.provider)).size).toBeGreaterThanOrEqual(5);
    expect(new Set(demoDevices.map((d) => d.name)).size).toBeGreaterThanOrEqual(9);
    expect(new Set(demoDevices.map((d) => d.name)).size).toBe(demoDevices.length);
    expect(new Set(demoDevices.map((d) => d.modality)).size).toBeGreaterThanOrEqual(5);
  });

  it('use a register of the class’s size, whose neighbours are coupled', () => {
    for (const device of demoDevices) {
      for (const id of Object.keys(device.registers)) {
        const gateClass = gateClassById(id)!;
        const { model, register } = planRun(device, id, demoEnd);
        expect(register).toHaveLength(gateClass.registerSize);
        expect(new Set(register).size).toBe(register.length);
        for (const gate of gateClass.gates) expect(trueGateLoss(model, gate), `${device.name} ${gate.label}`).toBeGreaterThan(0);
      }
    }
  });

  it('hold one that drifts in its run, one that leaks, and one far outside the domain with about 4 % gate error', () => {
    expect(demoDevices.filter((d) => (d.profile.drift ?? 0) > 0).map((d) => d.name)).toEqual(['Thistle-6']);
    expect(demoDevices.filter((d) => d.profile.leakage).map((d) => d.name)).toEqual(['Copse-9']);
    expect(lossOf('Hedge-1', demoEnd)).toBeGreaterThan(0.03);
    expect(lossOf('Hedge-1', demoEnd)).toBeLessThan(0.05);
    for (const d of demoDevices.filter((x) => x.name !== 'Hedge-1')) expect(lossOf(d.name, demoEnd), d.name).toBeLessThan(0.01);
  });

  it('change slowly: less than 3 % of their loss in a week, tried in every eighth week', () => {
    const week = 7 * 86_400_000;
    for (const { name, change } of demoDevices) {
      for (let at = demoStart.getTime(); at < demoEnd.getTime(); at += 8 * week) {
        if (change.repair && at < Date.parse(change.repair.on) && at + week >= Date.parse(change.repair.on)) continue;
        const ratio = lossOf(name, new Date(at + week)) / lossOf(name, new Date(at));
        expect(Math.abs(ratio - 1), `${name} ${new Date(at).toISOString()}`).toBeLessThan(0.03);
      }
    }
  });

  it('lose more than a quarter of their loss on the day of a repair, and only there', () => {
    const repaired = demoDevices.filter((d) => d.change.repair);
    expect(repaired.map((d) => d.name)).toEqual(['Weir-11']);
    for (const { name, change } of repaired) {
      const day = Date.parse(change.repair!.on);
      expect(lossOf(name, new Date(day)) / lossOf(name, new Date(day - 86_400_000))).toBeLessThan(0.75);
    }
  });

  it('keep their own truth: the same date gives the same device', () => {
    for (const d of demoDevices) expect(truthOn(d, demoEnd)).toEqual(truthOn(d, demoEnd));
  });

  it('differ in retained signal at depth 16, the best above 0.96 and the worst below 0.5', () => {
    const bench = oneQubit.bench.find((b) => b.depth === 16)!.circuits;
    const signals = demoDevices.map((d) => trueRetainedSignal(planRun(d, oneQubit.id, demoEnd).model, oneQubit.gates, bench));
    expect(Math.max(...signals)).toBeGreaterThan(0.96);
    expect(Math.min(...signals)).toBeLessThan(0.5);
  });
});
