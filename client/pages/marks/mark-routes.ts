import type { QueryClient } from '@tanstack/react-query';
import type { RouteObject } from 'react-router-dom';
import { lazyPage } from '../../lib/lazy-page.ts';
import type { PageModule } from '../../lib/lazy-page.ts';

/** The record of marks: the page at each address, below the frame. Reading one has routes of its own. */
const PAGES: Readonly<Record<string, () => Promise<PageModule>>> = {
  '/marks': () => import('./marks-page.tsx'),
  '/marks/to-read': () => import('./marks-to-read-page.tsx'),
  '/marks/:id': () => import('./mark-page.tsx'),
};

export function markRoutes(queryClient: QueryClient): RouteObject[] {
  return Object.entries(PAGES).map(([path, load]) => ({ path, lazy: lazyPage(load, queryClient) }));
}
