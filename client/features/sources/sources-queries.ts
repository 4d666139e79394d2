import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { listSources, readSource, readSourceHistory } from '#contract/sources.ts';
import type { CallInput } from '#contract/endpoint.ts';
import { call } from '../../lib/call.ts';

export type SourcesSearch = CallInput<typeof listSources>['query'];

const sourceKeys = {
  all: ['sources'] as const,
  list: (search: SourcesSearch) => [...sourceKeys.all, 'list', search] as const,
  page: (slug: string) => [...sourceKeys.all, 'page', slug] as const,
  history: (slug: string) => [...sourceKeys.all, 'history', slug] as const,
};

export const sourcesList = (search: SourcesSearch) =>
  queryOptions({
    queryKey: sourceKeys.list(search),
    queryFn: ({ signal }) => call(listSources, { query: search, signal }),
    placeholderData: keepPreviousData,
  });

export const sourcePage = (slug: string) =>
  queryOptions({ queryKey: sourceKeys.page(slug), queryFn: ({ signal }) => call(readSource, { params: { slug }, signal }) });

export const sourceHistory = (slug: string) =>
  queryOptions({
    queryKey: sourceKeys.history(slug),
    queryFn: ({ signal }) => call(readSourceHistory, { params: { slug }, signal }),
  });
