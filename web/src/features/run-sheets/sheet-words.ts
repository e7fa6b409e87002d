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
