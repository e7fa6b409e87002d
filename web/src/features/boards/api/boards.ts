import { queryOptions } from '@tanstack/react-query';
import { board, boardDifference, boardList, type Board, type BoardDifference, type BoardFigure } from '#shared/contracts/boards.ts';
import { apiGet } from '#web/lib/api-client.ts';

export const boardListQuery = () =>
  queryOptions({ queryKey: ['boards'], queryFn: ({ signal }) => apiGet('/api/v1/boards', boardList, { signal, query: { limit: 200 } }) });

/** How a board is read: kept in the address of the page. */
export interface BoardView {
  figure: BoardFigure;
  modality: string | undefined;
  provider: string | undefined;
  within: number | undefined;
  /** Method version; absent: the official one. */
  method?: string | undefined;
}

const apiPath = (gateClass: string): string => `/api/v1/boards/${gateClass.split('/').map(encodeURIComponent).join('/')}`;

/** The address of the same board as JSON, for whoever wants the numbers. */
export const boardJsonAddress = (gateClass: string, view: BoardView): string => {
  const search = new URLSearchParams({ figure: view.figure });
  if (view.modality) search.set('modality', view.modality);
  if (view.provider) search.set('provider', view.provider);
  if (view.within) search.set('within', String(view.within));
  if (view.method) search.set('method', view.method);
  return `${apiPath(gateClass)}?${search}`;
};

export const boardQuery = (gateClass: string, view: BoardView) =>
  queryOptions({
    queryKey: ['board', gateClass, view],
    queryFn: ({ signal }): Promise<Board> => apiGet(apiPath(gateClass), board, { signal, query: { ...view } }),
  });

export const differenceQuery = (gateClass: string, figure: BoardFigure, a: string, b: string) =>
  queryOptions({
    queryKey: ['board', gateClass, 'difference', figure, a, b],
    queryFn: ({ signal }): Promise<BoardDifference> => apiGet(`${apiPath(gateClass)}/difference`, boardDifference, { signal, query: { figure, a, b } }),
  });
