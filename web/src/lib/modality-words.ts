import type { DeviceRef } from '#shared/contracts/common.ts';

export const modalityWords: Readonly<Record<DeviceRef['modality'], string>> = {
  superconducting: 'superconducting', 'trapped-ion': 'trapped ion', 'neutral-atom': 'neutral atom', photonic: 'photonic', spin: 'spin', simulated: 'simulated', other: 'other',
};
const known = (modality: string): modality is DeviceRef['modality'] => Object.hasOwn(modalityWords, modality);

/** Words for a modality that comes as plain text, e.g. from a filter. */
export const wordsOfModality = (modality: string): string => (known(modality) ? modalityWords[modality] : modality);
