import { MutationCache, QueryCache, QueryClient } from '@tanstack/react-query';
import { noticeSignedOut } from '../features/people/change-viewer.ts';
import { ProblemError } from '../lib/problem-error.ts';

/** Catalogue facts change seldom: a page read a minute ago is shown at once and not asked for again. */
const FRESH_MS = 60_000;
const RETRIES = 2;

export function createQueryClient(): QueryClient {
  const onError = (error: Error): void => noticeSignedOut(error, queryClient);
  const queryClient: QueryClient = new QueryClient({
    queryCache: new QueryCache({ onError }),
    mutationCache: new MutationCache({ onError }),
    defaultOptions: {
      queries: {
        staleTime: FRESH_MS,
        retry: (failures, error) => failures < RETRIES && mayPass(error),
        refetchOnWindowFocus: false,
        // Asked even offline, so that the page says so at once; asked again when the line is back.
        networkMode: 'always',
        refetchOnReconnect: true,
      },
      // What is sent offline fails at once and is kept in its form, rather than going out unasked when the line is back.
      mutations: { networkMode: 'always' },
    },
  });
  return queryClient;
}

/** Asking again helps only where the register itself was away or broken; a wrong question stays wrong, and a broken line is said at once. */
function mayPass(error: unknown): boolean {
  return error instanceof ProblemError && (error.kind === 'unavailable' || error.kind === 'internal');
}
