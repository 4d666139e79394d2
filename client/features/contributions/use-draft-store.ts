import { useQueryClient } from '@tanstack/react-query';
import { useEffect, useState, useSyncExternalStore } from 'react';
import { readContribution, saveContribution } from '#contract/contributions.ts';
import type { ContributionPage } from '#contract/contributions.ts';
import { call } from '../../lib/call.ts';
import { noticeSignedOut } from '../people/change-viewer.ts';
import { contributionPage } from './contributions-queries.ts';
import { createDraftStore } from './draft-store.ts';
import type { DraftState, DraftStore } from './draft-store.ts';
import { draftShelf } from './kept-drafts.ts';

/** The draft of a contribution as it is typed on this page. What was not saved when the page is left, is saved then. */
export function useDraftStore(contribution: ContributionPage): DraftState & { readonly store: DraftStore } {
  const queryClient = useQueryClient();
  const { id } = contribution;
  const [store] = useState(() =>
    createDraftStore({
      contribution,
      shelf: draftShelf(id),
      load: () => call(readContribution, { params: { id } }),
      save: async ({ revision, draft: { payload, citations, note }, baseVersion }) => {
        const body = { revision, payload, sources: [...citations], note, ...(baseVersion === undefined ? {} : { baseVersion }) };
        try {
          return await call(saveContribution, { params: { id }, body });
        } catch (error) {
          // It goes past the query client, which would notice.
          if (error instanceof Error) noticeSignedOut(error, queryClient);
          throw error;
        }
      },
      onAnswer: (answer) => queryClient.setQueryData(contributionPage(id).queryKey, answer),
    }),
  );
  useEffect(() => {
    store.resume();
    const onLine = () => void store.flush();
    window.addEventListener('online', onLine);
    return () => {
      window.removeEventListener('online', onLine);
      void store.flush();
    };
  }, [store]);
  return { ...useSyncExternalStore(store.subscribe, store.state), store };
}
