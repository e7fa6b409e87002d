import { readFileSync } from 'node:fs';
import { contentIdOf } from '#shared/formats/canonical-json.ts';
import type { CircuitsFile, Dataset } from '#shared/formats/types.ts';

/** The independent estimate beside a worked example of tests/reference/m1. */
export interface Expected {
  rank: number;
  columns: number;
  conditionRatio: number;
  predictions: Record<string, Record<string, number> | null>;
  gateLoss?: Record<string, number>;
  errorPerGate?: number;
  notDetermined?: string[];
  intervals?: Record<string, { standardError: number; low95: number; high95: number }>;
}

export interface WorkedExample {
  dataset: Dataset;
  circuits: CircuitsFile;
  expected: Expected;
  contentId: string;
}

export function workedExample(name: string): WorkedExample {
  const text = (kind: string) => readFileSync(new URL(`../../reference/m1/${name}.${kind}.json`, import.meta.url), 'utf8');
  const dataset = JSON.parse(text('dataset')) as Dataset;
  return {
    dataset,
    circuits: JSON.parse(text('circuits')) as CircuitsFile,
    expected: JSON.parse(text('expected')) as Expected,
    contentId: contentIdOf(dataset),
  };
}
