import type { QueryClient } from '@tanstack/react-query';
import type { RouteObject } from 'react-router-dom';
import { lazyPage } from '../../lib/lazy-page.ts';
import type { PageModule } from '../../lib/lazy-page.ts';

/** The bench and its parts: the page at each address, below the frame. */
const PAGES: Readonly<Record<string, () => Promise<PageModule>>> = {
  '/bench': () => import('./bench-page.tsx'),
  '/bench/new': () => import('./new-part-page.tsx'),
  '/parts/:id': () => import('./part-page.tsx'),
  '/parts/:id/change': () => import('./change-part-page.tsx'),
  '/parts/:id/marks/new': () => import('./new-mark-page.tsx'),
};

export function benchRoutes(queryClient: QueryClient): RouteObject[] {
  return Object.entries(PAGES).map(([path, load]) => ({ path, lazy: lazyPage(load, queryClient) }));
}
