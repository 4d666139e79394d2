import { queryOptions, useQueries } from '@tanstack/react-query';
import { openDesk } from '#contract/marks.ts';
import type { MarkPhoto } from '#contract/parts.ts';
import { call } from '../../lib/call.ts';
import { isWaiting, photoById } from '../photos/photo-queries.ts';

/** What is needed to read a mark; asked anew each time the page is opened, for what others do to the mark changes who reads blind. */
export const readingDesk = (id: string) =>
  queryOptions({
    queryKey: ['marks', 'desk', id],
    queryFn: ({ signal }) => call(openDesk, { params: { id }, signal }),
    staleTime: 0,
    // What lies on the desk does not change under the reader's hands.
    refetchOnWindowFocus: false,
    refetchOnReconnect: false,
  });

/** The photos of a mark as they are now: those still being made ready are looked at again until they are. */
export function useReadyPhotos(photos: readonly MarkPhoto[]): readonly MarkPhoto[] {
  const looks = useQueries({ queries: photos.map(({ photo }) => ({ ...photoById(photo.id), enabled: isWaiting(photo) })) });
  return photos.map((place, at) => {
    const now = looks[at]?.data;
    return now === undefined || !isWaiting(place.photo) ? place : { ...place, photo: now };
  });
}
