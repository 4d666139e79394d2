import type { QueryClient } from '@tanstack/react-query';
import { useSuspenseQuery } from '@tanstack/react-query';
import type { LoaderFunction } from 'react-router-dom';
import { modelHistory, modelPage } from '../../features/models/models-queries.ts';
import { paths } from '../../lib/paths.ts';
import { HistoryView } from './history-view.tsx';
import { slugOf, useSlug } from './slug-param.ts';

export function loader(queryClient: QueryClient): LoaderFunction {
  return async ({ params }) => {
    const slug = slugOf(params);
    await Promise.all([
      queryClient.query({ ...modelPage(slug), staleTime: 'static' }),
      queryClient.query({ ...modelHistory(slug), staleTime: 'static' }),
    ]);
    return null;
  };
}

export function Component() {
  const slug = useSlug();
  const { data: model } = useSuspenseQuery(modelPage(slug));
  const { data: history } = useSuspenseQuery(modelHistory(slug));
  return <HistoryView name={model.name} path={paths.model(slug)} versions={history.items} />;
}
