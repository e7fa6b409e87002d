import type { DataciteRecord } from '#shared/citation/datacite.ts';
import type { DoiConfig } from '#api/config/config.ts';

/** "publish": registered and found by search; "register": resolves, not found; "hide": taken out of search. */
export type AgencyEvent = 'publish' | 'register' | 'hide';
const jsonApi = 'application/vnd.api+json';
const timeoutMs = 20_000;

interface AgencyFault {
  errors?: { source?: string; title?: string }[];
}

const ask = async (agency: DoiConfig, method: 'POST' | 'PUT', path: string, attributes: object, signal: AbortSignal): Promise<Response> => {
  const authorization = `Basic ${Buffer.from(`${agency.user}:${agency.password}`).toString('base64')}`;
  return fetch(`${agency.url}${path}`, {
    method,
    headers: { 'content-type': jsonApi, accept: jsonApi, authorization },
    body: JSON.stringify({ data: { type: 'dois', attributes } }),
    redirect: 'error',
    signal: AbortSignal.any([signal, AbortSignal.timeout(timeoutMs)]),
  });
};

const isTaken = (text: string): boolean => {
  try {
    return ((JSON.parse(text) as AgencyFault).errors ?? []).some(({ title }) => /already been taken/i.test(title ?? ''));
  } catch {
    return false;
  }
};

const complaint = (response: Response, text: string): Error => new Error(`The agency answered ${response.status}: ${text.slice(0, 400)}`);

/**
 * Registers a DOI with its metadata, or replaces the metadata where it is registered. Either way the outcome is the same
 * however often it is repeated: a DOI that is taken already is ours (its suffix is our accession), and is brought up to date.
 */
export const tellAgency = async (agency: DoiConfig, record: DataciteRecord & { doi: string }, event: AgencyEvent, known: boolean, signal: AbortSignal): Promise<void> => {
  const attributes = { ...record, event };
  const update = (): Promise<Response> => ask(agency, 'PUT', `/dois/${record.doi}`, attributes, signal);
  const create = (): Promise<Response> => ask(agency, 'POST', '/dois', { ...attributes, event: event === 'hide' ? 'register' : event }, signal);
  const first = await (known ? update() : create());
  if (first.ok) return;
  const text = await first.text();
  const again = known ? first.status === 404 : first.status === 422 && isTaken(text);
  if (!again) throw complaint(first, text);
  const second = await (known ? create() : update());
  if (!second.ok) throw complaint(second, await second.text());
};
