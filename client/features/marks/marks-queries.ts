import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import type { CallInput } from '#contract/endpoint.ts';
import { listMarks, listMarksToRead, readMark } from '#contract/marks.ts';
import type { MarkInShort } from '#contract/parts.ts';
import { call } from '../../lib/call.ts';
import { isWaiting, WAITING_MS } from '../photos/photo-queries.ts';

export type MarksSearch = CallInput<typeof listMarks>['query'];
export type MarksToReadSearch = CallInput<typeof listMarksToRead>['query'];

/** How often a page looks whether the working out has ended, and a list whether its photos are ready. */
const WORKING_OUT_MS = 4_000;

export const markKeys = {
  all: ['marks'] as const,
  page: (id: string) => ['marks', 'page', id] as const,
  lists: ['marks', 'list'] as const,
  list: (search: MarksSearch) => ['marks', 'list', search] as const,
  allToRead: ['marks', 'to read'] as const,
  toRead: (search: MarksToReadSearch) => ['marks', 'to read', search] as const,
};

/** Looked at again while its dates are being worked out or a photo of it is being made ready. */
export const markPage = (id: string) =>
  queryOptions({
    queryKey: markKeys.page(id),
    queryFn: ({ signal }) => call(readMark, { params: { id }, signal }),
    staleTime: 0,
    refetchInterval: ({ state: { data } }) =>
      data === undefined ? false : data.photos.some(({ photo }) => isWaiting(photo)) ? WAITING_MS : data.workingOut ? WORKING_OUT_MS : false,
  });

export const marksList = (search: MarksSearch) =>
  queryOptions({
    queryKey: markKeys.list(search),
    queryFn: ({ signal }) => call(listMarks, { query: search, signal }),
    placeholderData: keepPreviousData,
    staleTime: 0,
    refetchInterval: ({ state }) => (state.data?.items.some(awaitsPhoto) === true ? WORKING_OUT_MS : false),
  });

export const marksToRead = (search: MarksToReadSearch) =>
  queryOptions({
    queryKey: markKeys.toRead(search),
    queryFn: ({ signal }) => call(listMarksToRead, { query: search, signal }),
    placeholderData: keepPreviousData,
    staleTime: 0,
    refetchInterval: ({ state }) => (state.data?.items.some(awaitsPhoto) === true ? WORKING_OUT_MS : false),
  });

function awaitsPhoto({ photo }: Pick<MarkInShort, 'photo'>): boolean {
  return photo !== null && isWaiting(photo.photo);
}
