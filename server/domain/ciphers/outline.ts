import { glyphIndex, type GlyphIndex } from '../marks/glyphs.ts';
import { lookAlikesOf } from '../marks/look-alikes.ts';
import type { Glyph, Reading } from '../marks/reading.ts';
import type { CompiledCipher } from './compiled-cipher.ts';
import { maskOf, type GlyphMask } from './glyph-mask.ts';

/** What a reading demands of any cipher: its length, and at each place one of some glyphs. */
export type Outline = {
  readonly glyphs: number;
  readonly hasRun: boolean;
  /** Each different demand once; unread glyphs demand nothing. */
  readonly demands: readonly GlyphMask[];
};

export function outlineOf(reading: Reading, lookAlikes: boolean): Outline {
  const runs = reading.glyphs.filter((glyph) => glyph.kind === 'run').length;
  const demands = new Map<string, GlyphMask>();
  for (const glyph of reading.glyphs) {
    const wanted = demandOf(glyph, lookAlikes);
    if (wanted === null) continue;
    const mask = maskOf(wanted);
    demands.set(`${String(mask.low)} ${String(mask.high)}`, mask);
  }
  return { glyphs: reading.glyphs.length - runs, hasRun: runs > 0, demands: [...demands.values()] };
}

/** Whether the cipher has a mark of that length, and a symbol for each glyph. `false` is certain, `true` only a beginning. */
export function canSpell(cipher: CompiledCipher, outline: Outline): boolean {
  if (outline.glyphs > cipher.most || (!outline.hasRun && outline.glyphs < cipher.least)) return false;
  const { low, high } = cipher.glyphMask;
  return outline.demands.every((demand) => (demand.low & low) !== 0 || (demand.high & high) !== 0);
}

function demandOf(glyph: Glyph, lookAlikes: boolean): readonly GlyphIndex[] | null {
  switch (glyph.kind) {
    case 'sure':
      return indexes([glyph.glyph, ...(lookAlikes ? lookAlikesOf(glyph.glyph) : '')]);
    case 'oneOf':
      return indexes(glyph.glyphs);
    case 'unread':
    case 'run':
      return null;
  }
}

function indexes(glyphs: readonly string[]): readonly GlyphIndex[] {
  return glyphs.flatMap((glyph) => glyphIndex(glyph) ?? []);
}
