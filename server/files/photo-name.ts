import { PHOTO_LIMITS } from '#contract/photos.ts';

/** Controls, and what turns the direction of writing around: `photo\u202Egpj.exe` would be shown as a picture's name. */
const UNSEEN = /[\p{Cc}\p{Cs}\u200E\u200F\u202A-\u202E\u2066-\u2069]/gu;

/**
 * A file's own name as text to show, and nothing else is ever made of it. Without the folders that stand before it.
 *
 * @example nameAsText('C:\\Photos\\block.jpg') //=> 'block.jpg'
 */
export function nameAsText(given: string): string | null {
  const [last = ''] = given.split(/[/\\]/).slice(-1);
  const text = [...last.replaceAll(UNSEEN, '').normalize('NFC').trim()].slice(0, PHOTO_LIMITS.name).join('').trim();
  return text === '' ? null : text;
}

/** What the end of a name says the file is, in small letters; `null` where it says nothing. */
export function endingOf(name: string | null): string | null {
  return /[^.]\.([a-z0-9]{2,5})$/i.exec(name ?? '')?.[1]?.toLowerCase() ?? null;
}
