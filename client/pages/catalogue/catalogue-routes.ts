import type { QueryClient } from '@tanstack/react-query';
import type { RouteObject } from 'react-router-dom';
import { lazyPage } from '../../lib/lazy-page.ts';
import type { PageModule } from '../../lib/lazy-page.ts';

/** The catalogue's addresses and the page at each, below the frame. */
const PAGES: Readonly<Record<string, () => Promise<PageModule>>> = {
  '/catalogue': () => import('./catalogue-page.tsx'),
  '/makers': () => import('./makers-page.tsx'),
  '/makers/:slug': () => import('./maker-page.tsx'),
  '/makers/:slug/history': () => import('./maker-history-page.tsx'),
  '/models': () => import('./models-page.tsx'),
  '/models/:slug': () => import('./model-page.tsx'),
  '/models/:slug/history': () => import('./model-history-page.tsx'),
  '/part-types': () => import('./part-types-page.tsx'),
  '/part-types/:slug': () => import('./part-type-page.tsx'),
  '/part-types/:slug/history': () => import('./part-type-history-page.tsx'),
  '/castings': () => import('./castings-page.tsx'),
  '/castings/:slug': () => import('./casting-page.tsx'),
  '/castings/:slug/history': () => import('./casting-history-page.tsx'),
  '/ciphers': () => import('./ciphers-page.tsx'),
  '/ciphers/:slug': () => import('./cipher-page.tsx'),
  '/ciphers/:slug/history': () => import('./cipher-history-page.tsx'),
  '/serial-ranges': () => import('./serial-ranges-page.tsx'),
  '/serial-ranges/:slug': () => import('./serial-range-page.tsx'),
  '/serial-ranges/:slug/history': () => import('./serial-range-history-page.tsx'),
  '/sources': () => import('./sources-page.tsx'),
  '/sources/:slug': () => import('./source-page.tsx'),
  '/sources/:slug/history': () => import('./source-history-page.tsx'),
  '/developers': () => import('../developers/developers-page.tsx'),
};

export function catalogueRoutes(queryClient: QueryClient): RouteObject[] {
  return Object.entries(PAGES).map(([path, load]) => ({ path, lazy: lazyPage(load, queryClient) }));
}
