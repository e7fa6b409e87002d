import { z } from 'zod';
import { sha256 } from '#shared/contracts/common.ts';
import { accessionPattern } from '#shared/domain/ids.ts';
import { facts, inMebi, mostBytes, parseJson, publicState, Unreadable, type EntrySource } from './source.ts';

/** Waiting time for one file, large ones on slow lines included. */
const timeoutMs = 300_000;

const pattern = /^\/(?:entries|api\/v1\/entries)\/([^/]+)(?:\/v\/([0-9]{1,7})(?:\/[a-z-]+)?)?\/?$/;

interface Place {
  origin: string;
  accession: string;
  version: number | null;
}

/** The entry that a page's or the API's address names; the version is optional. */
export function placeOf(address: string): Place {
  const url = URL.canParse(address) ? new URL(address) : null;
  if (!url || !['http:', 'https:'].includes(url.protocol)) throw new Unreadable(`${address} is no address of the form https://…/entries/EVB-000042 or …/entries/EVB-000042/v/1.`);
  const [, name = '', version] = pattern.exec(url.pathname) ?? [];
  // "EVB-000042.1", as entries are cited, names the version too.
  const [accession = '', cited] = name.split('.');
  if (!accessionPattern.test(accession) || (cited !== undefined && !/^[1-9][0-9]{0,6}$/.test(cited))) throw new Unreadable(`${address} names no entry; an address ends in /entries/EVB-000042 or /entries/EVB-000042/v/1.`);
  const number = version ?? cited;
  return { origin: url.origin, accession, version: number === undefined ? null : Number(number) };
}

const reasonOf = (error: unknown): string => {
  if (error instanceof DOMException && error.name === 'TimeoutError') return `no answer within ${timeoutMs / 1000} seconds`;
  const cause = error instanceof Error ? (error.cause as NodeJS.ErrnoException | undefined) : undefined;
  return cause?.code ?? (error instanceof Error ? error.message : String(error));
};

async function readBounded(response: Response, most: number, address: string): Promise<Uint8Array> {
  const parts: Uint8Array[] = [];
  let size = 0;
  for await (const part of (response.body ?? []) as AsyncIterable<Uint8Array>) {
    size += part.length;
    if (size > most) throw new Unreadable(`${address} sends more than ${inMebi(most)}; that is the most allowed.`);
    parts.push(part);
  }
  return Buffer.concat(parts);
}

interface Answer {
  status: number;
  bytes: Uint8Array;
}

const quiet = new Set([200, 404, 410]);

/** A kept connection that the other side has closed meanwhile: reading once more is all it takes. */
const closedMeanwhile = new Set(['ECONNRESET', 'UND_ERR_SOCKET']);

async function get(address: string, most: number, again = true): Promise<Answer> {
  try {
    const response = await fetch(address, { headers: { accept: 'application/json, application/octet-stream' }, signal: AbortSignal.timeout(timeoutMs) });
    if (!quiet.has(response.status)) throw new Unreadable(`${address} answered with status ${response.status}.`);
    return { status: response.status, bytes: await readBounded(response, most, address) };
  } catch (error) {
    if (error instanceof Unreadable) throw error;
    if (again && closedMeanwhile.has(reasonOf(error))) return get(address, most, false);
    throw new Unreadable(`${address} cannot be reached (${reasonOf(error)}).`);
  }
}

const answered = z.object({ accession: z.string(), version: z.number(), method: z.string(), state: publicState, provenance: z.object({ contentId: sha256, bytesSha256: sha256, resultSha256: sha256, replicatesSha256: sha256 }) });

/** One version of an entry as a registry hands it out, by the public addresses. */
export async function readAddress(address: string): Promise<EntrySource> {
  const place = placeOf(address);
  const base = `${place.origin}/api/v1/entries/${place.accession}`;
  const page = place.version === null ? base : `${base}/v/${place.version}`;
  const head = await get(page, mostBytes.entry);
  if (head.status !== 200) throw new Unreadable(`There is no public entry at ${page}. Check the number, and whether it is under embargo.`);
  const parsed = answered.safeParse(parseJson(head.bytes, `What ${page} answers`));
  if (!parsed.success) throw new Unreadable(`${page} does not answer as a registry does: ${parsed.error.issues[0]?.path.join('.') ?? ''} ${parsed.error.issues[0]?.message ?? ''}`);
  const { accession, version, method, state, provenance } = parsed.data;
  const file = (kind: string, most: number): Promise<Answer> => get(`${base}/v/${version}/${kind}`, most);
  const result = await file('result', mostBytes.result);
  if (result.status !== 200) throw new Unreadable(`The result of ${accession}.${version} is not handed out (status ${result.status}).`);
  const there = ({ status, bytes }: Answer): Uint8Array | null => (status === 200 ? bytes : null);
  const dataset = await file('dataset', mostBytes.dataset);
  const withdrawn = state === 'withdrawn' || dataset.status === 410;
  if (dataset.status === 404) throw new Unreadable(`The dataset of ${accession}.${version} is not there.`);
  const proofOf = async (query: string): Promise<unknown> => {
    const proof = there(await file(`proof${query}`, mostBytes.proof));
    return proof ? parseJson(proof, `${base}/v/${version}/proof${query}`) : null;
  };
  return {
    facts: facts.parse({ accession, version, method, ...provenance }), withdrawn, dataset: withdrawn ? null : dataset.bytes, result: result.bytes,
    replicates: withdrawn ? null : there(await file('replicates', mostBytes.replicates)), seal: there(await file('seal', mostBytes.seal)), runSheet: there(await file('run-sheet', mostBytes.runSheet)),
    proof: await proofOf(''), withdrawal: withdrawn ? await proofOf('?event=withdrawn') : null, checks: [],
  };
}
