import type { PhotoStore } from '#server/files/photo-store.ts';
import { keyOf, ORIGINAL } from '#server/files/photo-store.ts';
import { fileNameOf } from '#server/files/rendition-names.ts';
import type { DroppedPicture } from './drop-picture.ts';

/** Takes all files of a picture out of the store, the original too, whether it is still there or not. */
export async function removeFilesOf({ storeKey, files }: DroppedPicture, store: PhotoStore): Promise<void> {
  for (const name of [...files.map(fileNameOf), ORIGINAL]) await store.remove(keyOf(storeKey, name));
}
