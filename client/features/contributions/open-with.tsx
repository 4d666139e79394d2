import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useEffect } from 'react';
import { openContribution } from '#contract/contributions.ts';
import type { ContributionPage, Person } from '#contract/contributions.ts';
import { call } from '../../lib/call.ts';
import { sayList } from '../../lib/say-number.ts';
import { Icon } from '../../ui/icon.tsx';
import { contributionPage } from './contributions-queries.ts';

/** The register takes a page for closed a minute after it last said so. */
const EVERY_MS = 30_000;

/** Tells the other moderators that one has the contribution open, as long as it is looked at, and who else has. */
export function OpenWith({ contribution: { id, openWith } }: { readonly contribution: ContributionPage }) {
  const queryClient = useQueryClient();
  const { mutate } = useMutation({
    mutationFn: () => call(openContribution, { params: { id } }),
    onSuccess: ({ openWith: now }) => queryClient.setQueryData(contributionPage(id).queryKey, (page) => (page === undefined ? page : { ...page, openWith: now })),
  });
  useEffect(() => {
    const tell = () => {
      if (document.visibilityState === 'visible') mutate();
    };
    tell();
    const timer = setInterval(tell, EVERY_MS);
    document.addEventListener('visibilitychange', tell);
    return () => {
      clearInterval(timer);
      document.removeEventListener('visibilitychange', tell);
    };
  }, [mutate]);
  return (
    <div role="status" className="empty:hidden">
      {openWith.length > 0 && (
        <p className="mb-6 flex items-center gap-2 text-straw">
          <Icon name="around" /> {sayOpen(openWith)}
        </p>
      )}
    </div>
  );
}

function sayOpen(others: readonly Person[]): string {
  const names = sayList(others.map(({ displayName }) => displayName), 'and');
  return `${names} ${others.length === 1 ? 'has' : 'have'} it open too.`;
}
