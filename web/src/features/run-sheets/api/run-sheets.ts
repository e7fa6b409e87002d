import { queryOptions } from '@tanstack/react-query';
import { runSheetList, runSheetView, type RunSheetCreate, type RunSheetView } from '#shared/contracts/run-sheets.ts';
import { apiGet, apiSend } from '#web/lib/api-client.ts';

const address = '/api/v1/run-sheets';

/** How often a sheet is asked for while the registry draws it. */
const drawingPollMs = 700;

export const isDrawing = (sheet: Pick<RunSheetView, 'state'>): boolean => sheet.state === 'waiting' || sheet.state === 'drawing';

/** The run sheets of one organisation, newest first. */
export const runSheetsQuery = (organisation: string) =>
  queryOptions({
    queryKey: ['run-sheets', organisation],
    queryFn: ({ signal }) => apiGet(address, runSheetList, { query: { organisation }, signal }),
    refetchInterval: ({ state }) => (state.data?.items.some(isDrawing) ? 4 * drawingPollMs : false),
  });

/** One run sheet; asked for again and again while it is being drawn. */
export const runSheetQuery = (id: string) =>
  queryOptions({
    queryKey: ['run-sheet', id],
    queryFn: ({ signal }) => apiGet(`${address}/${id}`, runSheetView, { signal }),
    refetchInterval: ({ state }) => (state.data && isDrawing(state.data) ? drawingPollMs : false),
  });

/** Asks the registry to draw. `key` belongs to one press of the button and is kept over its retries. */
export const drawRunSheet = ({ plan, key }: { plan: RunSheetCreate; key: string }): Promise<RunSheetView> =>
  apiSend('POST', address, runSheetView, { json: plan, idempotencyKey: key });
