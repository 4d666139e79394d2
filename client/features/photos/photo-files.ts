import { PHOTO_LIMITS } from '#contract/photos.ts';
import { sayBytes } from '../../lib/say-bytes.ts';

/** What a picture may be declared as, and how its name may then end; a file picker reads it too. */
export const ACCEPTED: Readonly<Record<string, readonly string[]>> = {
  'image/jpeg': ['.jpg', '.jpeg'],
  'image/png': ['.png'],
  'image/webp': ['.webp'],
  'image/heic': ['.heic', '.heif'],
  'image/heif': ['.heic', '.heif'],
};

/**
 * Why a file is not worth sending, in a sentence; null where it is. What is really in it the register tells: here only what the device
 * says of it, and a device that knows no type of it (some don't know HEIC) says nothing.
 */
export function faultOfFile({ name, type, size }: Pick<File, 'name' | 'type' | 'size'>): string | null {
  if (size === 0) return 'The file is empty.';
  if (size > PHOTO_LIMITS.file) return `It is larger than the ${sayBytes(PHOTO_LIMITS.file)} a photo may have.`;
  const ending = /\.[^.]+$/.exec(name)?.[0].toLowerCase() ?? '';
  const known = type === '' ? Object.values(ACCEPTED).some((endings) => endings.includes(ending)) : Object.hasOwn(ACCEPTED, type);
  return known ? null : 'Only JPEG, PNG, WebP and HEIC pictures can be kept.';
}
