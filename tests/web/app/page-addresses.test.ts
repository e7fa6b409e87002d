import type { RouteObject } from 'react-router-dom';
import { describe, expect, it } from 'vitest';
import { isPageAddress, pagePatterns } from '#shared/domain/page-addresses.ts';
import { createQueryClient } from '#web/app/query-client.ts';
import { routesOf } from '#web/app/routes.tsx';

/** Addresses of all routes that show a page: those without children. */
const addressesOf = (routes: readonly RouteObject[], above = ''): string[] =>
  routes.flatMap((route) => {
    const here = route.path === undefined ? above : `${above}/${route.path}`.replace(/\/+/g, '/');
    return route.children ? addressesOf(route.children, here) : [here === '' ? '/' : here];
  });

describe('the list of page addresses', () => {
  it('is the list of the client’s routes: the server answers 404 to all others', () => {
    const routes = addressesOf(routesOf(createQueryClient())).filter((path) => path !== '/*');
    expect([...routes].sort()).toEqual([...pagePatterns].sort());
    expect(isPageAddress('/*')).toBe(false);
  });
});
