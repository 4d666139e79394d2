import type { QueryClient } from '@tanstack/react-query';
import type { RouteObject } from 'react-router-dom';
import { lazyPage } from '../../lib/lazy-page.ts';

/** Where a mark is read, below the frame. */
export function readingRoutes(queryClient: QueryClient): RouteObject[] {
  return [{ path: '/marks/:id/read', lazy: lazyPage(() => import('./read-mark-page.tsx'), queryClient) }];
}
