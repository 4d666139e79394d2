import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { listModels, readBuild, readModel } from '#contract/models.ts';
import type { CallInput } from '#contract/endpoint.ts';
import { call } from '../../lib/call.ts';

export type ModelsSearch = CallInput<typeof listModels>['query'];

const modelKeys = {
  all: ['models'] as const,
  list: (search: ModelsSearch) => [...modelKeys.all, 'list', search] as const,
  page: (slug: string) => [...modelKeys.all, 'page', slug] as const,
  build: (slug: string, serial: string) => [...modelKeys.all, 'build', slug, serial] as const,
};

export const modelsList = (search: ModelsSearch) =>
  queryOptions({
    queryKey: modelKeys.list(search),
    queryFn: ({ signal }) => call(listModels, { query: search, signal }),
    placeholderData: keepPreviousData,
  });

export const modelPage = (slug: string) =>
  queryOptions({ queryKey: modelKeys.page(slug), queryFn: ({ signal }) => call(readModel, { params: { slug }, signal }) });

/** When the model's machine with this serial was built; asked only once a serial is typed. */
export const modelBuild = (slug: string, serial: string) =>
  queryOptions({
    queryKey: modelKeys.build(slug, serial),
    queryFn: ({ signal }) => call(readBuild, { params: { slug }, query: { serial }, signal }),
    enabled: serial !== '',
  });
