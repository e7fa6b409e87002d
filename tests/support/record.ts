import { idealProbabilities } from '#api/lib/state-vector.ts';
import type { Work } from '#api/lib/work.ts';
import { callerOf } from '#api/middleware/find-caller.ts';
import type { Device } from '#api/entities/device.ts';
import type { Organisation } from '#api/entities/organisation.ts';
import type { User } from '#api/entities/user.ts';
import { createDevice } from '#api/modules/devices/service.ts';
import { createRunSheet } from '#api/modules/run-sheets/service.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import type { SheetKind } from '#shared/domain/sheet-kinds.ts';
import { canonicalJson, sha256Hex } from '#shared/formats/canonical-json.ts';
import type { Dataset, DatasetCircuit, RunSheet, SheetCircuit } from '#shared/formats/types.ts';
import { binomial } from '#shared/random/binomial.ts';
import { Xoshiro256 } from '#shared/random/xoshiro256.ts';
import { drawSheet } from '#shared/runsheet/draw-sheet.ts';
import { openSeal } from '#shared/runsheet/seal.ts';
import { makeContributor, makeCurator } from './people.ts';
import { signInAs, type Client } from './sign-in.ts';
import type { TestApp } from './test-app.ts';

let serial = 0;
export const generatorOf = (n: number): Xoshiro256 => new Xoshiro256(Uint8Array.from({ length: 32 }, (_, i) => (i === 0 ? 1 : (n * 37 + i * 11) % 256)));

export interface Desk {
  organisation: Organisation;
  contributor: User;
  client: Client;
  curator: User;
  curatorClient: Client;
  device: Device;
}

export const workFor = async (app: TestApp, user: { id: string } | null): Promise<Work> => {
  const em = app.deps.orm.em.fork();
  const caller = user ? await callerOf(em, user.id, app.clock.now(), '') : null;
  return { em, clock: app.clock, queue: app.deps.queue, runInThread: app.deps.threads.run, logKey: app.deps.logKey, doiPrefix: app.deps.config.doi?.prefix ?? null, caller };
};

/** A provider with a contributor and a device, and a curator of nobody's. */
export const makeDesk = async (app: TestApp): Promise<Desk> => {
  const em = app.deps.orm.em.fork();
  const { user: contributor, organisation } = await makeContributor(em);
  const curator = await makeCurator(em);
  const device = await createDevice(await workFor(app, contributor), { organisation: organisation.id, name: `Meadow-${(serial += 1)}`, modality: 'superconducting' });
  return { organisation, contributor, client: await signInAs(app, contributor), curator, curatorClient: await signInAs(app, curator), device };
};

const quarterTurns = () => {
  const gateClass = gateClassById('quarter-turn-1q/1');
  if (!gateClass) throw new Error('quarter-turn-1q/1 is not shipped');
  return gateClass;
};

export const drawCircuits = (count: number, seed: number): SheetCircuit[] => {
  const { lengths, drawing } = quarterTurns();
  const random = generatorOf(seed);
  const pick = <T>(items: readonly T[]): T => items[Math.floor(random.next() * items.length)] as T;
  return Array.from({ length: count }, (_, i) => {
    const length = pick(lengths);
    return { id: `c${String(i + 1).padStart(4, '0')}`, gates: Array.from({ length }, () => pick(drawing)) };
  });
};

export interface DrawnSheet {
  id: string;
  sheet: RunSheet;
  sha256: string;
}

/** A drawn sheet of quarter turns, made without the drawing job: `circuits` to estimate from and a quarter more sealed. */
export const makeDrawnSheet = async (app: TestApp, desk: Desk, given: { circuits?: number; shots?: number; seed?: number; kind?: SheetKind } = {}): Promise<DrawnSheet> => {
  const { circuits = 200, shots = 500, seed = (serial += 1), kind = 'random' } = given;
  const work = await workFor(app, desk.contributor);
  const { id } = await createRunSheet(work, { device: desk.device.id, gateClass: 'quarter-turn-1q/1', register: ['q3'], circuits: 200, shots, kind });
  let secrets = seed;
  const drawn = drawSheet({
    gateClass: quarterTurns(), register: ['q3'], circuits, shots, kind, seed: String(seed).padStart(64, '0'),
    issued: { id, device: { provider: desk.organisation.name, name: desk.device.name }, drawnAt: app.clock.now().toISOString() },
    newSecret: () => Uint8Array.from({ length: 32 }, (_, i) => ((secrets += 1) * 53 + i * 17 + 5) % 256),
  });
  const { sheet, secret } = drawn;
  if (!secret) throw new Error('The sheet has no seal.');
  const sealed = sheet.patches[0]?.sealed ?? 0;
  const bytes = new TextEncoder().encode(canonicalJson(sheet));
  const sha256 = sha256Hex(bytes);
  await work.em.transactional(async (em) => {
    await runSql(em, `update run_sheet set state = 'drawn', progress = 1, drawn_at = $2, circuits = $3, sealed = $4, total_shots = $5, rank = 31, condition_ratio = 0.16, draws = 1, sheet_sha256 = $6, seal_sha256 = $7 where id = $1`, [id, app.clock.now(), circuits, sealed, (circuits + sealed) * shots, sha256, sheet.sealSha256]);
    await runSql(em, 'insert into run_sheet_file (run_sheet_id, bytes, sha256) values ($1, $2, $3)', [id, bytes, sha256]);
    await runSql(em, 'insert into run_sheet_secret (run_sheet_id, seal) values ($1, $2)', [id, JSON.stringify(openSeal(sheet, secret))]);
  });
  return { id, sheet, sha256 };
};

/** Counts of circuits on a device that keeps 0.998 of the signal per gate and misreads 1 %, in eight blocks. */
export const takeCounts = (circuits: readonly SheetCircuit[], shots: number, seed: number, keep = 0.998): DatasetCircuit[] => {
  const random = generatorOf(seed);
  return circuits.map(({ id, gates }, i) => {
    const ideal = idealProbabilities(quarterTurns().gates, 1, gates)[1] ?? 0;
    const ones = binomial(random, shots, 0.5 + (ideal - 0.5) * 0.98 * keep ** gates.length);
    return { id, gates: [...gates], shots, counts: { '0': shots - ones, '1': ones }, block: 1 + Math.floor((8 * i) / circuits.length) };
  });
};

/** A dataset of a desk's device, from a sheet or of a design of its own. */
export const makeDataset = (desk: Desk, sheet: DrawnSheet | null, given: Partial<Dataset> & { seed?: number; circuits?: number; keep?: number } = {}): Dataset => {
  const { seed = (serial += 1), circuits = 220, keep = 0.998, ...more } = given;
  const drawn = sheet?.sheet.patches[0]?.circuits ?? drawCircuits(circuits, seed);
  return {
    format: 'evenbeam.dataset', formatVersion: '1.0.0', title: `Spring run ${seed}`, gateClass: 'quarter-turn-1q/1', runSheet: sheet ? { id: sheet.id, sha256: sheet.sha256 } : null,
    device: { provider: desk.organisation.name, name: desk.device.name, modality: 'superconducting', firmware: '2.3' }, register: ['q3'], gates: structuredClone(quarterTurns().gates),
    patches: [{ qubits: [0], circuits: takeCounts(drawn, sheet?.sheet.shots ?? 500, seed, keep) }],
    acquisition: { startedAt: '2026-05-03T08:00:00Z', endedAt: '2026-05-03T09:10:00Z', software: 'in-house 1.4', notes: '' }, contributors: [{ name: 'A. Example', orcid: '0000-0002-1825-0097' }], licence: 'CC-BY-4.0', ...more,
  };
};

export const bytesOf = (dataset: unknown): Buffer => Buffer.from(JSON.stringify(dataset, null, 1));

/** Sends bytes as they are: the client library would write a Buffer out as JSON. */
export const sendFile = (client: Client, method: 'post' | 'put', path: string, bytes: Uint8Array, headers: Record<string, string> = {}) =>
  client(method, path).set({ 'content-type': 'application/json', ...headers }).serialize((body: unknown) => body as string).send(Buffer.from(bytes) as unknown as object);
