/** A NUL, or half of a surrogate pair: JavaScript carries them, PostgreSQL and UTF-8 do not. */
const UNCARRIABLE = /[\0\p{Surrogate}]/u;

/** Whether text can be stored and sent on as it stands. */
export function isPlainText(text: string): boolean {
  return !UNCARRIABLE.test(text);
}
