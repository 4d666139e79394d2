import { describe, expect, it } from 'vitest';
import {
  fieldRemarks,
  keyOf,
  sayField,
  sayWidth,
  sayYearStart,
  symbolLines,
  widthOf,
} from '#client/features/ciphers/cipher-words.ts';
import type { DigitsSet, ValuesSet } from '#domain/ciphers/definition.ts';

const BLOCKPRINT: DigitsSet = {
  kind: 'digits',
  symbols: { T: '0', B: '1', L: '2', O: '3', C: '4', K: '5', P: '6', R: '7', I: '8', N: '9' },
};
const USED = { from: '1911-01-01', to: '1962-12-31' };

describe('widths', () => {
  it.each([
    [1, 'one glyph'],
    [2, 'two glyphs'],
    [[1, 2] as const, 'one or two glyphs'],
    [[0, 1] as const, 'none or one glyph'],
    [[1, 4] as const, 'one to four glyphs'],
  ])('%j', (width, said) => {
    expect(sayWidth({ field: 'month', symbols: 'key', width })).toBe(said);
  });
  it('counts only the glyphs of a literal', () => {
    expect(widthOf({ field: 'literal', text: 'S-' })).toEqual({ least: 1, most: 1 });
  });
});

describe('sayField', () => {
  it('calls a detail by its own name where it has one', () => {
    expect(sayField({ field: 'other', symbols: 'shifts', width: 1, name: 'shift' })).toBe('shift');
    expect(sayField({ field: 'other', symbols: 'shifts', width: 1 })).toBe('other');
    expect(sayField({ field: 'dayOfYear', symbols: 'numerals', width: 3 })).toBe('day of the year');
  });
});

describe('fieldRemarks', () => {
  const sets = { key: BLOCKPRINT, months: { kind: 'values', symbols: { A: 1 } } as const };
  it.each([
    [{ field: 'month', symbols: 'key', width: [1, 2] } as const, ['no nought in front']],
    [{ field: 'day', symbols: 'numerals', width: 2 } as const, ['noughts in front fill it up']],
    [{ field: 'year', symbols: 'numerals', width: 1 } as const, ['the last figure of the year']],
    [{ field: 'month', symbols: 'months', width: 1 } as const, []],
    [{ field: 'other', symbols: 'months', width: 1 } as const, ['says nothing about the date']],
  ])('%j', (field, remarks) => {
    expect(fieldRemarks(field, sets)).toEqual(remarks);
  });
  it('says how weeks are counted, ISO 8601 where nothing else is said', () => {
    expect(fieldRemarks({ field: 'week', symbols: 'numerals', width: 2 }, sets).at(-1)).toMatch(/ISO 8601/);
    expect(fieldRemarks({ field: 'week', symbols: 'numerals', width: 2, week: 'simple' }, sets).at(-1)).toMatch(/days 1 to 7/);
  });
});

describe('keyOf', () => {
  it('reads the key word off its digits', () => {
    expect(keyOf(BLOCKPRINT)).toBe('BLOCKPRINT');
  });
  it('finds none where a digit has two symbols, has none, or the set is of values', () => {
    expect(keyOf({ kind: 'digits', symbols: { ...BLOCKPRINT.symbols, X: '1' } })).toBeNull();
    expect(keyOf({ kind: 'digits', symbols: { A: '1' } })).toBeNull();
    expect(keyOf({ kind: 'values', symbols: { A: 1 } })).toBeNull();
  });
});

describe('symbolLines', () => {
  it('puts figures from 1 to 9, then 0, then the repeater', () => {
    const lines = symbolLines({ ...BLOCKPRINT, repeater: 'X' }, 'month', USED, '2026-12-01');
    expect(lines.map(({ symbol }) => symbol).join('')).toBe('BLOCKPRINTX');
    expect(lines.at(-1)?.means).toBe('the figure before it again');
  });
  it('names months and quarters', () => {
    expect(
      symbolLines({ kind: 'values', symbols: { A: 1, M: 12 } }, 'month', USED, '2026-12-01').map(({ means }) => means),
    ).toEqual(['January', 'December']);
    expect(symbolLines({ kind: 'values', symbols: { P: 1 } }, 'quarter', USED, '2026-12-01')[0]?.means).toBe('January to March');
  });
  it('spells out a cycle of years over the cipher’s life and no further', () => {
    const years: ValuesSet = { kind: 'values', symbols: { A: 1911, Y: 1930 }, repeatsEvery: 20 };
    expect(symbolLines(years, 'year', USED, '2026-12-01').map(({ means }) => means)).toEqual(['1911, 1931, 1951', '1930, 1950']);
    expect(symbolLines(years, 'year', { from: '1931-01-01', to: null }, '1972-06-01').map(({ means }) => means)).toEqual([
      '1931, 1951, 1971',
      '1950, 1970',
    ]);
    expect(symbolLines(years, 'year', { from: '1915-01-01', to: '1916-01-01' }, '2026-12-01')[0]?.means).toBe('no year in use');
  });
  it('says all that a symbol may stand for', () => {
    expect(symbolLines({ kind: 'values', symbols: { J: [1, 6, 7] } }, 'month', USED, '2026-12-01')[0]?.means).toBe(
      'January or June or July',
    );
  });
});

it('says when code years begin', () => {
  expect(sayYearStart('05-29')).toBe('29 May');
});
