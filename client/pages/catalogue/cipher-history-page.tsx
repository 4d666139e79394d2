import type { QueryClient } from '@tanstack/react-query';
import { useSuspenseQuery } from '@tanstack/react-query';
import type { LoaderFunction } from 'react-router-dom';
import { cipherHistory, cipherPage } from '../../features/ciphers/ciphers-queries.ts';
import { paths } from '../../lib/paths.ts';
import { HistoryView } from './history-view.tsx';
import { slugOf, useSlug } from './slug-param.ts';

export function loader(queryClient: QueryClient): LoaderFunction {
  return async ({ params }) => {
    const slug = slugOf(params);
    await Promise.all([
      queryClient.query({ ...cipherPage(slug), staleTime: 'static' }),
      queryClient.query({ ...cipherHistory(slug), staleTime: 'static' }),
    ]);
    return null;
  };
}

export function Component() {
  const slug = useSlug();
  const { data: cipher } = useSuspenseQuery(cipherPage(slug));
  const { data: history } = useSuspenseQuery(cipherHistory(slug));
  return <HistoryView name={cipher.title} path={paths.cipher(slug)} versions={history.items} />;
}
