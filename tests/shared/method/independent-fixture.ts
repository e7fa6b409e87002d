import { readFileSync } from 'node:fs';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { readCircuits } from '#shared/formats/read-circuits.ts';
import { readDataset } from '#shared/formats/read-dataset.ts';
import type { CircuitsFile, Dataset, Result, Seal } from '#shared/formats/types.ts';
import type { EstimateInput } from '#shared/method/types.ts';

/** What the independent reading returns: a result without the members that name the file. Pairs leave out error maps. */
export type IndependentResult = Pick<Result, 'replicates' | 'sealed' | 'patches' | 'figures' | 'sealedCheck' | 'predictions'>;

export interface IndependentFixture {
  dataset: Dataset;
  seal: Seal;
  circuits: CircuitsFile;
  expected: IndependentResult;
}

function fixtureAt(path: string): IndependentFixture {
  const file = JSON.parse(readFileSync(new URL(`../../reference/${path}`, import.meta.url), 'utf8')) as IndependentFixture & { estimate?: IndependentResult };
  return { ...file, expected: file.estimate ?? file.expected };
}

/** Made by tests/reference/independent/make_fixtures.py (numpy 2.4.6, seeds in each file). */
export const independentFixture = (name: string): IndependentFixture => fixtureAt(`independent/${name}.json`);

/** Made by tests/reference/qutip/make_dataset.py (QuTiP 4.7.1, seed 4711), with the device's truth. */
export const qutipFixture = (): IndependentFixture & { truth: { averageGateFidelity: Record<string, number>; retainedSignal: Record<string, number>; outputError: Record<string, number> } } =>
  fixtureAt('qutip/dataset.json') as ReturnType<typeof qutipFixture>;

/** The fixture read as the registry reads a file; a fault in it stops the test. */
export function inputOf({ dataset, seal, circuits }: IndependentFixture, replicates: number): EstimateInput {
  const bytes = (value: unknown): Uint8Array => new TextEncoder().encode(JSON.stringify(value));
  const reading = readDataset(bytes(dataset));
  const asked = readCircuits(bytes(circuits), dataset);
  if (!reading.ok || !asked.ok) throw new Error(`The fixture breaks the format: ${JSON.stringify([reading, asked]).slice(0, 500)}`);
  return { dataset: reading.dataset, contentId: reading.contentId, gateClass: gateClassById(dataset.gateClass), seal, predict: asked.circuits, replicates };
}
