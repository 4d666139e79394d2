import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { listCiphers, readCipher } from '#contract/ciphers.ts';
import type { CallInput } from '#contract/endpoint.ts';
import { call } from '../../lib/call.ts';

export type CiphersSearch = CallInput<typeof listCiphers>['query'];

const cipherKeys = {
  all: ['ciphers'] as const,
  list: (search: CiphersSearch) => [...cipherKeys.all, 'list', search] as const,
  page: (slug: string) => [...cipherKeys.all, 'page', slug] as const,
};

export const ciphersList = (search: CiphersSearch) =>
  queryOptions({
    queryKey: cipherKeys.list(search),
    queryFn: ({ signal }) => call(listCiphers, { query: search, signal }),
    placeholderData: keepPreviousData,
  });

export const cipherPage = (slug: string) =>
  queryOptions({ queryKey: cipherKeys.page(slug), queryFn: ({ signal }) => call(readCipher, { params: { slug }, signal }) });
