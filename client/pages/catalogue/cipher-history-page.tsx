import type { QueryClient } from '@tanstack/react-query';
import { useSuspenseQuery } from '@tanstack/react-query';
import type { LoaderFunction } from 'react-router-dom';
import { cipherPage } from '../../features/ciphers/ciphers-queries.ts';
import { FactHistoryView } from '../../features/moderation/fact-history-view.tsx';
import { loadHistory } from '../../features/moderation/load-history.ts';
import { slugOf, useSlug } from './slug-param.ts';

export function loader(queryClient: QueryClient): LoaderFunction {
  return async ({ params }) => {
    const { id } = await queryClient.query({ ...cipherPage(slugOf(params)), staleTime: 'static' });
    return loadHistory(queryClient, id);
  };
}

export function Component() {
  const { data } = useSuspenseQuery(cipherPage(useSlug()));
  return <FactHistoryView id={data.id} />;
}
