import { inventedOrganisations, inventedPeople, type InventedPerson } from '#api/fakes/people.ts';
import type { Dataset } from '#shared/formats/types.ts';
import { createGenerator } from '#api/demo/simulator/generator.ts';
import type { Story } from './story.ts';

/** Slug of the organisation of that name. */
export const slugOfProvider = (provider: string): string => {
  const found = inventedOrganisations.find(({ name }) => name === provider);
  if (!found) throw new Error(`Nobody invented an organisation ${provider}.`);
  return found.slug;
};

/** Who acts for a provider or laboratory. */
export const contributorFor = (provider: string): InventedPerson => {
  const slug = slugOfProvider(provider);
  const found = inventedPeople.find(({ organisation, membership }) => organisation === slug && membership === 'contributor');
  if (!found) throw new Error(`Nobody invented contributes for ${provider}.`);
  return found;
};

/** Colleagues who signed the datasets too, but have no account. */
const colleagues: Readonly<Record<string, string>> = {
  'Larkspur Quantics': 'Hugo Linnet', 'Fellside Ion Works': 'Greta Scarside', 'Osierbank Devices': 'Bela Withers', 'Pellmere Instruments': 'Sana Crook',
  'Saltmarsh Atoms': 'Owen Samphire', 'Withy Lane Laboratory': 'Priya Fallow',
};

/** Names in a dataset of a provider. */
export const contributorsOf = (provider: string): Dataset['contributors'] => {
  const colleague = colleagues[provider];
  return [{ name: contributorFor(provider).name }, ...(colleague === undefined ? [] : [{ name: colleague }])];
};

/** A curator without an interest in the provider: one of the registry's own office. */
export const curatorFor = (story: Story): InventedPerson => {
  const office = inventedPeople.filter(({ roles, organisation }) => roles.includes('curator') && organisation === 'evenbeam-office');
  const chosen = office[Math.floor(createGenerator(`curator:${story.key}`).next() * office.length)];
  if (!chosen) throw new Error('Nobody invented is a curator of the office.');
  return chosen;
};

/** How the device was reached, and what ties the contributors have, as the record beside the file says it. */
export const recordOf = (provider: string): { access: string; interests: string } =>
  provider === 'Withy Lane Laboratory'
    ? { access: 'Our own simulated device, on our own computers.', interests: 'None. We sell no device and are paid by no provider.' }
    : { access: 'Our own device, in our own laboratory.', interests: `The contributors are employed by ${provider}, which sells time on this device.` };
