import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { choiceOfDay, lifeOf, workDay } from '#client/features/ciphers/worked-day.ts';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { dayOf } from '#domain/dates/day.ts';

const KEY = {
  kind: 'digits',
  symbols: { B: '1', L: '2', O: '3', C: '4', K: '5', P: '6', R: '7', I: '8', N: '9', T: '0' },
} as const;
const TEN: CipherDefinition = {
  fields: [
    { field: 'month', symbols: 'key', width: [1, 2] },
    { field: 'day', symbols: 'key', width: [1, 2] },
    { field: 'year', symbols: 'key', width: 2 },
  ],
  symbolSets: { key: KEY },
  usedFrom: '1928-01-01',
  usedTo: '1954-12-31',
};
const TODAY = dayOf(2026, 12, 1);

describe('lifeOf', () => {
  it('is the days in use, up to today where the cipher still is', () => {
    expect(lifeOf(TEN, TODAY)).toEqual({ from: dayOf(1928, 1, 1), to: dayOf(1954, 12, 31) });
    expect(lifeOf({ ...TEN, usedTo: null }, TODAY)?.to).toBe(TODAY);
  });
  it('is nothing before the cipher begins, and for a definition that makes no sense', () => {
    expect(lifeOf({ ...TEN, usedFrom: '2030-01-01', usedTo: null }, TODAY)).toBeNull();
    expect(lifeOf({ ...TEN, symbolSets: {} }, TODAY)).toBeNull();
  });
});

describe('choiceOfDay', () => {
  it('always lies in the cipher’s life', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -200_000, max: 200_000 }),
        fc.integer({ min: -100_000, max: 100_000 }),
        fc.integer({ min: 1, max: 80_000 }),
        (today, from, days) => {
          const day = choiceOfDay(today, { from, to: from + days - 1 });
          return day >= from && day < from + days;
        },
      ),
    );
  });
  it('is the same all day and another the next', () => {
    const life = { from: dayOf(1928, 1, 1), to: dayOf(1954, 12, 31) };
    expect(choiceOfDay(TODAY, life)).toBe(choiceOfDay(TODAY, life));
    expect(choiceOfDay(TODAY + 1, life)).not.toBe(choiceOfDay(TODAY, life));
  });
});

describe('workDay', () => {
  it('writes a day and reads it back', () => {
    const worked = workDay(TEN, dayOf(1939, 7, 25), TODAY);
    expect(worked?.marks).toEqual(['RLKON']);
    expect(worked?.decoding?.candidates.map(({ from, to }) => [from, to])).toEqual([[dayOf(1939, 7, 25), dayOf(1939, 7, 25)]]);
  });
  it('shows the other date that the same mark can mean', () => {
    const worked = workDay(TEN, dayOf(1941, 1, 13), TODAY);
    expect(worked?.marks).toEqual(['BBOCB']);
    expect(worked?.decoding?.candidates.map(({ from }) => from)).toEqual([dayOf(1941, 1, 13), dayOf(1941, 11, 3)]);
  });
  it('reads a cipher without a year back within a year either way', () => {
    const worked = workDay({ ...TEN, fields: TEN.fields.slice(0, 2) }, dayOf(1939, 7, 25), TODAY);
    expect(worked?.decoding?.candidates.map(({ from }) => from)).toContain(dayOf(1939, 7, 25));
  });
  it('has no mark for a day the cipher has no symbols for', () => {
    const noJuly: CipherDefinition = {
      fields: [
        { field: 'month', symbols: 'months', width: 1 },
        { field: 'year', symbols: 'numerals', width: 2 },
      ],
      symbolSets: { months: { kind: 'values', symbols: { A: 1 } } },
      usedFrom: '1928-01-01',
      usedTo: '1954-12-31',
    };
    expect(workDay(noJuly, dayOf(1939, 7, 25), TODAY)).toMatchObject({ marks: [], reading: null, decoding: null });
  });
  it('refuses a day outside the days in use', () => {
    expect(workDay(TEN, dayOf(1927, 12, 31), TODAY)).toBeNull();
  });
});
