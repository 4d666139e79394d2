import { fail, succeed, type Result } from '../result.ts';
import { foldCase, isGlyph } from './glyphs.ts';

/** A reading as parsed from the mark notation. */
export type Glyph =
  | { readonly kind: 'sure'; readonly glyph: string }
  | { readonly kind: 'oneOf'; readonly glyphs: readonly string[] }
  | { readonly kind: 'unread' }
  | { readonly kind: 'run' };

export type Reading = {
  readonly glyphs: readonly Glyph[];
  /** Places where a field must end: a break after n glyphs is n; ascending, each strictly inside the mark. */
  readonly breaks: readonly number[];
};

/** Limits of the notation: glyphs of one reading (a `*` counts as one), and characters looked at before it is refused. */
export const NOTATION = { glyphs: 32, characters: 2_000, runs: 1 } as const;

/** Characters that stand for a break. */
export const BREAK_CHARACTERS = ' -./';

export const READING_FAULTS = [
  'empty',
  'too-long',
  'not-a-glyph',
  'two-stars',
  'empty-bracket',
  'open-bracket',
  'stray-bracket',
  'range-in-bracket',
] as const;

export type ReadingFault = {
  readonly code: (typeof READING_FAULTS)[number];
  /** Index of the character in the text as typed, in UTF-16 units. */
  readonly at: number;
  /** The character there; empty at the end of the text. */
  readonly character: string;
  readonly message: string;
};

/**
 * Reads the mark notation.
 *
 * | written | means |
 * | --- | --- |
 * | `A`…`Z` `0`…`9`, any case or width | this glyph |
 * | `?` | a glyph that can't be read |
 * | `[OD]` | one of these: a POSIX bracket expression without ranges; a glyph named twice counts once, one alternative is a sure glyph |
 * | `*` | any number of glyphs broken away, none included; once at most |
 * | space `-` `.` `/` | a break; several in a row are one, and those at either end of the mark say nothing |
 *
 * @example parseReading('b?[od]-7') // B, unread, O or D, a break after 3, 7
 */
export function parseReading(text: string): Result<Reading, ReadingFault> {
  if (text.length > NOTATION.characters) {
    return fail(fault('too-long', NOTATION.characters, '', `a reading has at most ${String(NOTATION.glyphs)} glyphs`));
  }
  const glyphs: Glyph[] = [];
  const breaks: number[] = [];
  let bracket: { readonly at: number; readonly alternatives: Set<string> } | null = null;
  let at = 0;

  for (const character of text) {
    for (const folded of foldCase(character)) {
      if (bracket !== null) {
        if (folded === ']') {
          if (bracket.alternatives.size === 0) {
            return fail(fault('empty-bracket', at, character, 'the bracket names no glyph'));
          }
          glyphs.push(oneOf([...bracket.alternatives]));
          bracket = null;
        } else if (isGlyph(folded)) {
          bracket.alternatives.add(folded);
        } else if (folded === '-') {
          return fail(fault('range-in-bracket', at, character, 'a bracket lists its glyphs one by one, without ranges'));
        } else {
          return fail(fault('not-a-glyph', at, character, `${quoted(character)} can't stand in a bracket: only A–Z and 0–9 can`));
        }
      } else if (BREAK_CHARACTERS.includes(folded)) {
        if (glyphs.length > 0 && breaks.at(-1) !== glyphs.length) breaks.push(glyphs.length);
      } else {
        if (glyphs.length === NOTATION.glyphs) {
          return fail(fault('too-long', at, character, `a reading has at most ${String(NOTATION.glyphs)} glyphs`));
        }
        if (isGlyph(folded)) glyphs.push({ kind: 'sure', glyph: folded });
        else if (folded === '?') glyphs.push({ kind: 'unread' });
        else if (folded === '[') bracket = { at, alternatives: new Set() };
        else if (folded === ']') return fail(fault('stray-bracket', at, character, 'this bracket was never opened'));
        else if (folded !== '*') {
          return fail(fault('not-a-glyph', at, character, `${quoted(character)} is no glyph: a mark holds A–Z and 0–9`));
        } else if (glyphs.some((glyph) => glyph.kind === 'run')) {
          return fail(fault('two-stars', at, character, 'a reading can hold one * only'));
        } else glyphs.push({ kind: 'run' });
      }
    }
    at += character.length;
  }

  if (bracket !== null) return fail(fault('open-bracket', bracket.at, '[', 'this bracket is never closed'));
  if (glyphs.length === 0) return fail(fault('empty', 0, '', 'the reading holds no glyph'));
  if (breaks.at(-1) === glyphs.length) breaks.pop();
  return succeed({ glyphs, breaks });
}

/** The reading in the mark notation, breaks as `-`; `parseReading` undoes it. */
export function writeReading(reading: Reading): string {
  const breaks = new Set(reading.breaks);
  return reading.glyphs.map((glyph, index) => (breaks.has(index) ? '-' : '') + writeGlyph(glyph)).join('');
}

/** One glyph in the mark notation. */
export function writeGlyph(glyph: Glyph): string {
  switch (glyph.kind) {
    case 'sure':
      return glyph.glyph;
    case 'oneOf':
      return `[${glyph.glyphs.join('')}]`;
    case 'unread':
      return '?';
    case 'run':
      return '*';
  }
}

function oneOf(alternatives: readonly string[]): Glyph {
  const [only, second] = alternatives;
  return only !== undefined && second === undefined ? { kind: 'sure', glyph: only } : { kind: 'oneOf', glyphs: alternatives };
}

function fault(code: ReadingFault['code'], at: number, character: string, message: string): ReadingFault {
  return { code, at, character, message: character === '' ? message : `${message} (character ${String(at + 1)})` };
}

function quoted(character: string): string {
  return `“${character}”`;
}
