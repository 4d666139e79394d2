import { useMutation, useQueryClient } from '@tanstack/react-query';
import { withdrawContribution } from '#contract/contributions.ts';
import type { ContributionPage } from '#contract/contributions.ts';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { Button, ButtonLink } from '../../ui/button.tsx';
import { ActTrouble } from '../people/act-trouble.tsx';
import { contributionKeys, contributionPage } from './contributions-queries.ts';

/** What its author can do with a contribution: write on, or take it back. */
export function AuthorDeeds({ contribution }: { readonly contribution: ContributionPage }) {
  const { id, revision, state, can } = contribution;
  const queryClient = useQueryClient();
  const withdraw = useMutation({
    mutationFn: () => call(withdrawContribution, { params: { id }, body: { revision } }),
    onSuccess: (answer) => {
      queryClient.setQueryData(contributionPage(id).queryKey, answer);
      return queryClient.invalidateQueries({ queryKey: contributionKeys.mine });
    },
  });
  return (
    <>
      <ActTrouble act={withdraw} />
      <div className="flex flex-wrap gap-3">
        {can.edit && (
          <ButtonLink weight="primary" to={paths.contributionDraft(id)}>
            {state === 'sent-back' ? 'Go on with it' : 'Open the draft'}
          </ButtonLink>
        )}
        {can.withdraw && (
          <Button disabled={withdraw.isPending} onClick={() => withdraw.mutate()}>
            Take it back
          </Button>
        )}
      </div>
    </>
  );
}
