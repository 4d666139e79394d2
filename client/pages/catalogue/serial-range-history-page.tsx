import type { QueryClient } from '@tanstack/react-query';
import { useSuspenseQuery } from '@tanstack/react-query';
import type { LoaderFunction } from 'react-router-dom';
import { serialRangeHistory, serialRangePage } from '../../features/serial-ranges/serial-ranges-queries.ts';
import { paths } from '../../lib/paths.ts';
import { saySerials } from '../../lib/say-serials.ts';
import { HistoryView } from './history-view.tsx';
import { slugOf, useSlug } from './slug-param.ts';

export function loader(queryClient: QueryClient): LoaderFunction {
  return async ({ params }) => {
    const slug = slugOf(params);
    await Promise.all([
      queryClient.query({ ...serialRangePage(slug), staleTime: 'static' }),
      queryClient.query({ ...serialRangeHistory(slug), staleTime: 'static' }),
    ]);
    return null;
  };
}

export function Component() {
  const slug = useSlug();
  const { data: range } = useSuspenseQuery(serialRangePage(slug));
  const { data: history } = useSuspenseQuery(serialRangeHistory(slug));
  return (
    <HistoryView
      name={saySerials({ prefix: range.series.prefix, first: range.first, last: range.last })}
      path={paths.serialRange(slug)}
      versions={history.items}
    />
  );
}
