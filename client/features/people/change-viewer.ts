import { useQueryClient } from '@tanstack/react-query';
import type { QueryClient } from '@tanstack/react-query';
import { useEffect } from 'react';
import type { Me } from '#contract/people.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import { dropSessionDrafts } from '../../lib/session-draft.ts';
import { me } from './people-queries.ts';

/** What the tabs of one browser tell each other by; it says only that something changed, each tab asks the register what. */
const CHANNEL = 'pourbook:viewer';

/** Somebody signed in, or out: what was shown to whoever was here before is forgotten, in this tab and in the others. */
export function changeViewer(queryClient: QueryClient, viewer: Me | null): void {
  change(queryClient, viewer, 'changed');
}

/** Somebody signed out of their own will: what they had typed is dropped too. Where a session ends by itself, it waits for them to come back. */
export function leaveViewer(queryClient: QueryClient): void {
  dropSessionDrafts();
  change(queryClient, null, 'left');
}

/** An answer that one must sign in first, where we took somebody to be signed in: the session ended, in another tab or by itself. */
export function noticeSignedOut(error: Error, queryClient: QueryClient): void {
  if (!(error instanceof ProblemError) || error.kind !== 'not-signed-in') return;
  if (queryClient.getQueryData(me().queryKey)) changeViewer(queryClient, null);
}

/** Follows what happens in the browser's other tabs. */
export function useOtherTabs(): void {
  const queryClient = useQueryClient();
  useEffect(() => {
    const channel = new BroadcastChannel(CHANNEL);
    channel.onmessage = ({ data }) => {
      if (data === 'left') dropSessionDrafts();
      forget(queryClient);
      void queryClient.invalidateQueries({ queryKey: me().queryKey });
    };
    return () => channel.close();
  }, [queryClient]);
}

function change(queryClient: QueryClient, viewer: Me | null, what: 'changed' | 'left'): void {
  forget(queryClient);
  queryClient.setQueryData(me().queryKey, viewer);
  const channel = new BroadcastChannel(CHANNEL);
  channel.postMessage(what);
  channel.close();
}

function forget(queryClient: QueryClient): void {
  const [own] = me().queryKey;
  void queryClient.cancelQueries({ queryKey: me().queryKey });
  queryClient.removeQueries({ predicate: ({ queryKey }) => queryKey[0] !== own });
}
