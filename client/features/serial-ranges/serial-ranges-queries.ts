import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { listSerialRanges, readSerialRange } from '#contract/serial-ranges.ts';
import type { CallInput } from '#contract/endpoint.ts';
import { call } from '../../lib/call.ts';

export type SerialRangesSearch = CallInput<typeof listSerialRanges>['query'];

const serialRangeKeys = {
  all: ['serial-ranges'] as const,
  list: (search: SerialRangesSearch) => [...serialRangeKeys.all, 'list', search] as const,
  page: (slug: string) => [...serialRangeKeys.all, 'page', slug] as const,
};

export const serialRangesList = (search: SerialRangesSearch) =>
  queryOptions({
    queryKey: serialRangeKeys.list(search),
    queryFn: ({ signal }) => call(listSerialRanges, { query: search, signal }),
    placeholderData: keepPreviousData,
  });

export const serialRangePage = (slug: string) =>
  queryOptions({
    queryKey: serialRangeKeys.page(slug),
    queryFn: ({ signal }) => call(readSerialRange, { params: { slug }, signal }),
  });
