import { QueryClient } from '@tanstack/react-query';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { lazyPage } from '#client/lib/lazy-page.ts';
import type { PageModule } from '#client/lib/lazy-page.ts';

const queryClient = new QueryClient();
const page: PageModule = { Component: () => null, loader: () => () => 'loaded' };
const load = (from: () => Promise<PageModule>) => {
  const lazy = lazyPage(from, queryClient);
  if (typeof lazy !== 'function') throw new Error('A page is loaded by a function');
  return lazy();
};
const gone = () => Promise.reject(new TypeError('Failed to fetch dynamically imported module'));
const reload = vi.fn();

beforeEach(() => {
  sessionStorage.clear();
  reload.mockClear();
  vi.stubGlobal('location', { reload });
});
afterEach(() => vi.unstubAllGlobals());

describe('lazyPage', () => {
  it('gives the route its component and a loader bound to the cache', async () => {
    const route = await load(() => Promise.resolve(page));
    expect(route.Component).toBe(page.Component);
    expect(route).not.toHaveProperty('ErrorBoundary');
  });
  it('loads the site again when a file is gone, and only once', async () => {
    void load(gone);
    await vi.waitFor(() => expect(reload).toHaveBeenCalledTimes(1));
    await expect(load(gone)).rejects.toThrow('dynamically imported');
    expect(reload).toHaveBeenCalledTimes(1);
  });
  it('may load it again for the next version once a page has come through', async () => {
    void load(gone);
    await vi.waitFor(() => expect(reload).toHaveBeenCalledTimes(1));
    await load(() => Promise.resolve(page));
    void load(gone);
    await vi.waitFor(() => expect(reload).toHaveBeenCalledTimes(2));
  });
  it('does not reload a device that is offline', async () => {
    vi.spyOn(navigator, 'onLine', 'get').mockReturnValue(false);
    await expect(load(gone)).rejects.toThrow('dynamically imported');
    expect(reload).not.toHaveBeenCalled();
  });
});
