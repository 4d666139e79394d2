import type { QueryClient } from '@tanstack/react-query';
import { useSuspenseQuery } from '@tanstack/react-query';
import type { LoaderFunction } from 'react-router-dom';
import { FactHistoryView } from '../../features/moderation/fact-history-view.tsx';
import { makerPage } from '../../features/makers/makers-queries.ts';
import { slugOf, useSlug } from './slug-param.ts';

export function loader(queryClient: QueryClient): LoaderFunction {
  return ({ params }) => queryClient.query({ ...makerPage(slugOf(params)), staleTime: 'static' });
}

export function Component() {
  const { data } = useSuspenseQuery(makerPage(useSlug()));
  return <FactHistoryView id={data.id} />;
}
