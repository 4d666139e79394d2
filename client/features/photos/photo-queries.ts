import { queryOptions } from '@tanstack/react-query';
import { listUnusedPhotos, readPhoto } from '#contract/photos.ts';
import type { Photo } from '#contract/photos.ts';
import { call } from '../../lib/call.ts';

/** How often a page looks whether a photo has been made ready. */
export const WAITING_MS = 1_000;

export const photoKeys = {
  all: ['photos'] as const,
  page: (id: string) => ['photos', 'page', id] as const,
  unused: ['photos', 'unused'] as const,
};

/** A photo, looked at again and again until its renditions are made. */
export const photoById = (id: string) =>
  queryOptions({
    queryKey: photoKeys.page(id),
    queryFn: ({ signal }) => call(readPhoto, { params: { id }, signal }),
    refetchInterval: ({ state }) => (isWaiting(state.data) ? WAITING_MS : false),
  });

export const unusedPhotos = () =>
  queryOptions({ queryKey: photoKeys.unused, queryFn: ({ signal }) => call(listUnusedPhotos, { signal }), staleTime: 0 });

export function isWaiting(photo: Photo | null | undefined): boolean {
  return photo?.state === 'waiting';
}
