import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { discardContribution } from '#contract/contributions.ts';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { Button } from '../../ui/button.tsx';
import { ActTrouble } from '../people/act-trouble.tsx';
import { InlineStep } from '../people/inline-step.tsx';
import { contributionKeys } from './contributions-queries.ts';
import type { DraftStore } from './draft-store.ts';

/** Throws a draft away that was never put forward; it can't be had back, so it is asked twice. */
export function DiscardDraft({ id, store }: { readonly id: string; readonly store: DraftStore }) {
  const queryClient = useQueryClient();
  const navigate = useNavigate();
  const discard = useMutation({
    mutationFn: () => call(discardContribution, { params: { id } }),
    onSuccess: async () => {
      store.forget();
      await navigate(paths.myContributions());
      // Only now: as long as its page is shown, it would be asked for again.
      queryClient.removeQueries({ queryKey: contributionKeys.page(id) });
      await queryClient.invalidateQueries({ queryKey: contributionKeys.mine });
    },
  });
  return (
    <div className="mt-6">
      <InlineStep label="Throw the draft away">
        {(close) => (
          <>
            <p className="mb-3">It is gone for good then; nobody but you has seen it.</p>
            <ActTrouble act={discard} />
            <div className="flex flex-wrap gap-3">
              <Button disabled={discard.isPending} onClick={() => discard.mutate()}>
                Throw it away for good
              </Button>
              <Button onClick={close}>Keep it</Button>
            </div>
          </>
        )}
      </InlineStep>
    </div>
  );
}
