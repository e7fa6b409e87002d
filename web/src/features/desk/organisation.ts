import type { Me } from '#shared/contracts/session.ts';

export type Organisation = Me['organisations'][number];

/** What every page of the desk is about: one organisation, of those the person contributes for. */
export interface DeskContext {
  organisation: Organisation;
}

export const contributing = (person: Me): Organisation[] => person.organisations.filter((o) => o.role === 'contributor');

const storageName = 'evenbeam.organisation';

/** The organisation last chosen on this machine, if it is still one of the person's; else the first. */
export const rememberedOrganisation = (own: readonly Organisation[], storage: Pick<Storage, 'getItem'>): Organisation | null => {
  const kept = storage.getItem(storageName);
  return own.find((o) => o.id === kept) ?? own[0] ?? null;
};

export const rememberOrganisation = (id: string, storage: Pick<Storage, 'setItem'>): void => storage.setItem(storageName, id);
