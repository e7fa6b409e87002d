import type { QueryClient } from '@tanstack/react-query';
import type { ComponentType } from 'react';
import type { LazyRouteFunction, LoaderFunction, RouteObject } from 'react-router-dom';

/** What a file under routes/ exports: the page, and a loader that starts its reads (without waiting for them). */
export interface RouteModule {
  Component: ComponentType;
  loader?: (queryClient: QueryClient) => LoaderFunction;
}

/** A route whose code is fetched when it is first wanted. */
export const lazyRoute = (queryClient: QueryClient, load: () => Promise<RouteModule>): LazyRouteFunction<RouteObject> => async () => {
  const { Component, loader } = await load();
  return loader ? { Component, loader: loader(queryClient) } : { Component };
};
