import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { putForward } from '#contract/contributions.ts';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import { contributionKeys, contributionPage } from './contributions-queries.ts';
import type { DraftStore } from './draft-store.ts';

/** Puts the draft forward once all of it is saved; what the register then finds wrong sends its author back to the form. */
export function usePutForward(id: string, store: DraftStore, onRefused: () => void) {
  const queryClient = useQueryClient();
  const navigate = useNavigate();
  return useMutation({
    mutationFn: async () => {
      await store.flush();
      return call(putForward, { params: { id }, body: { revision: store.latest().revision } });
    },
    onSuccess: (answer) => {
      store.forget();
      queryClient.setQueryData(contributionPage(id).queryKey, answer);
      void queryClient.invalidateQueries({ queryKey: contributionKeys.mine });
      void navigate(paths.contribution(id));
    },
    onError: (error) => {
      if (!(error instanceof ProblemError) || error.kind !== 'invalid') return;
      queryClient.setQueryData(contributionPage(id).queryKey, (now) => (now === undefined ? now : { ...now, faults: [...error.faults] }));
      onRefused();
    },
  });
}

export type Forward = ReturnType<typeof usePutForward>;
