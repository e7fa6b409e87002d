import { QueryClientProvider } from '@tanstack/react-query';
import { configure, render } from '@testing-library/react';
import type { ReactNode } from 'react';
import { createMemoryRouter, RouterProvider } from 'react-router-dom';
import { vi } from 'vitest';
import { createQueryClient } from '#web/app/query-client.ts';
import { forgetCsrfToken } from '#web/lib/api-client.ts';

// Waits end as soon as the words are there; the bound is for machines that are busy with other things.
configure({ asyncUtilTimeout: 15_000 });

export interface Asked {
  method: string;
  path: string;
  search: string;
  headers: Headers;
  body: unknown;
}
type Answer = unknown | ((asked: Asked) => unknown);

/** An answer that is not 200. */
export class Refusal {
  constructor(readonly status: number, readonly code: string, readonly detail: string, readonly errors?: { pointer: string; message: string }[]) {}
}

/** Answers the api client from a table of "METHOD path" → body; gives the list of what was asked. */
export function answerWith(table: Record<string, Answer>): Asked[] {
  const asked: Asked[] = [];
  forgetCsrfToken();
  vi.stubGlobal('fetch', (address: string, init: RequestInit = {}) => {
    const url = new URL(address, 'http://localhost');
    const call: Asked = { method: init.method ?? 'GET', path: url.pathname, search: url.search, headers: new Headers(init.headers), body: typeof init.body === 'string' ? JSON.parse(init.body) : null };
    asked.push(call);
    const entry = table[`${call.method} ${call.path}`];
    const body = typeof entry === 'function' ? (entry as (asked: Asked) => unknown)(call) : entry;
    if (body instanceof Promise) return body;
    const refused = body instanceof Refusal ? body : body === undefined ? new Refusal(404, 'not-found', `There is nothing at ${call.method} ${call.path}.`) : null;
    const answer = refused ? { type: `/problems/${refused.code}`, title: 'Refused', status: refused.status, detail: refused.detail, code: refused.code, errors: refused.errors } : body;
    return Promise.resolve(new Response(refused === null && body === null ? null : JSON.stringify(answer), { status: refused?.status ?? (body === null ? 204 : 200), headers: { 'content-type': 'application/json' } }));
  });
  return asked;
}

/** Draws a part of a page at an address, with a client of its own; other addresses show their own path. */
export function drawAt(element: ReactNode, path = '/here', pattern = path) {
  const client = createQueryClient();
  client.setDefaultOptions({ queries: { ...client.getDefaultOptions().queries, retry: false } });
  const router = createMemoryRouter([{ path: pattern, element }, { path: '*', Component: () => <p>elsewhere</p> }], { initialEntries: [path] });
  const view = render(<QueryClientProvider client={client}><RouterProvider router={router} /></QueryClientProvider>);
  return { ...view, router, client };
}
