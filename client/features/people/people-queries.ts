import { queryOptions } from '@tanstack/react-query';
import { listSessions, readMe } from '#contract/accounts.ts';
import { listPasskeys } from '#contract/second-factors.ts';
import { call } from '../../lib/call.ts';

export const peopleKeys = {
  me: ['me'] as const,
  sessions: ['mine', 'sessions'] as const,
  passkeys: ['mine', 'passkeys'] as const,
};

/** Who is at the page, null for a visitor. Asked again whenever the window comes back to the front: another tab may have signed out. */
export const me = () =>
  queryOptions({
    queryKey: peopleKeys.me,
    queryFn: async ({ signal }) => (await call(readMe, { signal })).me,
    refetchOnWindowFocus: true,
  });

export const sessionsList = () =>
  queryOptions({ queryKey: peopleKeys.sessions, queryFn: ({ signal }) => call(listSessions, { signal }), staleTime: 0 });

export const passkeysList = () => queryOptions({ queryKey: peopleKeys.passkeys, queryFn: ({ signal }) => call(listPasskeys, { signal }) });
