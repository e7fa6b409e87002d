import { createHash } from 'node:crypto';
import type { MessagePort } from 'node:worker_threads';
import { simulateDataset } from '#api/demo/simulator/simulate-dataset.ts';
import { drawRunSheetTask, type DrawSheetOutput, type RandomBytes } from '#api/jobs/tasks/draw-sheet.ts';
import { estimateDataset } from '#api/jobs/tasks/estimate-dataset.ts';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import type { RunSheet } from '#shared/formats/types.ts';
import { drawSheet } from '#shared/runsheet/draw-sheet.ts';
import type { RunOrder, RunOutcome, SheetOrder, SheetOutcome } from './work.ts';

/** Bytes that follow from a text: SHA-256 of the text and a counter. The demo is the same on every machine; real sheets are not. */
const bytesFrom = (text: string): RandomBytes => {
  let count = 0;
  return (length) => {
    count += 1;
    return new Uint8Array(createHash('sha256').update(`${text}:${count}`).digest()).subarray(0, length);
  };
};

const drawnAsIssued = ({ key, sheet }: SheetOrder): DrawSheetOutput => {
  const drawn = drawRunSheetTask(sheet, () => undefined, bytesFrom(`demo sheet:${key}`));
  if (!drawn.ok) throw new Error(`The sheet of ${key} could not be drawn: ${drawn.message}`);
  return drawn;
};

const ownCircuits = ({ key, sheet }: SheetOrder): RunSheet => {
  const gateClass = gateClassById(sheet.gateClass);
  if (!gateClass) throw new Error(`There is no gate class ${sheet.gateClass}.`);
  const seed = Buffer.from(bytesFrom(`demo design:${key}`)(32)).toString('hex');
  return drawSheet({ gateClass, register: sheet.register, circuits: sheet.circuits, shots: sheet.shots, seed, issued: null, newSecret: null }).sheet;
};

const run = (order: RunOrder, sheet: RunSheet, drawn: DrawSheetOutput | null): RunOutcome => {
  const shots = sheet.patches.reduce((sum, patch) => sum + patch.circuits.length, 0) * sheet.shots;
  const startedAt = new Date(order.startedAt);
  // Five minutes of setting up, then shot after shot.
  const endedAt = new Date(startedAt.getTime() + 300_000 + (1000 * shots) / order.shotsPerSecond);
  const dataset = simulateDataset({
    sheet, sheetSha256: drawn?.sha256 ?? null, model: order.model, seed: order.seed, title: order.title, device: order.device, startedAt, endedAt,
    software: order.software, ...(order.notes === undefined ? {} : { notes: order.notes }), contributors: order.contributors,
  });
  const bytes = new TextEncoder().encode(`${JSON.stringify(dataset)}\n`);
  const estimate = order.replicates === null ? null : estimateDataset({ bytes, seal: drawn?.seal ?? null, replicates: order.replicates }, () => undefined);
  return { bytes, endedAt: endedAt.toISOString(), estimate };
};

/** Entry of a thread: draws a sheet, runs it on the simulated device as often as asked, and estimates each file. Tells of every file done. */
export default ({ order, port }: { order: SheetOrder; port: MessagePort }): SheetOutcome => {
  const drawn = order.ownDesign ? null : drawnAsIssued(order);
  const sheet = drawn ? (JSON.parse(new TextDecoder().decode(drawn.bytes)) as RunSheet) : ownCircuits(order);
  const runs = order.runs.map((one) => {
    const outcome = run(one, sheet, drawn);
    port.postMessage(null);
    return outcome;
  });
  port.close();
  return { drawn, runs };
};
