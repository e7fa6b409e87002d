import { planRun } from '#api/demo/device-truth.ts';
import type { DemoDevice } from '#api/demo/device-types.ts';
import { demoDevices } from '#api/demo/devices.ts';
import type { Flaw, Story } from '#api/demo/plan/story.ts';
import { timetableOf, type Timetable } from '#api/demo/plan/timetable.ts';
import { contributorsOf } from '#api/demo/plan/who.ts';
import type { DeviceModel } from '#api/demo/simulator/device-model.ts';
import { usualReplicates } from '#api/modules/submissions/receive.ts';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { runSheetIdOf } from '#shared/domain/ids.ts';
import { patchPlans } from '#shared/runsheet/sheet-plan.ts';
import type { RunOrder, SheetOrder } from './work.ts';

export const deviceOf = (story: Story): DemoDevice => {
  const device = demoDevices.find(({ name }) => name === story.device);
  if (!device) throw new Error(`The demo has no device ${story.device}.`);
  return device;
};

/** Circuits of the sheet as it is asked for, all patches and the sealed ones included. */
const sheetCircuits = ({ gateClass, circuits }: Story): number => {
  const found = gateClassById(gateClass);
  if (!found) throw new Error(`There is no gate class ${gateClass}.`);
  return patchPlans(found, circuits, true).reduce((sum, plan) => sum + plan.estimated + plan.sealed, 0);
};

/** Hours that a run takes at most: with room for a sheet that had to grow. */
const hoursOf = (story: Story): number => (1.5 * sheetCircuits(story) * story.shots) / deviceOf(story).shotsPerSecond / 3600;
export const timesOf = (story: Story): Timetable => timetableOf(story, hoursOf(story));

/** The truth with the flaw of a run that went wrong. */
const flawed = (model: DeviceModel, flaw: Flaw | undefined): DeviceModel => {
  const qubits = model.qubits.map((qubit) => {
    if (flaw === 'drift') return { ...qubit, drift: qubit.drift + 0.03 };
    if (flaw === 'readout') return { ...qubit, readout: { zeroAsOne: 4 * qubit.readout.zeroAsOne, oneAsZero: 4 * qubit.readout.oneAsZero } };
    return qubit;
  });
  return { ...model, qubits };
};

const runOrder = (story: Story, startedAt: Date, round: 1 | 2): RunOrder => {
  const device = deviceOf(story);
  const flaw = round === 1 ? story.flaw : undefined;
  const { device: named, model } = planRun(device, story.gateClass, startedAt);
  return {
    seed: `${story.key}:${round}`, model: flawed(model, flaw), device: flaw === 'unknown-device' ? { ...named, name: 'Lantern-3' } : named,
    title: story.title, ...(story.runNotes === undefined ? {} : { notes: story.runNotes }), startedAt: startedAt.toISOString(),
    shotsPerSecond: device.shotsPerSecond, software: device.software, contributors: contributorsOf(device.provider),
    replicates: story.end.kind === 'blocked' || story.end.kind === 'checking' ? null : usualReplicates,
  };
};

/** What to draw, run and estimate for each story. Sheets are numbered as the registry will number them, from `nextSheet` on. */
export const ordersOf = (stories: readonly Story[], nextSheet: number): SheetOrder[] => {
  let number = nextSheet;
  return [...stories].sort((a, b) => timesOf(a).sheet.getTime() - timesOf(b).sheet.getTime()).map((story) => {
    const { sheet, first, again } = timesOf(story);
    const device = deviceOf(story);
    const { register } = planRun(device, story.gateClass, first.run);
    const ownDesign = story.ownDesign ?? false;
    const id = ownDesign ? '' : runSheetIdOf(number);
    if (!ownDesign) number += 1;
    return {
      key: story.key, ownDesign,
      sheet: { id, gateClass: story.gateClass, device: { provider: device.provider, name: device.name }, register, circuits: story.circuits, shots: story.shots, drawnAt: sheet.toISOString() },
      runs: story.end.kind === 'run-again' ? [runOrder(story, first.run, 1), runOrder(story, again.run, 2)] : [runOrder(story, first.run, 1)],
    };
  });
};
