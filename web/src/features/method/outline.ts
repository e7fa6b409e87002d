/** Sections of the method page in their order. The ids are addresses: figures elsewhere link to them, so they never change. */
export const outline = [
  { id: 'purpose', title: 'Purpose' },
  { id: 'representation', title: 'Representation' },
  { id: 'parameters', title: 'Parameters' },
  { id: 'design', title: 'Design matrix' },
  { id: 'inverse', title: 'Inverse, rank, soundness' },
  { id: 'passes', title: 'Estimate in eight passes' },
  { id: 'determined', title: 'What is determined' },
  { id: 'figures', title: 'Figures' },
  { id: 'intervals', title: 'Intervals' },
  { id: 'random-numbers', title: 'Random numbers' },
  { id: 'run-sheets', title: 'Run sheets and sealed circuits' },
  { id: 'chained', title: 'Chained registers' },
  { id: 'ranks', title: 'Ranks and eligibility' },
  { id: 'domain', title: 'Domain' },
  { id: 'coverage', title: 'Coverage study' },
  { id: 'rank-study', title: 'Rank study' },
  { id: 'limits', title: 'Limits and cautions' },
  { id: 'second-opinions', title: 'Second opinions' },
  { id: 'versions', title: 'Versions' },
  { id: 'conformance', title: 'Conformance vectors' },
  { id: 'literature', title: 'Literature' },
] as const;

export type SectionId = (typeof outline)[number]['id'];

/** Number of a section, counted from 1. */
export const sectionNumber = (id: SectionId): number => outline.findIndex((section) => section.id === id) + 1;
