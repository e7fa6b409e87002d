import type { QueryClient } from '@tanstack/react-query';
import { createBrowserRouter } from 'react-router-dom';
import { routesOf } from './routes.tsx';

export const createRouter = (queryClient: QueryClient) => createBrowserRouter(routesOf(queryClient));
