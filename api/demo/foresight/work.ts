import type { DrawSheetInput, DrawSheetOutput } from '#api/jobs/tasks/draw-sheet.ts';
import type { EstimateDatasetOutput } from '#api/jobs/tasks/estimate-dataset.ts';
import type { DeviceModel } from '#api/demo/simulator/device-model.ts';
import type { Dataset } from '#shared/formats/types.ts';

/** One run of a sheet on a device with a known truth. */
export interface RunOrder {
  /** Seeds the counts. */
  seed: string;
  model: DeviceModel;
  device: Dataset['device'];
  title: string;
  notes?: string;
  startedAt: string;
  shotsPerSecond: number;
  software: string;
  contributors: Dataset['contributors'];
  /** Replicates of the estimate; null where none will be made. */
  replicates: number | null;
}

/** A sheet with all runs of it: what one thread works on at a time. */
export interface SheetOrder {
  key: string;
  sheet: DrawSheetInput;
  /** The circuits are the contributor's own: no number, no seal. */
  ownDesign: boolean;
  runs: RunOrder[];
}

export interface RunOutcome {
  bytes: Uint8Array;
  endedAt: string;
  estimate: EstimateDatasetOutput | null;
}

export interface SheetOutcome {
  drawn: DrawSheetOutput | null;
  runs: RunOutcome[];
}
