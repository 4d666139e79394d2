import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { listCastings, readCasting } from '#contract/castings.ts';
import type { CallInput } from '#contract/endpoint.ts';
import { call } from '../../lib/call.ts';

export type CastingsSearch = CallInput<typeof listCastings>['query'];

const castingKeys = {
  all: ['castings'] as const,
  list: (search: CastingsSearch) => [...castingKeys.all, 'list', search] as const,
  page: (slug: string) => [...castingKeys.all, 'page', slug] as const,
};

export const castingsList = (search: CastingsSearch) =>
  queryOptions({
    queryKey: castingKeys.list(search),
    queryFn: ({ signal }) => call(listCastings, { query: search, signal }),
    placeholderData: keepPreviousData,
  });

export const castingPage = (slug: string) =>
  queryOptions({ queryKey: castingKeys.page(slug), queryFn: ({ signal }) => call(readCasting, { params: { slug }, signal }) });
