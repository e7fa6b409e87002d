import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex, hexToBytes, utf8ToBytes } from '@noble/hashes/utils.js';
import { binomial } from '#shared/random/binomial.ts';
import { BinomialTable } from '#shared/random/binomial-table.ts';
import { MultinomialTable } from '#shared/random/multinomial.ts';
import { openStream, streamOf } from '#shared/random/streams.ts';
import { Xoshiro256 } from '#shared/random/xoshiro256.ts';

const seedOf = (text: string): string => bytesToHex(sha256(utf8ToBytes(text)));
const contentId = seedOf('evenbeam conformance: sampler');
const repeated = <T>(count: number, draw: () => T): T[] => Array.from({ length: count }, draw);

const streams = () =>
  ([['replicates', 0], ['misfit', 0], ['sealed', 0], ['replicates', 1], ['misfit', 4]] as const).map(([purpose, patch]) => {
    const generator = openStream(contentId, 'M1', purpose, patch);
    // The upper 53 bits of each word, as whole numbers: a double holds them exactly.
    return { contentId, method: 'M1', purpose, patch, jumps: 3 * patch + streamOf[purpose], first: repeated(8, () => generator.next() * 2 ** 53) };
  });

const binomials = () =>
  ([[10, 0.25], [500, 0.004], [500, 0.996], [40, 0.25], [1000, 0.31], [1000, 0.97], [20_000, 0.5], [3_000_000, 0.2], [5_000_000_000, 0.01], [7, 0], [7, 1]] as const).map(([n, p]) => {
    const seed = seedOf(`evenbeam conformance: binomial ${n} ${p}`);
    const generator = new Xoshiro256(hexToBytes(seed));
    return { n, p, seed, draws: repeated(12, () => binomial(generator, n, p)), next: generator.next() * 2 ** 53 };
  });

const tables = () =>
  ([[40, 0.25], [1000, 0.031], [1000, 0.5], [20_000, 0.9]] as const).map(([n, p]) => {
    const seed = seedOf(`evenbeam conformance: table ${n} ${p}`);
    const generator = new Xoshiro256(hexToBytes(seed));
    const table = BinomialTable.of(n, p);
    if (!table) throw new Error(`No table is kept for ${n} and ${p}.`);
    return { n, p, seed, draws: repeated(12, () => table.draw(generator.next())) };
  });

const multinomials = () =>
  [{ shots: [500, 40], probabilities: [[0.03, 0.97], [0.5, 0.5]] }, { shots: [1000, 800, 2_000_000], probabilities: [[0.9, 0.05, 0.03, 0.02], [0.25, 0.25, 0.25, 0.25], [0.7, 0.1, 0.1, 0.1]] }].map(({ shots, probabilities }, i) => {
    const seed = seedOf(`evenbeam conformance: multinomial ${i}`);
    const generator = new Xoshiro256(hexToBytes(seed));
    const d = probabilities[0]!.length;
    const table = new MultinomialTable(Float64Array.from(probabilities.flat()), Float64Array.from(shots), d);
    const out = new Float64Array(shots.length * (d - 1));
    const replicates = repeated(4, () => {
      table.draw(generator, out, 0, 1);
      return shots.map((n, c) => {
        const counts = Array.from({ length: d - 1 }, (_, o) => Math.round(out[c * (d - 1) + o]! * n));
        return [...counts, n - counts.reduce((sum, k) => sum + k, 0)];
      });
    });
    return { seed, shots, probabilities, replicates };
  });

/** Numbers by which an implementer checks each step of the sampler by itself. */
export const buildSamplerVector = () => ({ format: 'evenbeam.conformance-sampler', formatVersion: '1.0.0', seedText: `${contentId}:M1`, seed: seedOf(`${contentId}:M1`), streams: streams(), binomials: binomials(), tables: tables(), multinomials: multinomials() });
