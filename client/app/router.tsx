import type { QueryClient } from '@tanstack/react-query';
import { createBrowserRouter, Navigate } from 'react-router-dom';
import type { RouteObject } from 'react-router-dom';
import { lazyPage } from '../lib/lazy-page.ts';
import { paths } from '../lib/paths.ts';
import { peopleRoutes } from '../pages/account/people-routes.ts';
import { benchRoutes } from '../pages/bench/bench-routes.ts';
import { catalogueRoutes } from '../pages/catalogue/catalogue-routes.ts';
import { contributionRoutes } from '../pages/contributions/contribution-routes.ts';
import { markRoutes } from '../pages/marks/mark-routes.ts';
import { moderationRoutes } from '../pages/moderation/moderation-routes.ts';
import { readingRoutes } from '../pages/reading/reading-routes.ts';
import { ErrorPage, FramedErrorPage, NotFoundPage } from './error-page.tsx';
import { FirstLoad } from './first-load.tsx';
import { Layout } from './layout.tsx';

/** The site's addresses. A page's own failure is shown inside the frame; only the frame's failure replaces it. */
function routes(queryClient: QueryClient): RouteObject[] {
  return [
    {
      Component: Layout,
      ErrorBoundary: FramedErrorPage,
      HydrateFallback: FirstLoad,
      children: [
        {
          ErrorBoundary: ErrorPage,
          children: [
            { path: '/', element: <Navigate to={paths.decode()} replace /> },
            { path: '/decode', lazy: lazyPage(() => import('../pages/decode/decode-page.tsx'), queryClient) },
            ...catalogueRoutes(queryClient),
            ...benchRoutes(queryClient),
            ...markRoutes(queryClient),
            ...readingRoutes(queryClient),
            ...contributionRoutes(queryClient),
            ...moderationRoutes(queryClient),
            ...peopleRoutes(queryClient),
            { path: '/problems/:kind', lazy: lazyPage(() => import('./problem-page.tsx'), queryClient) },
            { path: '*', Component: NotFoundPage },
          ],
        },
      ],
    },
  ];
}

export function createRouter(queryClient: QueryClient) {
  return createBrowserRouter(routes(queryClient));
}
