import type { QueryClient } from '@tanstack/react-query';
import type { ComponentType } from 'react';
import type { LazyRouteFunction, LoaderFunction, RouteObject } from 'react-router-dom';

/** What a page's module exports. The loader fills the cache; the component reads it with `useSuspenseQuery`. */
export type PageModule = {
  readonly loader?: (queryClient: QueryClient) => LoaderFunction;
  readonly Component: ComponentType;
  readonly ErrorBoundary?: ComponentType;
};

/** Makes a route's `lazy` from the import of its page. */
export function lazyPage(load: () => Promise<PageModule>, queryClient: QueryClient): LazyRouteFunction<RouteObject> {
  return async () => {
    const { loader, Component, ErrorBoundary } = await reloadingOnce(load);
    return {
      Component,
      ...(loader === undefined ? {} : { loader: loader(queryClient) }),
      ...(ErrorBoundary === undefined ? {} : { ErrorBoundary }),
    };
  };
}

const RELOADED = 'pourbook:reloaded-for-new-version';

/**
 * A page's file is gone after a new version went out: the old index still names it. Loading the site again mends that,
 * once; if the file is missing even then, the error page says so.
 */
async function reloadingOnce(load: () => Promise<PageModule>): Promise<PageModule> {
  try {
    const page = await load();
    sessionStorage.removeItem(RELOADED);
    return page;
  } catch (error) {
    if (sessionStorage.getItem(RELOADED) !== null || !navigator.onLine) throw error;
    sessionStorage.setItem(RELOADED, 'yes');
    window.location.reload();
    return new Promise<never>(() => undefined);
  }
}
