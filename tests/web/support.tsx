import { QueryClientProvider } from '@tanstack/react-query';
import { configure, render } from '@testing-library/react';
import { vi } from 'vitest';
import { createMemoryRouter, RouterProvider } from 'react-router-dom';
import { createQueryClient } from '#web/app/query-client.ts';
import { routesOf } from '#web/app/routes.tsx';
import { publicAnswers } from '#tests/support/fixture-server.ts';

// Waits end as soon as the words are there; the bound is for machines that are busy with other things.
configure({ asyncUtilTimeout: 15_000 });

export const answer = (body: unknown, status = 200): Response => new Response(JSON.stringify(body), { status, headers: { 'content-type': 'application/json' } });
export const notFound = (path: string): Response => answer({ type: '/problems/not-found', title: 'There is nothing here', status: 404, detail: `No thing has the address ${path}.`, code: 'not-found' }, 404);

/** Opens an address of the whole client; `answers` stands in for the registry. */
export function openPage(at: string, answers: (path: string, search: URLSearchParams) => Response | Promise<Response> | null = () => null) {
  vi.stubGlobal('fetch', (address: string) => {
    const url = new URL(address, 'http://localhost');
    const own = answers(url.pathname, url.searchParams);
    if (own) return Promise.resolve(own);
    const body = publicAnswers(url.pathname, url.searchParams);
    return Promise.resolve(body === null ? notFound(url.pathname) : answer(body));
  });
  const queryClient = createQueryClient();
  const router = createMemoryRouter(routesOf(queryClient), { initialEntries: [at] });
  return { router, ...render(<QueryClientProvider client={queryClient}><RouterProvider router={router} /></QueryClientProvider>) };
}
