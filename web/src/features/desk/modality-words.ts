import type { Modality } from '#shared/formats/types.ts';

/** Kinds of device, in the order of the form. */
export const modalityWords: Readonly<Record<Modality, string>> = {
  superconducting: 'Superconducting', 'trapped-ion': 'Trapped ions', 'neutral-atom': 'Neutral atoms', photonic: 'Photonic', spin: 'Spin', simulated: 'Simulated', other: 'Other',
};

export const modalityOptions = (Object.entries(modalityWords) as [Modality, string][]).map(([value, label]) => ({ value, label }));
