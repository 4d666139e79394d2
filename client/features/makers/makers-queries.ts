import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { listMakers, readMaker } from '#contract/makers.ts';
import type { CallInput } from '#contract/endpoint.ts';
import { call } from '../../lib/call.ts';

export type MakersSearch = CallInput<typeof listMakers>['query'];

const makerKeys = {
  all: ['makers'] as const,
  list: (search: MakersSearch) => [...makerKeys.all, 'list', search] as const,
  page: (slug: string) => [...makerKeys.all, 'page', slug] as const,
};

export const makersList = (search: MakersSearch) =>
  queryOptions({
    queryKey: makerKeys.list(search),
    queryFn: ({ signal }) => call(listMakers, { query: search, signal }),
    placeholderData: keepPreviousData,
  });

export const makerPage = (slug: string) =>
  queryOptions({ queryKey: makerKeys.page(slug), queryFn: ({ signal }) => call(readMaker, { params: { slug }, signal }) });
