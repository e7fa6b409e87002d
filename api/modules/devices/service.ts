import { UniqueConstraintViolationException } from '@mikro-orm/core';
import { AppError } from '#shared/errors/app-error.ts';
import { Device, type modalities } from '#api/entities/device.ts';
import { Organisation } from '#api/entities/organisation.ts';
import { recordAudit } from '#api/lib/audit.ts';
import { inTransaction, type Work } from '#api/lib/work.ts';
import { actorOf } from '#api/lib/actor.ts';

/** Lower-case words joined by hyphens: "Meadow-5 (left)" -> "meadow-5-left". */
export const slugOf = (text: string): string => text.normalize('NFKD').replace(/[\u0300-\u036f]/g, '').toLowerCase().replace(/[^a-z0-9]+/g, '-').replace(/^-|-$/g, '');

export interface DeviceInput {
  /** Id of the organisation that owns it. */
  organisation: string;
  name: string;
  modality: (typeof modalities)[number];
}

/** Registers a device. Its address is made of the organisation's and its own name; its row never changes. */
export const createDevice = (work: Work, input: DeviceInput): Promise<Device> =>
  inTransaction(work, async (tx) => {
    const organisation = await tx.em.findOneOrFail(Organisation, { id: input.organisation });
    const slug = slugOf(input.name);
    if (slug === '') throw new AppError('invalid-request', `/name: the name needs a letter from a to z or a digit. Given: ${JSON.stringify(input.name)}.`, [{ pointer: '/name', message: 'The name needs a letter from a to z or a digit.' }]);
    const id = `${organisation.slug}-${slug}`;
    const actor = await actorOf(tx);
    const device = tx.em.create(Device, { id, organisation, name: input.name, modality: input.modality, createdBy: actor?.userId ?? null, createdAt: tx.clock.now() });
    recordAudit(tx.em, { at: tx.clock.now(), action: 'device.create', subjectType: 'device', subjectId: id, ...(tx.caller ? { caller: tx.caller } : {}), organisationId: organisation.id, requestId: tx.requestId ?? null, detail: { name: input.name, modality: input.modality } });
    await tx.em.flush();
    return device;
  }).catch((error: unknown) => {
    if (error instanceof UniqueConstraintViolationException) throw new AppError('already-exists', `Your organisation has a device of that name already, or one whose address would be the same. Given: ${JSON.stringify(input.name)}.`);
    throw error;
  });
