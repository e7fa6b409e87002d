import { sha256Hex } from '#shared/formats/canonical-json.ts';
import { estimateVector, type ConformanceIndex, type FileEntry } from './vectors.ts';
import { buildSamplerVector } from './sampler.ts';

/** What a browser finds for the published vectors: the digests of its results and replicates, and the sampler's numbers. */
export interface BrowserFindings {
  vectors: { name: string; resultSha256: string; replicatesSha256: string }[];
  sampler: string;
}

const base = '/schema/conformance/M1/';
const bytesOf = async ({ path }: FileEntry): Promise<Uint8Array> => new Uint8Array(await (await fetch(`${base}${path}`)).arrayBuffer());

export const runVectors = async (): Promise<BrowserFindings> => {
  const index = (await (await fetch(`${base}index.json`)).json()) as ConformanceIndex;
  const vectors = [];
  for (const { name, files, replicates } of index.vectors) {
    const { result, replicatesSha256 } = estimateVector({ dataset: await bytesOf(files.dataset), seal: files.seal && (await bytesOf(files.seal)), circuits: await bytesOf(files.circuits) }, replicates);
    vectors.push({ name, resultSha256: sha256Hex(new TextEncoder().encode(result)), replicatesSha256 });
  }
  return { vectors, sampler: `${JSON.stringify(buildSamplerVector(), null, 1)}\n` };
};

Object.assign(globalThis, { runVectors });
