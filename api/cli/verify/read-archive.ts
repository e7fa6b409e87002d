import { readFileSync, statSync } from 'node:fs';
import { unzipSync } from 'fflate';
import { sha256Hex } from '#shared/formats/canonical-json.ts';
import type { FileCheck } from '#shared/recompute/types.ts';
import { facts, inMebi, mostBytes, parseJson, Unreadable, type EntrySource } from './source.ts';

/** Files of an archive that are read, and how large each may be when unpacked; whatever else lies in it is left alone. */
const known = {
  'entry.json': mostBytes.entry, 'dataset.json': mostBytes.dataset, 'run-sheet.json': mostBytes.runSheet, 'seal.json': mostBytes.seal,
  'result.json': mostBytes.result, 'replicates.f64': mostBytes.replicates, 'proof.json': mostBytes.proof, 'sha256sums.txt': mostBytes.proof,
} as const;
type Name = keyof typeof known;
const isKnown = (name: string): name is Name => Object.hasOwn(known, name);

function bytesOf(path: string): Uint8Array {
  try {
    const { size } = statSync(path);
    if (size > mostBytes.archive) throw new Unreadable(`${path} is larger than ${inMebi(mostBytes.archive)}, the most that an archive may be.`);
    return readFileSync(path);
  } catch (error) {
    if (error instanceof Unreadable) throw error;
    throw new Unreadable(`The file ${path} cannot be read (${(error as NodeJS.ErrnoException).code ?? 'unknown reason'}).`);
  }
}

/** Known files of a zip, none unpacked beyond its limit and none named twice. Nothing is written to disk, so names are only compared. */
function unpack(bytes: Uint8Array, path: string): Map<Name, Uint8Array> {
  const seen = new Set<string>();
  try {
    const files = unzipSync(bytes, {
      filter: ({ name, originalSize }) => {
        if (!isKnown(name)) return false;
        if (seen.has(name)) throw new Unreadable(`${path} holds ${name} twice.`);
        seen.add(name);
        if (originalSize > known[name]) throw new Unreadable(`${name} in ${path} is larger than ${inMebi(known[name])} when unpacked; that is the most allowed.`);
        return true;
      },
    });
    return new Map(Object.entries(files) as [Name, Uint8Array][]);
  } catch (error) {
    if (error instanceof Unreadable) throw error;
    throw new Unreadable(`${path} is no zip archive, or is damaged or cut short (${error instanceof Error ? error.message : String(error)}).`);
  }
}

/** The archive's own list of digests. */
function checkSums(files: ReadonlyMap<Name, Uint8Array>): FileCheck {
  const title = 'digests that the archive lists';
  const list = files.get('sha256sums.txt');
  if (!list) return { id: 'sums', title, outcome: 'left-out', detail: 'the archive has no sha256sums.txt' };
  const wrong = new TextDecoder().decode(list).split('\n').flatMap((line) => {
    const [digest = '', name = ''] = line.split(/ {2}/);
    if (!isKnown(name)) return [];
    const file = files.get(name);
    return file && sha256Hex(file) === digest ? [] : [`${name} ${file ? 'differs' : 'is missing'}`];
  });
  return { id: 'sums', title, outcome: wrong.length === 0 ? 'agrees' : 'differs', detail: wrong.length === 0 ? 'each file is as listed' : wrong.join(', ') };
}

/** A downloaded archive of one version of an entry. */
export function readArchive(path: string): EntrySource {
  const files = unpack(bytesOf(path), path);
  const need = (name: Name): Uint8Array => {
    const file = files.get(name);
    if (!file) throw new Unreadable(`${path} holds no ${name}: it is not the archive of an entry.`);
    return file;
  };
  const parsed = facts.safeParse(parseJson(need('entry.json'), `entry.json in ${path}`));
  if (!parsed.success) throw new Unreadable(`entry.json in ${path} does not tell of an entry: ${parsed.error.issues[0]?.path.join('.') ?? ''} ${parsed.error.issues[0]?.message ?? ''}`);
  const proof = files.get('proof.json');
  return {
    facts: parsed.data, withdrawn: false, dataset: need('dataset.json'), result: need('result.json'), replicates: files.get('replicates.f64') ?? null, seal: files.get('seal.json') ?? null,
    runSheet: files.get('run-sheet.json') ?? null, proof: proof ? parseJson(proof, `proof.json in ${path}`) : null, withdrawal: null,
    checks: [checkSums(files), { id: 'record', title: 'record', outcome: 'left-out', detail: 'the recorded digests are the archive’s own; check its address, or compare them with the entry’s page' }],
  };
}
