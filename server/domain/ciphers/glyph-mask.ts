import type { GlyphIndex } from '../marks/glyphs.ts';

/** Glyphs as two words of bits: 32 and 4 of the 36. */
export type GlyphMask = { readonly low: number; readonly high: number };

const WORD = 32;

export function maskOf(glyphs: Iterable<GlyphIndex>): GlyphMask {
  let low = 0;
  let high = 0;
  for (const glyph of glyphs) {
    if (glyph < WORD) low |= 1 << glyph;
    else high |= 1 << (glyph - WORD);
  }
  return { low, high };
}
