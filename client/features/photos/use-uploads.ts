import { useQueryClient } from '@tanstack/react-query';
import { useEffect, useEffectEvent, useState, useSyncExternalStore } from 'react';
import type { Photo } from '#contract/photos.ts';
import { noticeSignedOut } from '../people/change-viewer.ts';
import { photoById } from './photo-queries.ts';
import { sendPhoto } from './send-photo.ts';
import { createUploadList, isUnderWay } from './upload-list.ts';
import type { Outcome, Upload, UploadList } from './upload-list.ts';

export type Uploads = {
  readonly list: UploadList;
  readonly uploads: readonly Upload[];
  /** How many files are still on their way. */
  readonly underWay: number;
  /** The file a photo was made from, for as long as this page is open: shown until the register has a rendition. */
  readonly fileOf: (photoId: string) => File | null;
};

/** The files sent from this page. `onArrived` is told of each photo they became. */
export function useUploads(onArrived: (photo: Photo) => void): Uploads {
  const queryClient = useQueryClient();
  const [list] = useState(() => createUploadList(sendPhoto));
  const [files, setFiles] = useState<ReadonlyMap<string, File>>(new Map());
  const hear = useEffectEvent((outcome: Outcome) => {
    if (outcome.kind === 'failed') {
      // It goes past the query client, which would notice.
      if (outcome.error instanceof Error) noticeSignedOut(outcome.error, queryClient);
      return;
    }
    const { photo, file } = outcome;
    setFiles((now) => new Map(now).set(photo.id, file));
    queryClient.setQueryData(photoById(photo.id).queryKey, photo);
    onArrived(photo);
  });
  useEffect(() => {
    const stopHearing = list.onOutcome((outcome) => hear(outcome));
    return () => {
      stopHearing();
      list.end();
    };
  }, [list]);
  const uploads = useSyncExternalStore(list.subscribe, list.uploads);
  return { list, uploads, underWay: uploads.filter(isUnderWay).length, fileOf: (id) => files.get(id) ?? null };
}
