import sharp from 'sharp';
import type { Sharp, SharpOptions } from 'sharp';
import { PHOTO_LIMITS } from '#contract/photos.ts';

let isGuarded = false;

/** Seconds one picture may take from file to file. */
export const PICTURE_SECONDS = 30;

/** Pixels without a file around them, four bytes each. */
export type RawPicture = { readonly data: Uint8Array; readonly width: number; readonly height: number };
export type PictureSource = { readonly path: string } | RawPicture;

/**
 * The one way to the image library. Left to itself it opens whatever a file turns out to be (SVG, TIFF, PDF …); here it knows three kinds, whatever a
 * file is called, stops at the pixel limit and at a fault the decoder warns of, and keeps no files open.
 */
export function openPicture(source: PictureSource, options: Pick<SharpOptions, 'limitInputPixels'> = {}): Sharp {
  guard();
  const shared: SharpOptions = { failOn: 'warning', limitInputPixels: PHOTO_LIMITS.pixels, ...options };
  const picture =
    'path' in source
      ? sharp(source.path, shared)
      : sharp(source.data, { ...shared, raw: { width: source.width, height: source.height, channels: 4 } });
  return picture.timeout({ seconds: PICTURE_SECONDS });
}

function guard(): void {
  if (isGuarded) return;
  sharp.block({ operation: ['VipsForeignLoad'] });
  sharp.unblock({ operation: ['VipsForeignLoadJpeg', 'VipsForeignLoadPng', 'VipsForeignLoadWebp'] });
  sharp.cache(false);
  isGuarded = true;
}
