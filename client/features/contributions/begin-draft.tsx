import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useEffect, useRef } from 'react';
import { useNavigate } from 'react-router-dom';
import { startContribution } from '#contract/contributions.ts';
import { call } from '../../lib/call.ts';
import type { CallOptions } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { useRequestKey } from '../../lib/use-request-key.ts';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';
import { ActTrouble } from '../people/act-trouble.tsx';
import { contributionPage } from './contributions-queries.ts';

/** Begins a draft, once, and gives its address up for the draft's own, so that Back does not begin another. */
export function BeginDraft({ title, body }: { readonly title: string; readonly body: CallOptions<typeof startContribution>['body'] }) {
  const queryClient = useQueryClient();
  const navigate = useNavigate();
  const keyOf = useRequestKey();
  const start = useMutation({
    mutationFn: () => call(startContribution, { body, key: keyOf(body) }),
    onSuccess: (answer) => {
      queryClient.setQueryData(contributionPage(answer.id).queryKey, answer);
      return navigate(paths.contributionDraft(answer.id), { replace: true });
    },
  });
  const { mutate } = start;
  const begun = useRef(false);
  useEffect(() => {
    if (begun.current) return;
    begun.current = true;
    mutate();
  }, [mutate]);
  return (
    <>
      <PageTitle title={title}>{title}</PageTitle>
      <PartingLine />
      <div className="pt-8">{start.isError ? <ActTrouble act={start} /> : <Skeleton lines={6} label="Beginning a draft" />}</div>
    </>
  );
}
