/** The glyphs a mark can hold: the letters A–Z and the figures 0–9. */
export const GLYPHS = 'ABCDEFGHIJKLMNOPQRSTUVWXYZ0123456789';
export const GLYPH_COUNT = GLYPHS.length;

/** Its place in `GLYPHS`: what the decoder counts in. */
export type GlyphIndex = number;

const INDEX_OF: ReadonlyMap<string, GlyphIndex> = new Map([...GLYPHS].map((glyph, index) => [glyph, index]));

/** `null` for anything that is no glyph. */
export function glyphIndex(glyph: string): GlyphIndex | null {
  return INDEX_OF.get(glyph) ?? null;
}

export function glyphAt(index: GlyphIndex): string {
  return GLYPHS.charAt(index);
}

export function isGlyph(character: string): boolean {
  return INDEX_OF.has(character);
}

/** Unicode NFKC, then upper case: the form in which marks and symbols are compared. */
export function foldCase(text: string): string {
  return text.normalize('NFKC').toUpperCase();
}
