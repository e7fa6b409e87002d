import { boardFigure, type BoardFigure } from '#shared/contracts/boards.ts';
import { boardReadings } from '#shared/domain/board-figures.ts';
import type { BoardView } from './api/boards.ts';

/** "Retained signal at depth 16" */
export const boardFigureWords: Readonly<Record<BoardFigure, string>> = {
  'retained-signal-16': 'Retained signal at depth 16',
  'retained-signal-4': 'Retained signal at depth 4',
  'retained-signal-64': 'Retained signal at depth 64',
  'error-per-gate': 'Error per gate',
  'output-error-16': 'Output error at depth 16',
  'readout-loss': 'Readout loss',
};

/** "(higher is better; 1 is an ideal device)" */
export const readingWords = (figure: BoardFigure): string => (boardReadings[figure].better === 'higher' ? '(higher is better; 1 is an ideal device)' : '(lower is better; 0 is an ideal device)');

/** Spans offered for the last circuit run, in days. */
export const withinChoices = [30, 90, 180, 365] as const;

const methodName = /^M[1-9][0-9]{0,3}$/;

/** Reads the view out of an address; anything unknown falls back to what the board opens with. */
export const viewOf = (search: URLSearchParams): BoardView => {
  const figure = boardFigure.safeParse(search.get('figure'));
  const days = Number(search.get('within'));
  const method = search.get('method') ?? '';
  return {
    figure: figure.success ? figure.data : 'retained-signal-16',
    modality: search.get('modality') ?? undefined,
    provider: search.get('provider') ?? undefined,
    within: Number.isInteger(days) && days >= 1 && days <= 36_500 ? days : undefined,
    method: methodName.test(method) ? method : undefined,
  };
};

export const isFiltered = (view: BoardView): boolean => view.modality !== undefined || view.provider !== undefined || view.within !== undefined;

/** The address with one field changed; empty removes it. */
export const withField = (search: URLSearchParams, field: string, value: string): URLSearchParams => {
  const next = new URLSearchParams(search);
  if (value) next.set(field, value);
  else next.delete(field);
  return next;
};
