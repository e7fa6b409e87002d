import { mkdirSync, writeFileSync } from 'node:fs';
import { dirname } from 'node:path';
import { fileURLToPath } from 'node:url';
import { canonicalJson, contentIdOf, sha256Hex } from '#shared/formats/canonical-json.ts';
import { buildVector } from './build-vector.ts';
import { buildSamplerVector } from './sampler.ts';
import { vectorSpecs } from './specs.ts';
import { estimateVector, type ConformanceIndex, type FileEntry, type VectorEntry } from './vectors.ts';

/** Writes the published vectors anew: `npm run conformance`. The same checkout writes the same bytes. */
const root = new URL('../../schema/conformance/M1/', import.meta.url);
const encoder = new TextEncoder();

const write = (path: string, text: string): FileEntry => {
  const target = new URL(path, root);
  mkdirSync(dirname(fileURLToPath(target)), { recursive: true });
  const bytes = encoder.encode(text);
  writeFileSync(target, bytes);
  return { path, bytes: bytes.length, sha256: sha256Hex(bytes) };
};

const vectors = vectorSpecs.map((spec): VectorEntry => {
  const { dataset, sheet, seal, circuits } = buildVector(spec);
  const texts = { dataset: canonicalJson(dataset), seal: seal ? canonicalJson(seal) : null, circuits: canonicalJson(circuits) };
  const { result, replicatesSha256 } = estimateVector({ dataset: encoder.encode(texts.dataset), seal: texts.seal === null ? null : encoder.encode(texts.seal), circuits: encoder.encode(texts.circuits) }, spec.replicates);
  const file = (name: string, text: string): FileEntry => write(`${spec.name}/${name}.json`, text);
  console.log(`${spec.name}: ${texts.dataset.length} bytes of counts, ${result.length} of result`);
  return {
    name: spec.name, about: spec.about, replicates: spec.replicates, contentId: contentIdOf(dataset),
    files: {
      dataset: file('dataset', texts.dataset), runSheet: sheet ? file('run-sheet', canonicalJson(sheet)) : null, seal: texts.seal === null ? null : file('seal', texts.seal),
      circuits: file('circuits', texts.circuits), result: file('result', result),
    },
    replicatesSha256,
  };
});
const index: ConformanceIndex = { format: 'evenbeam.conformance', formatVersion: '1.0.0', method: 'M1', vectors, sampler: write('sampler.json', `${JSON.stringify(buildSamplerVector(), null, 1)}\n`) };
write('index.json', `${JSON.stringify(index, null, 1)}\n`);
