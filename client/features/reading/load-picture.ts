import type { Photo, Rendition } from '#contract/photos.ts';

/** What a picture may take of the memory it is drawn from: more than this many pixels are scaled down. */
const MOST_PIXELS = 24_000_000;

/** The renditions to show one after the other: one that is soon there, then the one with every pixel. */
export function renditionsToShow({ renditions: { thumb, page, full } }: Photo): readonly Rendition[] {
  const first = page ?? thumb;
  return [first, full].filter((rendition) => rendition !== null).filter((rendition, place, all) => place === 0 || rendition.width > (all[0]?.width ?? 0));
}

/** The size a picture is loaded at, so that no side is longer than `longestSide` and it is not too large for the memory. */
export function sizeToLoad({ width, height }: Pick<Rendition, 'width' | 'height'>, longestSide: number): { readonly width: number; readonly height: number } {
  const scale = Math.min(1, longestSide / Math.max(width, height), Math.sqrt(MOST_PIXELS / (width * height)));
  return { width: Math.max(1, Math.floor(width * scale)), height: Math.max(1, Math.floor(height * scale)) };
}

/** Loads and decodes a rendition, off the page's own thread. Throws when it can't be had or is no picture. */
export async function loadPicture(rendition: Rendition, longestSide: number, signal: AbortSignal): Promise<ImageBitmap> {
  const response = await fetch(rendition.url, { credentials: 'same-origin', signal });
  if (!response.ok) throw new Error(`The picture was answered with ${response.status}`);
  const size = sizeToLoad(rendition, longestSide);
  const isWhole = size.width === rendition.width && size.height === rendition.height;
  return createImageBitmap(await response.blob(), {
    premultiplyAlpha: 'none',
    ...(isWhole ? {} : { resizeWidth: size.width, resizeHeight: size.height, resizeQuality: 'high' }),
  });
}
