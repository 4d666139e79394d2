import type { QueryClient } from '@tanstack/react-query';
import { useSuspenseQuery } from '@tanstack/react-query';
import type { LoaderFunction } from 'react-router-dom';
import { FactHistoryView } from '../../features/moderation/fact-history-view.tsx';
import { loadHistory } from '../../features/moderation/load-history.ts';
import { serialRangePage } from '../../features/serial-ranges/serial-ranges-queries.ts';
import { slugOf, useSlug } from './slug-param.ts';

export function loader(queryClient: QueryClient): LoaderFunction {
  return async ({ params }) => {
    const { id } = await queryClient.query({ ...serialRangePage(slugOf(params)), staleTime: 'static' });
    return loadHistory(queryClient, id);
  };
}

export function Component() {
  const { data } = useSuspenseQuery(serialRangePage(useSlug()));
  return <FactHistoryView id={data.id} />;
}
