import type { z } from 'zod';
import type { Photo as PhotoShown, Rendition } from '#contract/photos.ts';
import type { Photo } from '#db/models/photo.ts';
import type { RenditionName } from '#domain/vocabulary.ts';
import { fileNameOf } from '#server/files/rendition-names.ts';
import { loaded } from './loaded.ts';

/** A photo with its graph `picture.files`; what its owner alone may know is left out for others. */
export function presentPhoto(photo: Photo, { isOwner }: { readonly isOwner: boolean }): z.input<typeof PhotoShown> {
  const { state, failure, width, height } = loaded(photo.picture);
  return {
    id: photo.id,
    state,
    failure,
    width,
    height,
    name: isOwner ? photo.name : null,
    takenOn: photo.takenOn,
    renditions: {
      thumb: presentRendition('thumb', photo),
      page: presentRendition('page', photo),
      full: presentRendition('full', photo),
      relief: presentRendition('relief', photo),
    },
  };
}

/** As far as it is made. Its usual file is the widest WebP. */
function presentRendition(name: RenditionName, { address, picture }: Photo): Rendition | null {
  const files = loaded(loaded(picture).files)
    .filter(({ rendition }) => rendition === name)
    .sort((one, other) => one.width - other.width || one.type.localeCompare(other.type))
    .map((file) => ({ url: `/photos/${address}/${fileNameOf(file)}`, width: file.width, height: file.height, type: file.type }));
  const usual = files.findLast(({ type }) => type === 'image/webp');
  return usual === undefined ? null : { ...usual, files };
}
