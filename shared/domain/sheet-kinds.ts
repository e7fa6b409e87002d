/** How the circuits of a run sheet are drawn: gate by gate, or as preparation sequence, repeated block and readout sequence. */
export const sheetKinds = ['random', 'structured'] as const;
export type SheetKind = (typeof sheetKinds)[number];
