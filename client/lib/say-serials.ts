/** Numbers of one series as bounds of a range: `first` null = from the first ever made, `last` null = open end. */
export type NumberBounds = { readonly prefix: string | null; readonly first: string | null; readonly last: string | null };

/** The space that keeps a prefix with its number. */
const JOIN = '\u00A0';

/** A serial as it is read: `3C 1207`, or the bare number where the series has no prefix. */
export function saySerial(prefix: string | null, number: string): string {
  return prefix === null || prefix === '' ? number : `${prefix}${JOIN}${number}`;
}

/** `3C 1001–4120`, `5C 1 on`, `up to 3C 1189`, `3C 1190`, `every 3C`, `every serial`. */
export function saySerials({ prefix, first, last }: NumberBounds): string {
  if (first !== null && last !== null) return first === last ? saySerial(prefix, first) : `${saySerial(prefix, first)}–${last}`;
  if (first !== null) return `${saySerial(prefix, first)} on`;
  if (last !== null) return `up to ${saySerial(prefix, last)}`;
  return prefix === null || prefix === '' ? 'every serial' : `every ${prefix}`;
}
