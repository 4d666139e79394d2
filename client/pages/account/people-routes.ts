import type { QueryClient } from '@tanstack/react-query';
import type { RouteObject } from 'react-router-dom';
import { lazyPage } from '../../lib/lazy-page.ts';
import type { PageModule } from '../../lib/lazy-page.ts';

/** The addresses of people: those of one's own account, of notices, and the registrars'. */
const PAGES: Readonly<Record<string, () => Promise<PageModule>>> = {
  '/sign-up': () => import('./sign-up-page.tsx'),
  '/sign-in': () => import('./sign-in-page.tsx'),
  '/confirm': () => import('./confirm-page.tsx'),
  '/password/forgotten': () => import('./password-forgotten-page.tsx'),
  '/password/new': () => import('./new-password-page.tsx'),
  '/account': () => import('./account-page.tsx'),
  '/account/closed': () => import('./account-closed-page.tsx'),
  '/unsubscribe/:token': () => import('./unsubscribe-page.tsx'),
  '/notices': () => import('../notices/notices-page.tsx'),
  '/registrar': () => import('../registrar/registrar-page.tsx'),
  '/registrar/members': () => import('../registrar/members-page.tsx'),
  '/registrar/members/:id': () => import('../registrar/member-page.tsx'),
  '/registrar/audit': () => import('../registrar/audit-page.tsx'),
  '/post': () => import('../post/post-page.tsx'),
  '/post/:id': () => import('../post/letter-page.tsx'),
};

export function peopleRoutes(queryClient: QueryClient): RouteObject[] {
  return Object.entries(PAGES).map(([path, load]) => ({ path, lazy: lazyPage(load, queryClient) }));
}
