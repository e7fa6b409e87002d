import { createHash } from 'node:crypto';
import { planRun } from '#api/demo/device-truth.ts';
import { demoDevices } from '#api/demo/devices.ts';
import { simulateDataset } from '#api/demo/simulator/simulate-dataset.ts';
import type { Dataset, RunSheet } from '#shared/formats/types.ts';

export interface Measured {
  dataset: Dataset;
  /** The file as it is sent. */
  bytes: Buffer;
}

/** What a contributor does between the sheet and the file: runs every circuit, here on a simulated device with a known truth. */
export const measureSheet = (sheetBytes: Buffer, title: string): Measured => {
  const sheet = JSON.parse(sheetBytes.toString('utf8')) as RunSheet;
  const device = demoDevices.find(({ name }) => name === sheet.device?.name);
  if (!device || sheet.drawnAt === null) throw new Error('The sheet is not of a demo device.');
  const startedAt = new Date(sheet.drawnAt);
  const { device: named, model } = planRun(device, sheet.gateClass, startedAt);
  const dataset = simulateDataset({
    sheet, sheetSha256: createHash('sha256').update(sheetBytes).digest('hex'), model, seed: title, title, device: named, startedAt, endedAt: new Date(startedAt.getTime() + 60_000),
    software: device.software, contributors: [{ name: 'Ida Marsh' }],
  });
  return { dataset, bytes: Buffer.from(`${JSON.stringify(dataset, null, 1)}\n`) };
};
