import { describe, expect, it } from 'vitest';
import { decode } from '#domain/ciphers/decode.ts';
import {
  CIPHER_LIMITS,
  type CipherDefinition,
  type CipherException,
  type DatedField,
  type FieldDefinition,
  type SymbolSet,
} from '#domain/ciphers/definition.ts';
import { STEPS_ALLOWED } from '#domain/ciphers/work-out.ts';
import { dayOf } from '#domain/dates/day.ts';
import { GLYPHS } from '#domain/marks/glyphs.ts';
import { compiled, parsed } from './worked-ciphers.ts';

/**
 * The most work a reading of 32 glyphs was found to cause within the limits of a definition. Work is counted in steps, which
 * stand for time on any machine; a count near a million takes some ten milliseconds.
 */

/** Above what is allowed for the candidates: linking the fields, which no limit cuts short. */
const MOST_STEPS = STEPS_ALLOWED + 300_000;

const ANY_SYMBOL: SymbolSet = { kind: 'digits', symbols: Object.fromEntries([...GLYPHS].map((glyph, index) => [glyph, String(index % 10)])) };
const LIFE = { usedFrom: `${CIPHER_LIMITS.earliestYear}-01-01`, usedTo: `${CIPHER_LIMITS.latestYear}-12-31` };

const YEAR: DatedField = { field: 'year', symbols: 'any', width: 4 };
const ANY_YEAR: DatedField = { field: 'year', symbols: 'any', width: [1, 4] };
const MONTH: DatedField = { field: 'month', symbols: 'any', width: [1, 2] };
const DAY: DatedField = { field: 'day', symbols: 'any', width: [1, 2] };
const WEEK: DatedField = { field: 'week', symbols: 'any', width: [1, 2] };
const QUARTER: DatedField = { field: 'quarter', symbols: 'any', width: 1 };
const ORDINAL: DatedField = { field: 'dayOfYear', symbols: 'any', width: [1, 3] };

function other(name: string): FieldDefinition {
  return { field: 'other', symbols: 'any', name, width: [1, CIPHER_LIMITS.fieldWidth] };
}

function cipher(fields: readonly FieldDefinition[], exceptions: readonly CipherException[] = []): CipherDefinition {
  return { fields, symbolSets: { any: ANY_SYMBOL }, ...LIFE, exceptions };
}

/** Sixty-four symbols, each for many numbers of a range. */
function manyValued(least: number, greatest: number, each: number, repeatsEvery?: number): SymbolSet {
  const symbols = Array.from({ length: CIPHER_LIMITS.symbolsPerSet }, (_, index): [string, number[]] => [
    GLYPHS.charAt(index % 36) + (index < 36 ? '' : GLYPHS.charAt((index * 7) % 36)),
    Array.from({ length: each }, (__, step) => least + ((index * 5 + step * 3) % (greatest - least + 1))),
  ]);
  return { kind: 'values', symbols: Object.fromEntries(symbols), ...(repeatsEvery === undefined ? {} : { repeatsEvery }) };
}

function listed(years: SymbolSet): CipherDefinition {
  return {
    fields: [
      { field: 'year', symbols: 'years', width: [1, 2] },
      { field: 'month', symbols: 'months', width: [1, 2] },
      { field: 'day', symbols: 'days', width: [1, 2] },
    ],
    symbolSets: { years, months: manyValued(1, 12, 4), days: manyValued(1, 31, 16) },
    ...LIFE,
  };
}

function exceptions(fieldsOf: (index: number) => CipherException['fields']): readonly CipherException[] {
  return Array.from({ length: CIPHER_LIMITS.exceptions }, (_, index) => ({
    fields: fieldsOf(index),
    from: LIFE.usedFrom,
    to: LIFE.usedTo,
    replaces: index % 2 === 0,
  }));
}

function pair(index: number): string {
  return GLYPHS.charAt(index % 36) + GLYPHS.charAt((index * 5) % 36);
}

const FLEXIBLE = [other('a'), DAY, other('b'), MONTH, other('c'), YEAR, other('d')];
const EVERYTHING = [other('a'), DAY, other('b'), MONTH, WEEK, ORDINAL, QUARTER, other('c'), ANY_YEAR, other('d'), other('e'), other('f')];
const UNREAD = '?'.repeat(32);
const UNREAD_AND_BROKEN = `${'?'.repeat(15)}*${'?'.repeat(16)}`;
const HALF_READ = Array.from({ length: 32 }, (_, place) => `[${[...GLYPHS].filter((__, index) => (place * 7 + index * 3) % 5 < 2).join('')}]`).join('');

const WORST: readonly (readonly [what: string, definition: CipherDefinition, mark: string])[] = [
  ['every day of seven centuries', cipher([DAY, MONTH, YEAR]), '??????'],
  ['the same, of any length', cipher([DAY, MONTH, ANY_YEAR]), '*'],
  ['every ordinal day', cipher([ANY_YEAR, ORDINAL]), '?????*'],
  ['fields anywhere in an unread mark', cipher(FLEXIBLE), UNREAD],
  ['fields anywhere in a broken mark', cipher(FLEXIBLE), UNREAD_AND_BROKEN],
  ['twelve fields, unread', cipher(EVERYTHING), UNREAD],
  ['twelve fields, broken', cipher(EVERYTHING), UNREAD_AND_BROKEN],
  ['a dozen alternatives for each glyph', cipher(FLEXIBLE), HALF_READ],
  ['a mark of figures only', cipher(FLEXIBLE), '1'.repeat(32)],
  ['symbols with many numbers', listed(manyValued(1500, 2199, 64)), '*'],
  ['symbols with many numbers on a cycle', listed(manyValued(1500, 2199, 64, 2)), '?????*'],
  ['exceptions for every other text', cipher([other('other'), DAY, MONTH, YEAR], exceptions((index) => ({ other: pair(index) }))), '??????????*'],
  [
    'exceptions for years and days',
    cipher([other('other'), DAY, MONTH, YEAR], exceptions((index) => ({ year: String(1500 + index * 3), day: String(1 + (index % 28)) }))),
    '??????????*',
  ],
];

describe('the worst readings', () => {
  it.each(WORST)('does no more work than allowed for %s', { timeout: 60_000 }, (_, definition, mark) => {
    const reading = parsed(mark);
    const ready = compiled(definition);
    const asOf = dayOf(2026, 12, 1);
    for (const lookAlikes of [false, true]) {
      const answer = decode(reading, ready, { asOf, lookAlikes });
      expect(answer.steps).toBeLessThanOrEqual(MOST_STEPS);
      expect(answer.candidates.length).toBeLessThanOrEqual(200);
      if (answer.status === 'none') expect(answer.reasons.length).toBeGreaterThan(0);
    }
  });

  it('still lists every day of two centuries from an unread mark', { timeout: 60_000 }, () => {
    const fixed = cipher([{ ...DAY, width: 2 }, { ...MONTH, width: 2 }, YEAR]);
    const answer = decode(parsed('????????'), compiled({ ...fixed, usedFrom: '1800-01-01', usedTo: '1999-12-31' }), { asOf: 0 });
    expect(answer.total).toBe(dayOf(2000, 1, 1) - dayOf(1800, 1, 1));
    expect(answer.steps).toBeLessThanOrEqual(1_000_000);
  });
});
