import type { Glyph, Reading } from '#domain/marks/reading.ts';

/**
 * Whether a mark that was read so can say the text, letters and digits alone: breaks don't matter, as numbers are compared without.
 *
 * @example canBe(B4?06, 'B4406') //=> true
 */
export function canBe({ glyphs }: Reading, text: string): boolean {
  const run = glyphs.findIndex(({ kind }) => kind === 'run');
  const before = run === -1 ? glyphs : glyphs.slice(0, run);
  const after = run === -1 ? [] : glyphs.slice(run + 1);
  const fits = run === -1 ? text.length === before.length : text.length >= before.length + after.length;
  return fits && sayAt(before, text, 0) && sayAt(after, text, text.length - after.length);
}

/** Whether every glyph was read for certain. */
export function isPlain({ glyphs }: Reading): boolean {
  return glyphs.every(({ kind }) => kind === 'sure');
}

function sayAt(glyphs: readonly Glyph[], text: string, start: number): boolean {
  return glyphs.every((glyph, place) => glyphCanBe(glyph, text.charAt(start + place)));
}

function glyphCanBe(glyph: Glyph, character: string): boolean {
  switch (glyph.kind) {
    case 'sure':
      return glyph.glyph === character;
    case 'oneOf':
      return glyph.glyphs.includes(character);
    case 'unread':
    case 'run':
      return true;
  }
}
