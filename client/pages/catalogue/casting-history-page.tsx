import type { QueryClient } from '@tanstack/react-query';
import { useSuspenseQuery } from '@tanstack/react-query';
import type { LoaderFunction } from 'react-router-dom';
import { castingHistory, castingPage } from '../../features/castings/castings-queries.ts';
import { sayCasting } from '../../features/castings/say-casting.ts';
import { paths } from '../../lib/paths.ts';
import { HistoryView } from './history-view.tsx';
import { slugOf, useSlug } from './slug-param.ts';

export function loader(queryClient: QueryClient): LoaderFunction {
  return async ({ params }) => {
    const slug = slugOf(params);
    await Promise.all([
      queryClient.query({ ...castingPage(slug), staleTime: 'static' }),
      queryClient.query({ ...castingHistory(slug), staleTime: 'static' }),
    ]);
    return null;
  };
}

export function Component() {
  const slug = useSlug();
  const { data: casting } = useSuspenseQuery(castingPage(slug));
  const { data: history } = useSuspenseQuery(castingHistory(slug));
  return <HistoryView name={sayCasting(casting)} path={paths.casting(slug)} versions={history.items} />;
}
