import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import type { CallInput } from '#contract/endpoint.ts';
import { listMyParts, readPart } from '#contract/parts.ts';
import type { PartItem, PartPage } from '#contract/parts.ts';
import { call } from '../../lib/call.ts';
import { isWaiting, WAITING_MS } from '../photos/photo-queries.ts';

export type PartsSearch = CallInput<typeof listMyParts>['query'];

/** How often a page looks whether the working out has ended. */
const WORKING_OUT_MS = 4_000;

export const partKeys = {
  all: ['parts'] as const,
  allMine: ['parts', 'mine'] as const,
  mine: (search: PartsSearch) => ['parts', 'mine', search] as const,
  page: (id: string) => ['parts', 'page', id] as const,
};

/** The viewer's own parts; looked at again while a photo among them is being made ready. */
export const myParts = (search: PartsSearch) =>
  queryOptions({
    queryKey: partKeys.mine(search),
    queryFn: ({ signal }) => call(listMyParts, { query: search, signal }),
    placeholderData: keepPreviousData,
    staleTime: 0,
    refetchInterval: ({ state }) => (state.data?.items.some(awaitsPhotos) === true ? WAITING_MS : false),
  });

export const partPage = (id: string) =>
  queryOptions({
    queryKey: partKeys.page(id),
    queryFn: ({ signal }) => call(readPart, { params: { id }, signal }),
    staleTime: 0,
    refetchInterval: ({ state: { data } }) => (data === undefined ? false : isAwaited(data) ? WAITING_MS : data.workingOut ? WORKING_OUT_MS : false),
  });

function isAwaited(part: PartPage): boolean {
  return part.photos.some(isWaiting) || awaitsPhotos(part);
}

function awaitsPhotos({ photo, marks }: Pick<PartItem, 'photo' | 'marks'>): boolean {
  return isWaiting(photo) || marks.some((mark) => isWaiting(mark.photo?.photo));
}
