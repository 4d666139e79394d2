import type { Sharp } from 'sharp';
import type { RenditionName, RenditionType } from '#domain/vocabulary.ts';
import { openPicture } from './open-picture.ts';
import type { PictureSource } from './open-picture.ts';
import type { RenditionFileName } from './rendition-names.ts';
import { UnusablePictureError } from './unusable-picture-error.ts';

/** A rendition to be made, with the size it will have. */
export type PlannedRendition = RenditionFileName & { readonly height: number };

type Size = { readonly width: number; readonly height: number };
type Wanted = { readonly rendition: RenditionName; readonly longerSide: number; readonly types: readonly RenditionType[] };

/** In the order in which they are made: what is shown first comes first. */
const WANTED: readonly Wanted[] = [
  { rendition: 'thumb', longerSide: 320, types: ['image/webp'] },
  { rendition: 'thumb', longerSide: 640, types: ['image/webp'] },
  { rendition: 'page', longerSide: 960, types: ['image/webp', 'image/avif'] },
  { rendition: 'page', longerSide: 1600, types: ['image/webp', 'image/avif'] },
  { rendition: 'full', longerSide: 8192, types: ['image/webp'] },
  { rendition: 'relief', longerSide: 2400, types: ['image/webp'] },
];

/** Pixels a side of a place whose contrast is equalised by itself. */
const PLACE = 40;

/** The most pixels of the original that are worked on beside another picture. */
const LARGE = 24_000_000;

/** What is to be made of a picture of this size, upright. Nothing is made larger than it is, and nothing twice. */
export function planRenditions(size: Size): readonly PlannedRendition[] {
  const planned = WANTED.flatMap(({ rendition, longerSide, types }) => types.map((type) => ({ rendition, type, ...fitted(size, longerSide) })));
  return planned.filter(
    (one, place) => planned.findIndex((other) => other.rendition === one.rendition && other.type === one.type && other.width === one.width) === place,
  );
}

function fitted({ width, height }: Size, longerSide: number): Size {
  const scale = Math.min(1, longerSide / Math.max(width, height));
  return { width: Math.max(1, Math.round(width * scale)), height: Math.max(1, Math.round(height * scale)) };
}

/** How much room a picture takes among others: a large one is worked on alone. */
export function weightOf({ width, height }: Size): number {
  return width * height > LARGE ? 2 : 1;
}

/**
 * Makes one rendition: upright, and nothing of the file but its pixels. The library writes no metadata unless it is told to, which nothing
 * here does; a colour profile is used up on the way to sRGB.
 *
 * @throws UnusablePictureError where the file can't be decoded.
 */
export async function makeRendition(source: PictureSource, { rendition, width, height, type }: PlannedRendition): Promise<Buffer> {
  const picture = openPicture(source).autoOrient().resize(width, height, { fit: 'fill' });
  try {
    return await written(rendition === 'relief' ? inRelief(picture, { width, height }) : picture, rendition, type).toBuffer();
  } catch (cause) {
    throw new UnusablePictureError('content', 'The file is damaged, or too hard to open.', { cause });
  }
}

/**
 * Grey, stretched over the whole range, then equalised place by place with the contrast limited (CLAHE: K. Zuiderveld, Contrast Limited Adaptive
 * Histogram Equalization, Graphics Gems IV, 1994). A place is about as wide as the strokes of a cast figure on a photo that shows a mark.
 */
function inRelief(picture: Sharp, { width, height }: Size): Sharp {
  return picture.greyscale().normalise().clahe({ width: Math.min(PLACE, width), height: Math.min(PLACE, height), maxSlope: 4 });
}

/** Larger pictures are packed with less effort: the last tenth of size would take as long as all the rest. */
function written(picture: Sharp, rendition: RenditionName, type: RenditionType): Sharp {
  if (type === 'image/avif') return picture.avif({ quality: 55, effort: 1 });
  return rendition === 'full' ? picture.webp({ quality: 88, effort: 1 }) : picture.webp({ quality: 80, effort: rendition === 'relief' ? 2 : 4 });
}
