import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { parseCountRange, parseDateRange, parseNumberRange, writeRange, type DateRange, type NumberRange } from '#db/ranges.ts';
import { useDatabase } from '#tests/support/database.ts';

describe('ranges as PostgreSQL writes them', () => {
  test.each([
    ['[1001,1391)', { from: '1001', to: '1390' }],
    ['[1,)', { from: '1', to: null }],
    ['(,)', { from: null, to: null }],
    ['[9223372036854775806,9223372036854775807)', { from: '9223372036854775806', to: '9223372036854775806' }],
    ['empty', null],
  ])('numbers %s', (text, range) => expect(parseNumberRange(text)).toEqual(range));

  test.each([
    ['[1938-07-01,1944-04-01)', { from: '1938-07-01', to: '1944-03-31' }],
    ['[1940-02-29,1940-03-01)', { from: '1940-02-29', to: '1940-02-29' }],
    ['(,1929-01-01)', { from: null, to: '1928-12-31' }],
    ['empty', null],
  ])('days %s', (text, range) => expect(parseDateRange(text)).toEqual(range));

  test.each([
    ['[0,366)', { from: 0, to: 365 }],
    ['[7,)', { from: 7, to: null }],
  ])('days of lead %s', (text, range) => expect(parseCountRange(text)).toEqual(range));

  test.each(['', '[1,2]', '1,2', '[1938-07-01]', '[1,2,3)'])('no range: "%s"', (text) => {
    expect(() => parseNumberRange(text)).toThrow(RangeError);
  });

  test('no such day', () => expect(() => parseDateRange('[1938-07-01,1938-02-30)')).toThrow(RangeError));

  test('no range at all is written as none', () => expect(writeRange(null)).toBeNull());
});

/** PostgreSQL itself is the second opinion: what was written comes back as it was. */
describe('ranges there and back', () => {
  const database = useDatabase();
  const ends = <End>(end: fc.Arbitrary<End>, inOrder: (from: End, to: End) => boolean) =>
    fc
      .record({ from: fc.option(end), to: fc.option(end) })
      .filter(({ from, to }) => from === null || to === null || inOrder(from, to));

  test('numbers', async () => {
    const numbers = ends(fc.bigInt(0n, 2n ** 63n - 2n), (from, to) => from <= to);
    await fc.assert(
      fc.asyncProperty(numbers, async ({ from, to }) => {
        const range: NumberRange = { from: from?.toString() ?? null, to: to?.toString() ?? null };
        expect(await thereAndBack('int8range', range)).toEqual(range);
      }),
      { numRuns: 50 },
    );
  });

  test('days', async () => {
    const day = fc.date({ min: new Date('1500-01-01'), max: new Date('2199-12-31'), noInvalidDate: true });
    const days = ends(
      day.map((date) => date.toISOString().slice(0, 10)),
      (from, to) => from <= to,
    );
    await fc.assert(
      fc.asyncProperty(days, async (range: DateRange) => {
        expect(await thereAndBack('daterange', range)).toEqual(range);
      }),
      { numRuns: 50 },
    );
  });

  async function thereAndBack(type: string, range: NumberRange | DateRange): Promise<unknown> {
    const { rows } = await database.knex.raw<{ rows: { range: unknown }[] }>('select cast(? as ??) as range', [
      writeRange(range),
      type,
    ]);
    return rows[0]?.range;
  }
});
