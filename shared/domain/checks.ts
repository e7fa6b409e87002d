import { probit } from 'simple-statistics';
import type { Check } from '#shared/contracts/common.ts';
import type { Dataset, GateClass, PatchResult, Result } from '#shared/formats/types.ts';
import { patchFloor } from './eligibility.ts';
import { formatBytes, formatCount, formatNumber, formatSigned } from './format.ts';

/** What the checks read of a result; its maps and spectra are not looked at. */
type PatchLook = Omit<PatchResult, 'spectrum' | 'gateMaps'>;
export type ResultLook = Pick<Result, 'replicates' | 'figures' | 'sealedCheck'> & { patches: readonly PatchLook[] };

/** How the file stands to its run sheet. */
export type SheetStanding =
  | { kind: 'own-design' }
  | { kind: 'matched'; id: string }
  | { kind: 'refused'; id: string; why: string };

/** Misfit of the circuits of one block, in standard deviations. */
export interface BlockMisfit {
  block: number;
  sigmas: number;
  circuits: number;
}

const made = (id: string, status: Check['status'], title: string, detail: string, blocking = false): Check => ({ id, status, title, detail, blocking });
const circuitsOf = (dataset: Dataset): number => dataset.patches.reduce((sum, patch) => sum + patch.circuits.length, 0);

const sheetCheck = (sheet: SheetStanding): Check => {
  switch (sheet.kind) {
    case 'own-design': return made('run-sheet', 'note', 'Circuits of the contributor’s own design', 'No run sheet is named. The dataset is estimated, but never ranked.');
    case 'matched': return made('run-sheet', 'passed', `Circuits match run sheet ${sheet.id}`, 'hash, gates, register and every circuit agree', true);
    case 'refused': return made('run-sheet', 'failed', `Circuits match run sheet ${sheet.id}`, sheet.why, true);
  }
};

const floorCheck = (dataset: Dataset, gateClass: GateClass | null, sealed: ReadonlySet<string>): Check => {
  if (!gateClass) return made('floor', 'note', 'Circuits and shots reach the floor', 'No gate class of the registry, so there is no floor and no rank.');
  const { floor } = gateClass;
  const title = `At least ${formatCount(floor.circuits)} circuits to estimate from, ${formatCount(floor.shots)} shots each`;
  for (const patch of dataset.patches) {
    if (dataset.patches.length > 1 && patch.qubits.length > 2) continue;
    const open = patch.circuits.filter((c) => !sealed.has(c.id));
    const least = patchFloor(gateClass, patch.qubits.length);
    const where = dataset.patches.length > 1 ? ` in the patch on ${patch.qubits.join(', ')}` : '';
    if (open.length < least) return made('floor', 'note', title, `${formatCount(open.length)}${where} is below the floor of ${formatCount(least)} for this gate class: never ranked.`);
    const shots = open.reduce((min, c) => Math.min(min, c.shots), Number.POSITIVE_INFINITY);
    if (shots < floor.shots) return made('floor', 'note', title, `${formatCount(shots)} shots${where} is below the floor of ${formatCount(floor.shots)} for this gate class: never ranked.`);
  }
  return made('floor', 'passed', title, `${formatCount(circuitsOf(dataset) - sealed.size)} circuits to estimate from`);
};

/** What can be said of a file before its estimate. `deviceFound`: the organisation has a device of that name and provider. */
export const checksOfFile = (facts: { dataset: Dataset; bytes: number; gateClass: GateClass | null; sheet: SheetStanding; device: { found: boolean; sentence: string }; sealed: ReadonlySet<string> }): Check[] => {
  const circuits = circuitsOf(facts.dataset);
  return [
    made('format', 'passed', `File follows format ${facts.dataset.formatVersion}`, `${formatBytes(facts.bytes)}, ${formatCount(circuits)} circuits`, true),
    made('counts', 'passed', 'Counts sum to shots in every circuit', `${formatCount(circuits)} of ${formatCount(circuits)}`, true),
    made('device', facts.device.found ? 'passed' : 'failed', 'Device is registered with your organisation', facts.device.sentence, true),
    sheetCheck(facts.sheet),
    floorCheck(facts.dataset, facts.gateClass, facts.sealed),
  ];
};

const worst = (patches: readonly PatchLook[]): PatchLook | undefined =>
  patches.find((p) => !p.sound) ?? [...patches].sort((a, b) => a.conditionRatio - b.conditionRatio)[0];

const designCheck = (patches: readonly PatchLook[]): Check => {
  const patch = worst(patches);
  if (!patch) return made('design', 'note', 'Design is sound', 'No patch was estimated.');
  const where = patches.length > 1 ? `patch on ${patch.qubits.join(', ')}: ` : '';
  const detail = `${where}rank ${formatCount(patch.rank)} of ${formatCount(patch.columns - patch.gaugeDimension)}, smallest to largest singular value ${formatNumber(patch.conditionRatio, 2)}`;
  if (!patch.complete) return made('design', 'note', 'Design is sound', `${detail}. The circuits do not determine every figure; such a dataset is never ranked.`);
  if (!patch.sound) return made('design', 'note', 'Design is sound', `${detail}. Too weak for a board; such a dataset is never ranked.`);
  return made('design', 'passed', 'Design is sound', detail);
};

const misfitCheck = (patches: readonly PatchLook[]): Check => {
  const withMisfit = patches.flatMap((p) => (p.misfit ? [{ qubits: p.qubits, sigmas: p.misfit.sigmas }] : []));
  const first = [...withMisfit].sort((a, b) => Math.abs(b.sigmas) - Math.abs(a.sigmas))[0];
  if (!first) return made('misfit', 'note', 'Counts fit the estimate', 'Not determined for this dataset.');
  const where = withMisfit.length > 1 ? ` in the patch on ${first.qubits.join(', ')}` : '';
  const detail = `${formatSigned(first.sigmas, 1)} standard deviations from what the estimate leads one to expect${where}`;
  if (first.sigmas > 2.58) return made('misfit', 'note', 'Counts fit the estimate', `${detail}: drift, leakage or crosstalk.`);
  if (first.sigmas < -2.58) return made('misfit', 'note', 'Counts fit the estimate', `${detail}: less scatter than shot noise allows.`);
  return made('misfit', 'passed', 'Counts fit the estimate', detail);
};

const sealedCheck = (result: ResultLook): Check => {
  const c = result.sealedCheck;
  if (!c) return made('sealed', 'note', 'Sealed circuits', 'No circuit of this dataset is sealed, so the prediction is not tested.');
  const range = `prediction error ${formatNumber(c.value, 4)}, 99 % range ${formatNumber(c.low99, 4)} to ${formatNumber(c.high99, 4)}, ideal device ${formatNumber(c.ideal, 4)}`;
  return c.passed ? made('sealed', 'passed', 'Sealed circuits', range) : made('sealed', 'note', 'Sealed circuits', `${range}: outside what chance allows. Never ranked.`);
};

/** Bound that the farthest of m independent standard normal values exceeds with 1 % chance (Šidák): 2.58 for one block, 3.22 for eight. */
const blockBound = (blocks: number): number => probit(1 - (1 - 0.99 ** (1 / blocks)) / 2);

const driftCheck = (drift: readonly BlockMisfit[]): Check => {
  if (drift.length < 2) return made('drift', 'note', 'Drift between blocks', 'The file names no blocks, so drift in time was not tested.');
  const far = [...drift].sort((a, b) => Math.abs(b.sigmas) - Math.abs(a.sigmas))[0];
  if (!far) return made('drift', 'note', 'Drift between blocks', 'Not determined for this dataset.');
  const detail = `block ${far.block} at ${formatSigned(far.sigmas, 1)} standard deviations, the farthest of ${drift.length}`;
  return Math.abs(far.sigmas) > blockBound(drift.length) ? made('drift', 'note', 'Drift between blocks', `${detail}: more than chance allows at 99 %`) : made('drift', 'passed', 'Drift between blocks', detail);
};

/** What the estimate adds to the list. None of these blocks: an entry may be public and say what it lacks. */
export const checksOfEstimate = (result: ResultLook, drift: readonly BlockMisfit[]): Check[] => {
  // A pair that could not be estimated has no misfit and no passes that could settle; the check of the design tells it.
  const loose = result.patches.filter((p) => !p.settled && p.misfit !== null);
  const figures = result.figures.filter((f) => f.intervals !== null).length;
  return [
    designCheck(result.patches),
    loose.length === 0
      ? made('settled', 'passed', 'Estimate settled', 'the last pass moved less than a tenth of shot noise')
      : made('settled', 'note', 'Estimate settled', `Not settled on qubits ${loose.map((p) => p.qubits.join(', ')).join('; ')}: the gate errors are beyond what the eight passes can follow. Never ranked.`),
    made('bootstrap', 'passed', 'Bootstrap', `${formatCount(result.replicates)} replicates, ${figures} of ${result.figures.length} figures with intervals`),
    sealedCheck(result),
    misfitCheck(result.patches),
    driftCheck(drift),
  ];
};

/** The estimate could not be made at all: blocks, with the reason in words. */
export const estimateFailed = (sentence: string): Check => made('estimate', 'failed', 'Estimate', sentence, true);

/** Does any check stop the submission? */
export const isBlocked = (checks: readonly Check[]): boolean => checks.some((c) => c.blocking && c.status === 'failed');

const later: readonly { id: string; title: string; stages: readonly string[] }[] = [
  { id: 'design', title: 'Design is sound', stages: ['design', 'inverse'] },
  { id: 'settled', title: 'Estimate settled', stages: ['passes'] },
  { id: 'bootstrap', title: 'Bootstrap', stages: ['replicates'] },
  { id: 'sealed', title: 'Sealed circuits', stages: ['figures'] },
  { id: 'misfit', title: 'Counts fit the estimate', stages: [] },
  { id: 'drift', title: 'Drift between blocks', stages: [] },
];

/** The list as it stands while the estimate runs: what is known, what is running, what waits. */
export const checksWhileEstimating = (known: readonly Check[], stage: string | null, replicatesDone: number | null, replicates: number): Check[] => [
  ...known,
  ...later.map(({ id, title, stages }) =>
    stage !== null && stages.includes(stage)
      ? made(id, 'running', title, id === 'bootstrap' ? `${formatCount(replicatesDone ?? 0)} of ${formatCount(replicates)} replicates` : '')
      : made(id, 'waiting', title, '')),
];
