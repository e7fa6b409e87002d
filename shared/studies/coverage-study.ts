import { z } from 'zod';

/** What coverage is counted for: the figures of a result, and predicted probabilities. */
export const studyKeys = ['retained-signal', 'output-error', 'error-per-gate', 'gate-loss', 'angle-error', 'readout-loss', 'prediction-error', 'prediction'] as const;
export type StudyKey = (typeof studyKeys)[number];

const count = z.int().min(0);

/** Coverage of one figure in one cell, as counts: how often the truth lay inside the interval of each level. */
const figureSchema = z.object({
  key: z.enum(studyKeys),
  /** Depth of the bench circuits; of a prediction the length of its circuit. */
  depth: z.int().nullable(),
  gate: z.string().nullable(),
  qubits: z.array(z.int()),
  /** Trials in which the figure had an interval. */
  trials: count,
  /** Of them, with the truth inside at nominal 50, 80 and 95 %. */
  inside: z.tuple([count, count, count]),
  /** With the truth below and above the 95 % interval. */
  below: count,
  above: count,
  /** Mean and standard deviation of (estimate − truth)/standard error; 0 and 1 if all is well. */
  z: z.tuple([z.number(), z.number()]),
  /** The same over settled trials alone: how many, and inside at 95 %. */
  settled: z.tuple([count, count]),
});

const cellSchema = z.object({
  gateClass: z.string(),
  /** Entanglement infidelity of each made device's worst gate. */
  noise: z.number(),
  /** Share of it that is a wrong rotation. */
  coherent: z.number(),
  shots: z.int(),
  trials: count,
  /** Made devices, each with a sheet of circuits of its own. */
  devices: count,
  /** Replicates of each trial. */
  replicates: z.int(),
  settled: count,
  /** Trials whose passes were stopped. */
  stopped: count,
  /** Sealed checks that passed; 99 % should. */
  sealedPassed: count,
  /** Greatest true gate loss of a device, mean over the devices. */
  greatestLoss: z.number(),
  figures: z.array(figureSchema),
});

export const coverageStudySchema = z.object({
  format: z.literal('evenbeam.study.coverage'),
  method: z.string(),
  date: z.string(),
  command: z.string(),
  seedRule: z.string(),
  /** Replicates of a published interval; the cells say how many theirs were read from. */
  publishedReplicates: z.int(),
  /** What was done otherwise than it might be thought. */
  notes: z.array(z.string()),
  cells: z.array(cellSchema),
});

export type CoverageStudy = z.infer<typeof coverageStudySchema>;
export type CoverageCell = z.infer<typeof cellSchema>;
export type CoverageFigure = z.infer<typeof figureSchema>;
