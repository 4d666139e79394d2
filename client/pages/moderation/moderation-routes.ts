import type { QueryClient } from '@tanstack/react-query';
import type { RouteObject } from 'react-router-dom';
import { lazyPage } from '../../lib/lazy-page.ts';
import type { PageModule } from '../../lib/lazy-page.ts';

/** What moderators see, and each fact’s history: the page at each address, below the frame. */
const PAGES: Readonly<Record<string, () => Promise<PageModule>>> = {
  '/moderation': () => import('./queue-page.tsx'),
  '/moderation/reworks': () => import('./reworks-page.tsx'),
  '/facts/:id/history': () => import('./fact-history-page.tsx'),
};

export function moderationRoutes(queryClient: QueryClient): RouteObject[] {
  return Object.entries(PAGES).map(([path, load]) => ({ path, lazy: lazyPage(load, queryClient) }));
}
