import { foldCase, isGlyph } from '#domain/marks/glyphs.ts';
import { fail, succeed } from '#domain/result.ts';
import type { Result } from '#domain/result.ts';
import { sayCount, sayPlace } from '../../lib/say-number.ts';

/** The figures in the order a key word was kept in mind: 1 to 9, then 0. */
export const KEY_ORDER = ['1', '2', '3', '4', '5', '6', '7', '8', '9', '0'] as const;

/**
 * Spreads a key word over the figures 1 to 9 and 0, a letter each; a word that is not yet whole over the first of them. Spaces and hyphens
 * are passed over. Refused, with the reason: a letter that comes twice, a character that is no glyph, more than ten letters.
 */
export function spreadKey(word: string): Result<Readonly<Record<string, string>>, string> {
  const glyphs = distinctGlyphs(word);
  if (!glyphs.ok) return glyphs;
  if (glyphs.value.length > KEY_ORDER.length) {
    return fail(`A key has ten letters, for 1 to 9 and 0; this has ${sayCount(glyphs.value.length)}`);
  }
  return succeed(Object.fromEntries(glyphs.value.map((glyph, place) => [glyph, KEY_ORDER[place] ?? '0'])));
}

/** Spreads letters over whole numbers in their order, from the first: `ABC` from 1911 is A 1911, B 1912, C 1913. Refused as a key word is. */
export function spreadRun(letters: string, first: number): Result<Readonly<Record<string, number>>, string> {
  const glyphs = distinctGlyphs(letters);
  return glyphs.ok ? succeed(Object.fromEntries(glyphs.value.map((glyph, place) => [glyph, first + place]))) : glyphs;
}

function distinctGlyphs(word: string): Result<readonly string[], string> {
  const glyphs = Array.from(foldCase(word).replace(/[\s-]/g, ''));
  for (const [place, glyph] of glyphs.entries()) {
    if (!isGlyph(glyph)) return fail(`“${glyph}” is no letter A to Z and no figure`);
    const before = glyphs.indexOf(glyph);
    if (before < place) return fail(`“${glyph}” comes twice, ${sayPlace(before)} and ${sayPlace(place)}: a letter can stand for one of them only`);
  }
  return succeed(glyphs);
}
