import type { QueryClient } from '@tanstack/react-query';
import type { RouteObject } from 'react-router-dom';
import { AppShell } from './layout/app-shell.tsx';
import { RouteFault } from './route-fault.tsx';
import { lazyRoute, type RouteModule } from './lazy-route.ts';
import { deskRoutes } from './desk-routes.tsx';

/** Every page of the site. Pages behind sign-in are listed in desk-routes.tsx. */
export const routesOf = (queryClient: QueryClient): RouteObject[] => {
  const page = (load: () => Promise<RouteModule>) => lazyRoute(queryClient, load);
  return [
    {
      path: '/',
      element: <AppShell />,
      errorElement: <AppShell><RouteFault /></AppShell>,
      hydrateFallbackElement: <></>,
      children: [
        {
          errorElement: <RouteFault />,
          children: [
            { index: true, lazy: page(() => import('./routes/home.tsx')) },
            { path: 'find', lazy: page(() => import('./routes/find.tsx')) },
            { path: 'boards', lazy: page(() => import('./routes/boards.tsx')) },
            { path: 'boards/:gateClass/:version', lazy: page(() => import('./routes/board.tsx')) },
            { path: 'entries/:accession', lazy: page(() => import('./routes/entry.tsx')) },
            { path: 'entries/:accession/v/:n', lazy: page(() => import('./routes/entry.tsx')) },
            { path: 'devices', lazy: page(() => import('./routes/devices.tsx')) },
            { path: 'devices/:id', lazy: page(() => import('./routes/device.tsx')) },
            { path: 'method', lazy: page(() => import('./routes/method.tsx')) },
            { path: 'log', lazy: page(() => import('./routes/log.tsx')) },
            { path: 'schema', lazy: page(() => import('./routes/schema.tsx')) },
            { path: 'problems/:code', lazy: page(() => import('./routes/problem.tsx')) },
            ...deskRoutes(page),
            { path: '*', lazy: page(() => import('./routes/not-found.tsx')) },
          ],
        },
      ],
    },
  ];
};
