import { gateClassById } from '#shared/domain/gate-classes.ts';
import type { SheetKind } from '#shared/domain/sheet-kinds.ts';
import { runSheetIdOf, runSheetPattern } from '#shared/domain/ids.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { canBeStructured, structuredRefusal } from '#shared/runsheet/sheet-plan.ts';
import { Device } from '#api/entities/device.ts';
import { RunSheet } from '#api/entities/run-sheet.ts';
import { requireActor } from '#api/lib/actor.ts';
import { recordAudit } from '#api/lib/audit.ts';
import { nextNumber } from '#api/lib/names.ts';
import { inTransaction, type Work } from '#api/lib/work.ts';

export interface RunSheetInput {
  device: string;
  gateClass: string;
  register: string[];
  /** How circuits are drawn; random unless told. */
  kind?: SheetKind;
  /** Circuits to estimate from; the sealed ones come on top. */
  circuits: number;
  shots: number;
}

export const findRunSheet = async ({ em }: Pick<Work, 'em'>, id: string): Promise<RunSheet> => {
  const found = runSheetPattern.test(id) ? await em.findOne(RunSheet, { id }, { populate: ['device.organisation', 'organisation', 'createdBy'] }) : null;
  if (!found) throw new AppError('not-found', `There is no run sheet ${JSON.stringify(id.slice(0, 40))}.`);
  return found;
};

export const findDeviceById = async ({ em }: Pick<Work, 'em'>, id: string): Promise<Device> => {
  const device = await em.findOne(Device, { id }, { populate: ['organisation'] });
  if (!device) throw new AppError('not-found', `There is no device ${JSON.stringify(id.slice(0, 120))}.`);
  return device;
};

/** Faults that the contract cannot see: a class that exists, a register of its size, the floors. */
const refuse = (input: RunSheetInput): void => {
  const gateClass = gateClassById(input.gateClass);
  const details: { pointer: string; message: string }[] = [];
  if (!gateClass) details.push({ pointer: '/gateClass', message: `There is no gate class ${JSON.stringify(input.gateClass)}.` });
  else {
    if (input.register.length !== gateClass.registerSize) details.push({ pointer: '/register', message: `This gate class has ${gateClass.registerSize} ${gateClass.registerSize === 1 ? 'qubit' : 'qubits'}; ${input.register.length} ${input.register.length === 1 ? 'is' : 'are'} named.` });
    if (input.kind === 'structured' && !canBeStructured(gateClass)) details.push({ pointer: '/kind', message: structuredRefusal(gateClass) });
    if (input.circuits < gateClass.floor.circuits) details.push({ pointer: '/circuits', message: `${input.circuits} is below the floor of ${gateClass.floor.circuits} for this gate class.` });
    if (input.shots < gateClass.floor.shots) details.push({ pointer: '/shots', message: `${input.shots} is below the floor of ${gateClass.floor.shots} for this gate class.` });
  }
  if (new Set(input.register).size !== input.register.length) details.push({ pointer: '/register', message: `Each qubit must be named once. Given: ${input.register.join(', ')}.` });
  const first = details[0];
  if (first) throw new AppError('invalid-request', `${first.pointer}: ${first.message}${details.length > 1 ? ` And ${details.length - 1} more.` : ''}`, details);
};

/** Asks for a run sheet: its row and the job that draws it, together or not at all. */
export const createRunSheet = (work: Work, input: RunSheetInput): Promise<RunSheet> => {
  refuse(input);
  return inTransaction(work, async (tx) => {
    const { em, clock } = tx;
    const actor = await requireActor(tx);
    const device = await findDeviceById(tx, input.device);
    const id = runSheetIdOf(await nextNumber(em, 'run_sheet_number'));
    const sheet = em.create(RunSheet, {
      id, organisation: device.organisation, device, gateClass: input.gateClass, register: input.register, kind: input.kind ?? 'random', circuitsAsked: input.circuits, shots: input.shots, state: 'waiting', progress: 0, message: null,
      createdBy: actor.userId, createdAt: clock.now(), drawnAt: null, circuits: null, sealed: null, totalShots: null, rank: null, conditionRatio: null, draws: null, sheetSha256: null, sealSha256: null,
    });
    recordAudit(em, { at: clock.now(), action: 'run-sheet.create', subjectType: 'run-sheet', subjectId: id, ...(tx.caller ? { caller: tx.caller } : {}), organisationId: device.organisation.id, requestId: tx.requestId ?? null, detail: { ...input } });
    await em.flush();
    await tx.queue.send('draw-sheet', { runSheet: id }, { em });
    return sheet;
  });
};
