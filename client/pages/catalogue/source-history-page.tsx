import type { QueryClient } from '@tanstack/react-query';
import { useSuspenseQuery } from '@tanstack/react-query';
import type { LoaderFunction } from 'react-router-dom';
import { sourceHistory, sourcePage } from '../../features/sources/sources-queries.ts';
import { paths } from '../../lib/paths.ts';
import { HistoryView } from './history-view.tsx';
import { slugOf, useSlug } from './slug-param.ts';

export function loader(queryClient: QueryClient): LoaderFunction {
  return async ({ params }) => {
    const slug = slugOf(params);
    await Promise.all([
      queryClient.query({ ...sourcePage(slug), staleTime: 'static' }),
      queryClient.query({ ...sourceHistory(slug), staleTime: 'static' }),
    ]);
    return null;
  };
}

export function Component() {
  const slug = useSlug();
  const { data: source } = useSuspenseQuery(sourcePage(slug));
  const { data: history } = useSuspenseQuery(sourceHistory(slug));
  return <HistoryView name={source.title} path={paths.source(slug)} versions={history.items} />;
}
