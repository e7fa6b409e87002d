/** Draws an unsealed run sheet offline: `npm run --silent run-sheet -- --class ID --circuits N --shots N [--seed HEX] [--out FILE]`. */
import { randomBytes } from 'node:crypto';
import { fileURLToPath } from 'node:url';
import { parseArgs } from 'node:util';
import { writeWhole } from '#api/lib/write-whole.ts';
import { gateClassById, gateClasses } from '#shared/domain/gate-classes.ts';
import { AppError } from '#shared/errors/app-error.ts';
import type { GateClass } from '#shared/formats/types.ts';
import { drawSheet, type DrawProgress } from '#shared/runsheet/draw-sheet.ts';

const usage = `Draws a run sheet offline, without sealed circuits. Data taken with it is estimated, never ranked.

  npm run --silent run-sheet -- --class ID --circuits N --shots N [--seed HEX] [--out FILE]

  --class ID      gate class: ${gateClasses.map(({ id }) => id).join(', ')}
  --circuits N    circuits to estimate from, 1 to 20000 (chained classes: of each pair)
  --shots N       shots of every circuit, 1 to 1000000000
  --seed HEX      1 to 32 bytes; the same seed gives the same sheet. Drawn anew unless given
  --out FILE      where to write the sheet; standard output unless given

Exit 0: drawn. 2: an argument is wrong, or no sheet of N circuits is sound.
`;

/** What stops the command, as a sentence. */
class Refusal extends Error {}

/** An argument is wrong or missing: the usage is shown as well. */
class BadArgument extends Refusal {}

interface Options {
  gateClass: GateClass;
  circuits: number;
  shots: number;
  seed: string;
  out: string | null;
}

function wholeNumber(name: string, text: string | undefined, most: number): number {
  if (text === undefined) throw new BadArgument(`--${name} is missing.`);
  const value = /^[0-9]{1,10}$/.test(text) ? Number(text) : NaN;
  if (!(value >= 1 && value <= most)) throw new BadArgument(`--${name} must be a whole number from 1 to ${most}; it is "${text}".`);
  return value;
}

function optionsFrom(args: string[]): Options | 'help' {
  const text = { type: 'string' } as const;
  let values;
  try {
    ({ values } = parseArgs({ args, options: { class: text, circuits: text, shots: text, seed: text, out: text, help: { type: 'boolean', short: 'h' } } }));
  } catch (error) {
    throw new BadArgument(`${error instanceof Error ? error.message : String(error)}.`, { cause: error });
  }
  if (values.help) return 'help';
  if (values.class === undefined) throw new BadArgument('--class is missing.');
  const gateClass = gateClassById(values.class);
  if (!gateClass) throw new Refusal(`There is no gate class "${values.class}".`);
  const seed = values.seed?.toLowerCase() ?? randomBytes(32).toString('hex');
  if (!/^([0-9a-f]{2}){1,32}$/.test(seed)) throw new BadArgument(`--seed must be 1 to 32 bytes in hexadecimal; it is "${seed}".`);
  return { gateClass, circuits: wholeNumber('circuits', values.circuits, 20_000), shots: wholeNumber('shots', values.shots, 1_000_000_000), seed, out: values.out ?? null };
}

function showProgress({ draws, circuits }: DrawProgress): void {
  if (process.stderr.isTTY) process.stderr.write(`\rdraw ${draws + 1}, ${circuits} circuits `);
}

/** The sheet as text: one circuit a line, so that it can be read and compared. */
function sheetText({ gateClass, circuits, shots, seed }: Options): string {
  const register = Array.from({ length: gateClass.registerSize }, (_, q) => `q${q}`);
  const drawn = drawSheet({ gateClass, register, circuits, shots, seed, issued: null, newSecret: null, onProgress: showProgress });
  if (process.stderr.isTTY) process.stderr.write('\r\u001b[K');
  if (drawn.circuits !== circuits) throw new Refusal(`No sheet of ${circuits} circuits was sound in the draws made for "${gateClass.id}"; the first number that was is ${drawn.circuits}.`);
  const { patches, ...head } = drawn.sheet;
  const lines = Object.entries(head).map(([key, value]) => `  ${JSON.stringify(key)}: ${JSON.stringify(value)}`);
  const blocks = patches.map((patch) => `    { "qubits": ${JSON.stringify(patch.qubits)}, "sealed": ${patch.sealed}, "circuits": [\n${patch.circuits.map((circuit) => `      ${JSON.stringify(circuit)}`).join(',\n')}\n    ] }`);
  return `{\n${lines.join(',\n')},\n  "patches": [\n${blocks.join(',\n')}\n  ]\n}\n`;
}

/** Where a command prints: standard output and standard error. */
interface Printing {
  out: (text: string) => void;
  err: (text: string) => void;
}

const toProcess: Printing = { out: (text) => void process.stdout.write(text), err: (text) => void process.stderr.write(text) };

/** Runs the command and returns its exit code. Nothing is written unless the whole sheet was drawn. */
export function runSheetCommand(args: string[], print: Printing = toProcess): number {
  try {
    const options = optionsFrom(args);
    if (options === 'help') {
      print.out(usage);
      return 0;
    }
    const text = sheetText(options);
    if (options.out === null) {
      print.out(text);
      return 0;
    }
    try {
      writeWhole(options.out, text);
    } catch (error) {
      throw new Refusal(`The sheet could not be written: ${error instanceof Error ? error.message : String(error)}.`, { cause: error });
    }
    return 0;
  } catch (error) {
    if (!(error instanceof Refusal || error instanceof AppError)) throw error;
    print.err(`${error.message}\n${error instanceof BadArgument ? `\n${usage}` : ''}`);
    return 2;
  }
}

if (process.argv[1] === fileURLToPath(import.meta.url)) process.exitCode = runSheetCommand(process.argv.slice(2));
