import type { APIRequestContext, Browser, BrowserContextOptions } from 'playwright-core';
import { inventedPeople } from '#api/fakes/people.ts';
import type { SubmissionState } from '#shared/domain/life-cycle.ts';
import { signInQuietly } from './quick-sign-in.ts';
import type { Places } from './visitor.ts';

type StorageState = BrowserContextOptions['storageState'];

/** What a running registry holds, as far as its pages are to be visited. */
export interface Found {
  /** Cookies of each person who was signed in, by name. */
  sessions: Map<string, StorageState>;
  /** The newest entry and a superseded version. */
  entry: string;
  superseded: string;
  device: string;
  /** One submission for each state, with a person who may read it. */
  submissions: Map<SubmissionState, { id: string; person: string }>;
  sheet: { id: string; person: string };
  /** Cases in review that the curator may decide on. */
  cases: string[];
}

interface Listed {
  items: { id: string; state: SubmissionState }[];
}

export const contributors = inventedPeople.filter(({ membership }) => membership === 'contributor').map(({ name }) => name);
export const curator = 'Ruth Holloway';
export const onlooker = 'Kit Wren';
export const steward = 'Agnes Thorne';

const read = async <T>(request: APIRequestContext, path: string): Promise<T> => {
  const answer = await request.get(path);
  if (!answer.ok()) throw new Error(`${path} answered ${answer.status()}: ${(await answer.text()).slice(0, 300)}`);
  return (await answer.json()) as T;
};

const ownThings = async (request: APIRequestContext): Promise<{ submissions: Listed['items']; sheets: { id: string }[] }> => {
  const { organisations } = await read<{ organisations: { id: string; role: string }[] }>(request, '/api/v1/me');
  const home = organisations.find(({ role }) => role === 'contributor');
  if (!home) return { submissions: [], sheets: [] };
  const query = `?organisation=${home.id}&limit=200`;
  return { submissions: (await read<Listed>(request, `/api/v1/submissions${query}`)).items, sheets: (await read<{ items: { id: string }[] }>(request, `/api/v1/run-sheets${query}`)).items };
};

/** Signs everyone in and looks for something of every kind. */
export const findAll = async (browser: Browser, places: Places): Promise<Found> => {
  const found: Found = { sessions: new Map(), entry: '', superseded: '', device: '', submissions: new Map(), sheet: { id: '', person: '' }, cases: [] };
  for (const person of [...contributors, curator, onlooker, steward]) {
    const context = await browser.newContext({ baseURL: places.url });
    await signInQuietly(context, person);
    found.sessions.set(person, await context.storageState());
    const own = await ownThings(context.request);
    for (const { id, state } of own.submissions) if (!found.submissions.has(state)) found.submissions.set(state, { id, person });
    if (own.sheets[0] && found.sheet.id === '') found.sheet = { id: own.sheets[0].id, person };
    if (person === curator) found.cases = (await read<Listed>(context.request, '/api/v1/reviews?limit=50')).items.map(({ id }) => id);
    await context.close();
  }
  const context = await browser.newContext({ baseURL: places.url });
  const { items } = await read<{ items: { accession: string; version: number; device: { id: string } }[] }>(context.request, '/api/v1/entries?limit=200');
  const newest = items[0];
  if (!newest) throw new Error(`${places.url} has no entry yet.`);
  found.entry = newest.accession;
  found.superseded = items.find(({ version }) => version > 1)?.accession ?? newest.accession;
  found.device = newest.device.id;
  await context.close();
  return found;
};
