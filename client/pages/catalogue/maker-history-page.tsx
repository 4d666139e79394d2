import type { QueryClient } from '@tanstack/react-query';
import { useSuspenseQuery } from '@tanstack/react-query';
import type { LoaderFunction } from 'react-router-dom';
import { makerHistory, makerPage } from '../../features/makers/makers-queries.ts';
import { paths } from '../../lib/paths.ts';
import { HistoryView } from './history-view.tsx';
import { slugOf, useSlug } from './slug-param.ts';

export function loader(queryClient: QueryClient): LoaderFunction {
  return async ({ params }) => {
    const slug = slugOf(params);
    await Promise.all([
      queryClient.query({ ...makerPage(slug), staleTime: 'static' }),
      queryClient.query({ ...makerHistory(slug), staleTime: 'static' }),
    ]);
    return null;
  };
}

export function Component() {
  const slug = useSlug();
  const { data: maker } = useSuspenseQuery(makerPage(slug));
  const { data: history } = useSuspenseQuery(makerHistory(slug));
  return <HistoryView name={maker.name} path={paths.maker(slug)} versions={history.items} />;
}
