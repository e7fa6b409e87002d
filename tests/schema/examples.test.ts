import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { contentIdOf } from '#shared/formats/canonical-json.ts';
import { checkSchema } from '#shared/formats/check-schema.ts';
import { readCircuits } from '#shared/formats/read-circuits.ts';
import { readDataset } from '#shared/formats/read-dataset.ts';
import { readRunSheet } from '#shared/formats/read-run-sheet.ts';
import { readSeal } from '#shared/formats/read-seal.ts';
import type { Result } from '#shared/formats/types.ts';
import { matchSheet } from '#shared/runsheet/match-sheet.ts';
import { checkSeal } from '#shared/runsheet/seal.ts';

const folder = new URL('../../schema/', import.meta.url);
const bytes = (path: string): Uint8Array => readFileSync(new URL(path, folder));

function must<T extends { ok: boolean }>(reading: T): Extract<T, { ok: true }> {
  expect(reading).toMatchObject({ ok: true });
  return reading as Extract<T, { ok: true }>;
}

describe('examples beside the schemas', () => {
  test.each(readdirSync(new URL('dataset/examples/', folder)))('dataset %s is valid', (name) => {
    must(readDataset(bytes(`dataset/examples/${name}`)));
  });

  test('the chain of one sheet belongs together: sheet, seal, dataset, circuits, result', () => {
    const { sheet, contentId: sheetId } = must(readRunSheet(bytes('run-sheet/examples/one-qubit.json')));
    const { dataset, contentId } = must(readDataset(bytes('dataset/examples/one-qubit.json')));
    expect(dataset.runSheet).toEqual({ id: sheet.id, sha256: sheetId });
    expect(matchSheet(dataset, sheet)).toEqual([]);
    const { seal } = must(readSeal(bytes('seal/examples/one-qubit.json'), dataset));
    expect(checkSeal(seal, sheet)).toEqual([]);
    const { circuits } = must(readCircuits(bytes('circuits/examples/one-qubit.json'), dataset));
    const result = JSON.parse(readFileSync(new URL('result/examples/one-qubit.json', folder), 'utf8')) as Result;
    expect(checkSchema('result', result)).toEqual([]);
    expect(result).toMatchObject({ datasetSha256: contentId, sealed: seal.sealed.length });
    expect(result.predictions.map(({ id }) => id)).toEqual(circuits.circuits.map(({ id }) => id));
  });

  test('the dataset printed in the guide is valid', () => {
    const printed = /```json\n([^`]*)```/.exec(readFileSync(new URL('README.md', folder), 'utf8'))?.[1] ?? '';
    must(readDataset(new TextEncoder().encode(printed)));
  });

  test('the digests that the guide prints are those of the examples', () => {
    const guide = readFileSync(new URL('README.md', folder), 'utf8');
    expect(guide).toContain(contentIdOf(JSON.parse(readFileSync(new URL('dataset/examples/one-qubit.json', folder), 'utf8'))));
    expect(guide).toContain(contentIdOf(JSON.parse(readFileSync(new URL('run-sheet/examples/one-qubit.json', folder), 'utf8'))));
  });
});
