import { readFileSync } from 'node:fs';
import { describe, expect, it, test } from 'vitest';
import { contentIdOf, sha256Hex } from '#shared/formats/canonical-json.ts';
import { checkSchema } from '#shared/formats/check-schema.ts';
import { readRunSheet } from '#shared/formats/read-run-sheet.ts';
import type { Dataset, Figure, Result, Seal } from '#shared/formats/types.ts';
import { matchSheet } from '#shared/runsheet/match-sheet.ts';
import { checkSeal } from '#shared/runsheet/seal.ts';
import { buildSamplerVector } from '#tests/conformance/sampler.ts';
import { vectorSpecs } from '#tests/conformance/specs.ts';
import { buildVector } from '#tests/conformance/build-vector.ts';
import { estimateVector, type ConformanceIndex, type FileEntry, type VectorEntry } from '#tests/conformance/vectors.ts';

const root = new URL('../../schema/conformance/M1/', import.meta.url);
const bytes = ({ path }: FileEntry): Uint8Array => new Uint8Array(readFileSync(new URL(path, root)));
const json = <T>(file: FileEntry): T => JSON.parse(readFileSync(new URL(file.path, root), 'utf8')) as T;
const index = JSON.parse(readFileSync(new URL('index.json', root), 'utf8')) as ConformanceIndex;
const filesOf = ({ files }: VectorEntry): FileEntry[] => Object.values(files).filter((file) => file !== null);

type Second = Pick<Result, 'sealed'> & {
  header: { contentId: string };
  patches: (Pick<Result['patches'][number], 'qubits' | 'columns' | 'gaugeDimension' | 'rank' | 'conditionRatio' | 'rankAmbiguous' | 'complete' | 'sound' | 'settled' | 'gateMaps'> & { residualSum: number })[];
  figures: Pick<Figure, 'key' | 'depth' | 'gate' | 'qubits' | 'value' | 'firstOrder' | 'determined' | 'extrapolated' | 'firstOrderOnly'>[];
  sealedCheck: { value: number; ideal: number } | null;
  predictions: Pick<Result['predictions'][number], 'id' | 'determined' | 'firstOrderOnly' | 'probabilities'>[];
};

const near = (got: number | null | undefined, want: number | null, what: string): void => {
  if (typeof want !== 'number' || typeof got !== 'number') expect(got, what).toBe(want);
  else expect(Math.abs(got - want), `${what}: ${got}, not ${want}`).toBeLessThanOrEqual(1e-9 * Math.max(1, Math.abs(want)));
};

test('the index names every file with its length and digest, each under a megabyte', () => {
  expect(index).toMatchObject({ format: 'evenbeam.conformance', method: 'M1', vectors: vectorSpecs.map(({ name, about, replicates }) => ({ name, about, replicates })) });
  for (const file of [index.sampler, ...index.vectors.flatMap(filesOf)]) {
    const content = bytes(file);
    expect({ path: file.path, bytes: content.length, sha256: sha256Hex(content) }).toEqual(file);
    expect(file.bytes, file.path).toBeLessThan(2 ** 20);
  }
});

test('the sampler gives the published numbers', () => {
  expect(JSON.parse(JSON.stringify(buildSamplerVector()))).toEqual(json(index.sampler));
});

describe.each(index.vectors)('conformance vector $name', (vector) => {
  const dataset = json<Dataset>(vector.files.dataset);
  const published = json<Result>(vector.files.result);

  it('is drawn and run by its specification alone; sheet, seal and dataset belong together', () => {
    const made = buildVector(vectorSpecs.find(({ name }) => name === vector.name)!);
    const { files } = vector;
    expect({ dataset: made.dataset, sheet: made.sheet, seal: made.seal }).toEqual({ dataset, sheet: files.runSheet && json(files.runSheet), seal: files.seal && json(files.seal) });
    expect([contentIdOf(dataset), published.datasetSha256, files.dataset.sha256]).toEqual([vector.contentId, vector.contentId, vector.contentId]);
    expect(checkSchema('result', published)).toEqual([]);
    if (!files.runSheet || !files.seal) return;
    const reading = readRunSheet(bytes(files.runSheet));
    if (!reading.ok) throw new Error(JSON.stringify(reading.errors));
    expect([reading.contentId, matchSheet(dataset, reading.sheet), checkSeal(json<Seal>(files.seal), reading.sheet)]).toEqual([dataset.runSheet?.sha256, [], []]);
  });

  it('estimated again gives the published bytes and replicates', () => {
    const again = estimateVector({ dataset: bytes(vector.files.dataset), seal: vector.files.seal && bytes(vector.files.seal), circuits: bytes(vector.files.circuits) }, vector.replicates);
    expect(again.result).toBe(new TextDecoder().decode(bytes(vector.files.result)));
    expect(again.replicatesSha256).toBe(vector.replicatesSha256);
  });

  it('agrees to 1e-9 with the independent reading (numpy 2.4.6, recomputed): ranks, figures, predictions', () => {
    const second = JSON.parse(readFileSync(new URL(`../reference/conformance/${vector.name}.json`, import.meta.url), 'utf8')) as Second;
    expect([second.header.contentId, second.sealed, second.patches.length]).toEqual([vector.contentId, published.sealed, published.patches.length]);
    second.patches.forEach(({ conditionRatio, residualSum, gateMaps, ...flags }, i) => {
      const got = published.patches[i]!;
      expect(got).toMatchObject(flags);
      near(got.conditionRatio, conditionRatio, 'ratio');
      near(got.misfit?.residualSum, residualSum, 'residual sum');
      gateMaps.forEach((map) => near(got.gateMaps.find(({ gate }) => gate === map.gate)?.smallestChoiEigenvalue, map.smallestChoiEigenvalue, map.gate));
    });
    const identity = ({ key, depth, gate, qubits }: Second['figures'][number]): string => [key, depth, gate, qubits.join()].join(' ');
    for (const { value, firstOrder, ...want } of second.figures) {
      const got = published.figures.find((f) => identity(f) === identity({ value, firstOrder, ...want }));
      expect(got, identity({ value, firstOrder, ...want })).toMatchObject(want);
      near(got?.value, value, `${want.key} ${want.depth} ${want.gate}`);
      near(got?.firstOrder, firstOrder, `${want.key} ${want.depth} ${want.gate}, single pass`);
    }
    second.predictions.forEach(({ probabilities, ...want }, i) => {
      expect(published.predictions[i]).toMatchObject(want);
      for (const [outcome, p] of Object.entries(probabilities ?? {})) near(published.predictions[i]?.probabilities?.[outcome], p, `${want.id} ${outcome}`);
    });
    near(published.sealedCheck?.value ?? null, second.sealedCheck?.value ?? null, 'prediction error');
    near(published.sealedCheck?.ideal ?? null, second.sealedCheck?.ideal ?? null, 'ideal model');
  });
});
