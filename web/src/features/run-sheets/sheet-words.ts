import type { RunSheetView } from '#shared/contracts/run-sheets.ts';
import { formatLevel } from '#shared/domain/format.ts';

const percent = (share: number): string => formatLevel(Math.round(share * 100) / 100);

/** A sheet's state in the words of the desk. */
export const sheetState = ({ state, progress, submission }: Pick<RunSheetView, 'state' | 'progress' | 'submission'>): string => {
  switch (state) {
    case 'waiting': return 'Waiting to be drawn';
    case 'drawing': return `Drawing, ${percent(progress)}`;
    case 'failed': return 'Not drawn';
    case 'drawn': return submission ? 'Used' : 'Drawn';
  }
};

/**
 * Circuits of the whole sheet, and those to estimate from. Of a chained register `circuits` counts those of each pair only,
 * so the whole is read from the shots, which are the same for every circuit.
 */
export const circuitsOf = ({ circuits, sealed, shots, totalShots }: Pick<RunSheetView, 'circuits' | 'sealed' | 'shots' | 'totalShots'>): { all: number; open: number } | null => {
  if (circuits === null || sealed === null) return null;
  const all = totalShots === null ? circuits + sealed : totalShots / shots;
  return { all, open: all - sealed };
};
