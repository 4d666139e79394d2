import type { QueryClient } from '@tanstack/react-query';
import type { RouteObject } from 'react-router-dom';
import { lazyPage } from '../../lib/lazy-page.ts';
import type { PageModule } from '../../lib/lazy-page.ts';

/** Putting forward, and what became of it: the page at each address, below the frame. */
const PAGES: Readonly<Record<string, () => Promise<PageModule>>> = {
  '/contribute': () => import('./contribute-page.tsx'),
  '/contribute/:kind': () => import('./contribute-kind-page.tsx'),
  '/facts/:id/change': () => import('./change-fact-page.tsx'),
  '/contributions': () => import('./my-contributions-page.tsx'),
  '/contributions/:id': () => import('./contribution-page.tsx'),
  '/contributions/:id/draft': () => import('./draft-page.tsx'),
  '/contributors/:id': () => import('./contributor-page.tsx'),
};

export function contributionRoutes(queryClient: QueryClient): RouteObject[] {
  return Object.entries(PAGES).map(([path, load]) => ({ path, lazy: lazyPage(load, queryClient) }));
}
