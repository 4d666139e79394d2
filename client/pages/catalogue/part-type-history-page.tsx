import type { QueryClient } from '@tanstack/react-query';
import { useSuspenseQuery } from '@tanstack/react-query';
import type { LoaderFunction } from 'react-router-dom';
import { partTypeHistory, partTypePage } from '../../features/part-types/part-types-queries.ts';
import { paths } from '../../lib/paths.ts';
import { HistoryView } from './history-view.tsx';
import { slugOf, useSlug } from './slug-param.ts';

export function loader(queryClient: QueryClient): LoaderFunction {
  return async ({ params }) => {
    const slug = slugOf(params);
    await Promise.all([
      queryClient.query({ ...partTypePage(slug), staleTime: 'static' }),
      queryClient.query({ ...partTypeHistory(slug), staleTime: 'static' }),
    ]);
    return null;
  };
}

export function Component() {
  const slug = useSlug();
  const { data: partType } = useSuspenseQuery(partTypePage(slug));
  const { data: history } = useSuspenseQuery(partTypeHistory(slug));
  return <HistoryView name={partType.name} path={paths.partType(slug)} versions={history.items} />;
}
