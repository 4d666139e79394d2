import type { Glyph, Reading } from '#domain/marks/reading.ts';

/**
 * A reading as a POSIX pattern over a casting number's letters and digits, anchored at both ends: `4?B3*` → `^4.B3.*$`. Breaks are left
 * out, because the column holds none. At most one `.*` and no repetition inside another, so that matching costs a pass over the number;
 * the trigram index narrows what it is tried on.
 */
export function numberPattern(reading: Reading): string {
  return `^${reading.glyphs.map(partOf).join('')}$`;
}

function partOf(glyph: Glyph): string {
  switch (glyph.kind) {
    case 'sure':
      return plain(glyph.glyph);
    case 'oneOf':
      return `[${glyph.glyphs.map(plain).join('')}]`;
    case 'unread':
      return '.';
    case 'run':
      return '.*';
  }
}

/** Glyphs are capitals and digits; anything else would be a pattern of somebody else's making. */
function plain(glyph: string): string {
  if (!/^[A-Z0-9]$/.test(glyph)) throw new RangeError('A glyph of a number is one capital or digit');
  return glyph;
}
