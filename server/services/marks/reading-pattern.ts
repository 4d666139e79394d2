import type { Knex } from 'knex';
import type { Glyph, Reading } from '#domain/marks/reading.ts';
import { numberPattern } from '#server/services/number-pattern.ts';

/** Whatever stands for one glyph in a reading on record, breaks left out: a glyph, `?`, or alternatives. */
const ANY = String.raw`(?:[A-Z0-9?]|\[[A-Z0-9]+\])`;
/** A reading that spells what it says holds none but these. */
const UNSURE = '[^A-Z0-9]';

/**
 * Of a query of marks, those whose reading may say the same as this one, glyphs that were not read counted in on both sides: a stored `4?06` is
 * found by `4406`, and `4?06` finds a stored `44[06]6`.
 *
 * Readings that spell what they say are found by the trigram index where three sure glyphs stand in a row. Those with unread glyphs are few, have an
 * index of their own, and are tried one by one.
 */
export function whereMaySay(query: Knex.QueryBuilder, reading: Reading): void {
  void query.where((any) => {
    void any.where((plain) => void plain.where('marks.readingKey', '~', numberPattern(reading)).where('marks.readingKey', '!~', UNSURE));
    void any.orWhere((unsure) => {
      void unsure.where('marks.readingKey', '~', UNSURE).where('marks.readingKey', '~', unsurePattern(reading));
      // Without a run on either side both have as many glyphs; a run on record stands for what the others leave of this one.
      if (!reading.glyphs.some(({ kind }) => kind === 'run')) {
        void unsure.whereRaw(String.raw`char_length(regexp_replace(replace(marks.reading_key, '*', ''), '\[[A-Z0-9]+\]', '-', 'g')) <= ?`, [reading.glyphs.length]);
      }
    });
  });
}

/**
 * A reading as a POSIX pattern over readings on record as they are written, breaks left out. Where what is on record has a `*`, the glyphs before it
 * must agree with the beginning of this one as far as both go, and those after it with its end.
 */
function unsurePattern({ glyphs }: Reading): string {
  const run = glyphs.findIndex(({ kind }) => kind === 'run');
  const before = (run === -1 ? glyphs : glyphs.slice(0, run)).map(saying);
  const after = (run === -1 ? glyphs : glyphs.slice(run + 1)).map(saying);
  const between = run === -1 ? '' : `${ANY}*`;
  const whole = run === -1 ? before.join('') : [...before, between, ...after].join('');
  return `^(?:${whole}|${upTo(before, between)}\\*${from(after, between)})$`;
}

/** Some of these from the first on, and once all, the rest as well. */
function upTo(parts: readonly string[], rest: string): string {
  return parts.reduceRight((inner, part) => `(?:${part}${inner})?`, rest);
}

/** Some of these up to the last, and once all, the rest before them as well. */
function from(parts: readonly string[], rest: string): string {
  return parts.reduce((inner, part) => `(?:${inner}${part})?`, rest);
}

/** What may be written on record where this glyph is meant. */
function saying(glyph: Glyph): string {
  switch (glyph.kind) {
    case 'sure':
      return sayingOneOf([glyph.glyph]);
    case 'oneOf':
      return sayingOneOf(glyph.glyphs);
    case 'unread':
    case 'run':
      return ANY;
  }
}

function sayingOneOf(glyphs: readonly string[]): string {
  const named = `[${glyphs.join('')}]`;
  return String.raw`(?:${named}|\?|\[[A-Z0-9]*${named}[A-Z0-9]*\])`;
}
