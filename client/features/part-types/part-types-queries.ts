import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { listPartTypes, readPartType } from '#contract/part-types.ts';
import type { CallInput } from '#contract/endpoint.ts';
import { LIMITS } from '#contract/limits.ts';
import { call } from '../../lib/call.ts';
import { listAll } from '../../lib/list-all.ts';

export type PartTypesSearch = CallInput<typeof listPartTypes>['query'];

const partTypeKeys = {
  all: ['part-types'] as const,
  list: (search: PartTypesSearch) => [...partTypeKeys.all, 'list', search] as const,
  page: (slug: string) => [...partTypeKeys.all, 'page', slug] as const,
};

export const partTypesList = (search: PartTypesSearch) =>
  queryOptions({
    queryKey: partTypeKeys.list(search),
    queryFn: ({ signal }) => call(listPartTypes, { query: search, signal }),
    placeholderData: keepPreviousData,
  });

export const partTypePage = (slug: string) =>
  queryOptions({ queryKey: partTypeKeys.page(slug), queryFn: ({ signal }) => call(readPartType, { params: { slug }, signal }) });

/** Every part type, for a filter to choose from. */
export const partTypesToChoose = () =>
  queryOptions({
    queryKey: [...partTypeKeys.all, 'to choose'],
    queryFn: ({ signal }) =>
      listAll((after) =>
        call(listPartTypes, { query: { limit: LIMITS.page.most, ...(after === undefined ? {} : { after }) }, signal }),
      ),
  });
