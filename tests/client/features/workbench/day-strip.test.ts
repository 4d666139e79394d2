// @vitest-environment node
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { divisionOf, firstDay, limitsAround, stepped, STEPS, stripOf } from '#client/features/workbench/day-strip.ts';
import { decodeUnderDraft } from '#client/features/workbench/draft-decoding.ts';
import { compileCipher } from '#domain/ciphers/compile.ts';
import type { CompiledCipher } from '#domain/ciphers/compiled-cipher.ts';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { civilOf, dayOf, writeDay } from '#domain/dates/day.ts';
import { parseReading } from '#domain/marks/reading.ts';
import { TEN } from './samples.ts';

const TODAY = dayOf(2026, 12, 1);

function compiled(definition: CipherDefinition): CompiledCipher {
  const result = compileCipher(definition);
  if (!result.ok) throw new Error(result.fault.map(({ message }) => message).join('; '));
  return result.value;
}

const ten = compiled(TEN);
const yearless = compiled({ ...TEN, fields: TEN.fields.slice(0, 2) });

describe('the strip', () => {
  it('writes a day and its neighbours on both sides', () => {
    const strip = stripOf(ten, dayOf(1939, 7, 25), 1, TODAY);
    expect(strip.map(({ from, to, marks }) => [from - dayOf(1939, 7, 25), to - from, marks.map(({ text }) => text)])).toEqual([
      [-1, 0, ['RLCON']],
      [0, 0, ['RLKON']],
      [1, 0, ['RLPON']],
    ]);
  });
  it('leaves days outside the cipher’s use without a mark', () => {
    expect(stripOf(ten, dayOf(1928, 1, 1), 1, TODAY).map(({ marks }) => marks.length)).toEqual([0, 1, 1]);
  });
  // A53 of the worked examples: no other year with this letter has a week 53.
  it('runs days together that carry the same mark', () => {
    const weeks = compiled({
      fields: [
        { field: 'year', symbols: 'years', width: 1 },
        { field: 'week', symbols: 'numerals', width: 2 },
      ],
      symbolSets: { years: { kind: 'values', symbols: { Y: 1930, A: 1931, B: 1932 } } },
      usedFrom: '1930-01-01',
      usedTo: '1932-12-31',
    });
    expect(stripOf(weeks, dayOf(1931, 12, 31), 1, TODAY).map(({ from, to, marks }) => [writeDay(from), writeDay(to), marks[0]?.text])).toEqual([
      ['1931-12-21', '1931-12-27', 'A52'],
      ['1931-12-28', '1932-01-03', 'A53'],
      ['1932-01-04', '1932-01-10', 'B01'],
    ]);
  });
  it('names the groups of a mark under its glyphs', () => {
    const [written] = stripOf(ten, dayOf(1939, 7, 25), 0, TODAY);
    expect(divisionOf(written!.marks[0]!).groups).toEqual([
      { field: 'month', start: 0, end: 1, value: '7' },
      { field: 'day', start: 1, end: 3, value: '25' },
      { field: 'year', start: 3, end: 5, value: '1939' },
    ]);
  });
  it('begins inside the days in use, or not at all before there are any', () => {
    expect(firstDay(ten, TODAY)).toBe(dayOf(1941, 7, 1));
    expect(firstDay(compiled({ ...TEN, usedFrom: '2030-01-01', usedTo: null }), TODAY)).toBeNull();
  });
});

describe('stepped', () => {
  it.each([
    [[1939, 1, 31], 'month', 1, [1939, 2, 28]],
    [[1940, 1, 31], 'month', 1, [1940, 2, 29]],
    [[1940, 2, 29], 'year', 1, [1941, 2, 28]],
    [[1940, 2, 29], 'year', -1, [1939, 2, 28]],
    [[1939, 12, 15], 'month', 1, [1940, 1, 15]],
    [[1939, 1, 15], 'month', -1, [1938, 12, 15]],
    [[1939, 12, 31], 'day', 1, [1940, 1, 1]],
  ] as const)('%j by a %s, %i, is %j', ([year, month, day], step, by, [toYear, toMonth, toDay]) => {
    expect(civilOf(stepped(dayOf(year, month, day), step, by))).toEqual({ year: toYear, month: toMonth, day: toDay });
  });
  it('always goes the way it is asked to', () => {
    fc.assert(
      fc.property(fc.integer({ min: -170_000, max: 80_000 }), fc.constantFrom(...STEPS), (day, step) => {
        expect(stepped(day, step, 1)).toBeGreaterThan(day);
        expect(stepped(day, step, -1)).toBeLessThan(day);
      }),
    );
  });
});

describe('a mark under the draft', () => {
  const read = (text: string, cipher = ten) => {
    const reading = parseReading(text);
    if (!reading.ok) throw new Error(reading.fault.message);
    return decodeUnderDraft(reading.value, cipher, { asOf: TODAY, ...limitsAround(cipher, dayOf(1939, 7, 25)) });
  };
  // The worked examples of the specification.
  it.each([
    ['RLKON', 'dated', ['1939-07-25']],
    ['BBOCB', 'several', ['1941-01-13', '1941-11-03']],
    ['TKKOI', 'none', []],
  ] as const)('%s is %s', (mark, status, dates) => {
    const { answer, result } = read(mark);
    expect(result.status).toBe(status);
    expect(result.candidates.map(({ from }) => from)).toEqual(dates);
    expect(answer.matchedCiphers).toBe(dates.length === 0 ? 0 : 1);
  });
  it('carries the glyphs as they were read', () => {
    expect(read('B?[OC]-K*').answer.glyphs.map(({ kind, glyphs }) => [kind, glyphs.join('')])).toEqual([
      ['sure', 'B'],
      ['unread', ''],
      ['oneOf', 'OC'],
      ['sure', 'K'],
      ['run', ''],
    ]);
  });
  it('is looked for about the day in hand where the draft doesn’t tell the year', () => {
    expect(read('RLK', yearless).result.candidates.map(({ from }) => from)).toEqual(['1938-07-25', '1939-07-25', '1940-07-25']);
    expect(limitsAround(ten, dayOf(1939, 7, 25))).toEqual({});
  });
});
