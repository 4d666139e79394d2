import { describe, expect, it } from 'vitest';
import { GLYPHS, isGlyph } from '#domain/marks/glyphs.ts';
import { LOOK_ALIKES, lookAlikesOf } from '#domain/marks/look-alikes.ts';

describe('look-alikes', () => {
  it('names glyphs only, none as its own look-alike and none twice', () => {
    for (const [seen, others] of Object.entries(LOOK_ALIKES)) {
      expect(isGlyph(seen)).toBe(true);
      expect([...others!].every(isGlyph)).toBe(true);
      expect(others).not.toContain(seen);
      expect(new Set(others).size).toBe(others!.length);
    }
  });

  /** Common practice in the trade, no source: worn strokes go one way. Seen first, truly cast second. */
  it.each(['PR', 'FP', 'FE', 'IF', 'PB', '38'])('goes one way only in %s: what is seen, then what may have been cast', (pair) => {
    const [seen, cast] = [pair.charAt(0), pair.charAt(1)];
    expect(lookAlikesOf(seen)).toContain(cast);
    expect(lookAlikesOf(cast)).not.toContain(seen);
  });

  it.each(['69', 'MW', 'NZ', '0O', 'OD', '1I', '2Z', '5S', 'UV'])('goes both ways between %s, turned or alike', (pair) => {
    const [one, other] = [pair.charAt(0), pair.charAt(1)];
    expect(lookAlikesOf(one)).toContain(other);
    expect(lookAlikesOf(other)).toContain(one);
  });

  it('has nothing for a glyph that is taken for no other', () => {
    expect(lookAlikesOf('J')).toBe('');
    expect([...GLYPHS].some((glyph) => lookAlikesOf(glyph) !== '')).toBe(true);
  });
});
