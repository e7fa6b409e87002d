import { readFileSync } from 'node:fs';
import { parseArgs } from 'node:util';
import { gunzipBounded } from '#api/lib/gunzip-bounded.ts';
import { writeWhole } from '#api/lib/write-whole.ts';
import { AppError, type ErrorDetail } from '#shared/errors/app-error.ts';
import { readCircuits } from '#shared/formats/read-circuits.ts';
import { readDataset } from '#shared/formats/read-dataset.ts';
import { readSeal } from '#shared/formats/read-seal.ts';
import { estimate } from '#shared/method/estimate.ts';
import type { EstimateProgress } from '#shared/method/types.ts';

const USAGE = 'npm run --silent estimate -- FILE.json [--seal SEAL.json] [--predict CIRCUITS.json] [--replicates N] [--out RESULT.json]';

/** Exit status of a file or a command line that cannot be used. */
const UNUSABLE = 2;

class Unusable extends Error {
  readonly lines: string[];
  constructor(lines: string[]) {
    super(lines.join('\n'));
    this.lines = lines;
  }
}

function told(file: string, errors: readonly ErrorDetail[], several: boolean): Unusable {
  return new Unusable(errors.map(({ pointer, message }) => `${several ? `${file} ` : ''}${pointer}: ${message}`));
}

async function bytesOf(file: string): Promise<Uint8Array> {
  let bytes: Uint8Array;
  try {
    bytes = readFileSync(file);
  } catch (error) {
    throw new Unusable([`: The file ${file} cannot be read (${(error as NodeJS.ErrnoException).code ?? 'unknown reason'}).`]);
  }
  return bytes[0] === 0x1f && bytes[1] === 0x8b ? gunzipBounded(bytes) : bytes;
}

/** All replicates of all figures are held in memory: about a gigabyte for a pair at this number. */
const mostReplicates = 50_000;

function wholeNumber(text: string | undefined): number | undefined {
  if (text === undefined) return undefined;
  const n = Number(text);
  if (!/^[0-9]+$/.test(text) || n < 1 || n > mostReplicates) throw new Unusable([`: --replicates takes a whole number from 1 to ${mostReplicates}, not ${JSON.stringify(text)}.`]);
  return n;
}

function commandLine() {
  try {
    const { values, positionals } = parseArgs({ allowPositionals: true, options: { seal: { type: 'string' }, predict: { type: 'string' }, replicates: { type: 'string' }, out: { type: 'string' } } });
    const [file, more] = positionals;
    if (file === undefined || more !== undefined) throw new Unusable([`: Name one dataset file. ${USAGE}`]);
    return { file, seal: values.seal, predict: values.predict, out: values.out, replicates: wholeNumber(values.replicates) };
  } catch (error) {
    if (error instanceof Unusable) throw error;
    throw new Unusable([`: ${(error as Error).message} ${USAGE}`]);
  }
}

function showProgress({ stage, fraction }: EstimateProgress): void {
  if (process.stderr.isTTY) process.stderr.write(`\r${stage.padEnd(10)} ${String(Math.round(100 * fraction)).padStart(3)} %`);
}

function writeResult(file: string, text: string): void {
  try {
    writeWhole(file, text);
  } catch (error) {
    throw new Unusable([`: The result cannot be written to ${file} (${(error as NodeJS.ErrnoException).code ?? 'unknown reason'}).`]);
  }
}

async function main(): Promise<void> {
  const started = performance.now();
  const asked = commandLine();
  const several = asked.seal !== undefined || asked.predict !== undefined;
  const dataset = readDataset(await bytesOf(asked.file));
  if (!dataset.ok) throw told(asked.file, dataset.errors, several);
  const seal = asked.seal === undefined ? null : readSeal(await bytesOf(asked.seal), dataset.dataset);
  if (seal && !seal.ok) throw told(asked.seal ?? '', seal.errors, several);
  const circuits = asked.predict === undefined ? null : readCircuits(await bytesOf(asked.predict), dataset.dataset);
  if (circuits && !circuits.ok) throw told(asked.predict ?? '', circuits.errors, several);
  const { result } = estimate({
    dataset: dataset.dataset, contentId: dataset.contentId, gateClass: dataset.gateClass, seal: seal?.seal ?? null,
    predict: circuits?.circuits ?? null, replicates: asked.replicates, onProgress: showProgress,
  });
  const text = `${JSON.stringify(result)}\n`;
  if (asked.out === undefined) process.stdout.write(text);
  else writeResult(asked.out, text);
  process.stderr.write(`${process.stderr.isTTY ? '\r' : ''}${((performance.now() - started) / 1000).toFixed(1)} seconds\n`);
}

try {
  await main();
} catch (error) {
  if (error instanceof Unusable) process.stderr.write(`${error.lines.join('\n')}\n`);
  else if (error instanceof AppError) process.stderr.write(`${error.details.length > 0 ? error.details.map((d) => `${d.pointer}: ${d.message}`).join('\n') : `: ${error.message}`}\n`);
  else throw error;
  process.exitCode = UNUSABLE;
}
