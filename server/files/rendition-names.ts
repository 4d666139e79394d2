import type { RenditionName, RenditionType } from '#domain/vocabulary.ts';
import { RENDITIONS, RENDITION_TYPES } from '#domain/vocabulary.ts';

/** What tells one file of a picture from another. */
export type RenditionFileName = { readonly rendition: RenditionName; readonly width: number; readonly type: RenditionType };

const FILE_NAME = /^([a-z]+)-([1-9]\d{0,4})\.([a-z]+)$/;

/**
 * @example fileNameOf({ rendition: 'page', width: 960, type: 'image/webp' }) //=> 'page-960.webp'
 */
export function fileNameOf({ rendition, width, type }: RenditionFileName): string {
  return `${rendition}-${width}.${endingOf(type)}`;
}

/** What a file's name says; `null` for a name that `fileNameOf` never gives. */
export function parseFileName(text: string): RenditionFileName | null {
  const [, name, width, ending] = FILE_NAME.exec(text) ?? [];
  const rendition = RENDITIONS.find((one) => one === name);
  const type = RENDITION_TYPES.find((one) => endingOf(one) === ending);
  return rendition === undefined || type === undefined ? null : { rendition, width: Number(width), type };
}

function endingOf(type: RenditionType): string {
  return type.slice('image/'.length);
}
