import { describe, expect, it } from 'vitest';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { MARKS_WRITTEN, write } from '#domain/ciphers/write.ts';
import { dayOf } from '#domain/dates/day.ts';
import { compiled, FEN, HES, TEN } from './worked-ciphers.ts';

const AS_OF = dayOf(2026, 12, 1);

function marksOn(definition: CipherDefinition, year: number, month: number, day: number, most?: number): string[] {
  return write(dayOf(year, month, day), compiled(definition), { asOf: AS_OF, most }).map(({ text }) => text);
}

describe('write', () => {
  it('writes the mark of a day', () => {
    expect(marksOn(TEN, 1939, 7, 25)).toEqual(['RLKON']);
    expect(marksOn(HES, 1947, 3, 14)).toEqual(['C147']);
    expect(marksOn(FEN, 1936, 1, 2)).toEqual(['F01']);
  });

  it('writes nothing on days out of use', () => {
    expect(marksOn(TEN, 1927, 12, 31)).toEqual([]);
    expect(marksOn(TEN, 1955, 1, 1)).toEqual([]);
    expect(marksOn({ ...TEN, usedTo: null }, 2026, 12, 2)).toEqual([]);
  });

  it('writes with the repeater and without', () => {
    const key = { ...TEN.symbolSets['key']!, repeater: 'X' };
    const repeating = { ...TEN, symbolSets: { key } } as CipherDefinition;
    expect(marksOn(repeating, 1944, 11, 5)).toEqual(['BBKCC', 'BBKCX', 'BXKCC', 'BXKCX']);
  });

  it('casts the breaks of its lettering', () => {
    const lettered: CipherDefinition = { ...TEN, fields: [{ field: 'literal', text: 'bw/' }, ...TEN.fields, { field: 'literal', text: '.' }] };
    expect(marksOn(lettered, 1939, 7, 25)).toEqual(['BW/RLKON.']);
  });

  it('writes exceptions on their days, beside the table or in its place', () => {
    const early = { fields: { month: 'C' }, from: '1947-04-01', to: '1947-04-05' };
    const beside: CipherDefinition = { ...HES, exceptions: [{ ...early, replaces: false }] };
    expect(marksOn(beside, 1947, 4, 2)).toEqual(['D27', 'C27']);
    expect(marksOn(beside, 1947, 3, 2)).toEqual(['C27']);
    expect(marksOn({ ...HES, exceptions: [early] }, 1947, 3, 2)).toEqual([]);
    expect(marksOn({ ...HES, exceptions: [early] }, 1947, 4, 6)).toEqual(['D67']);
  });

  it('names the glyphs of each field, and what the others hold', () => {
    const shifts: CipherDefinition = { ...HES, fields: [...HES.fields, { field: 'other', symbols: 'letters', width: 1, name: 'shift' }] };
    const [first] = write(dayOf(1947, 3, 14), compiled(shifts), { asOf: AS_OF });
    expect(first).toEqual({
      text: 'C147A',
      spans: [
        { field: 'month', start: 0, end: 1, text: 'C', value: 3 },
        { field: 'day', start: 1, end: 3, text: '14', value: 14 },
        { field: 'year', start: 3, end: 4, text: '7', value: 1947 },
        { field: 'other', start: 4, end: 5, text: 'A', value: null },
      ],
      details: { shift: 'A' },
    });
  });

  it('gives all date spellings first where other fields make them too many', () => {
    const wide: CipherDefinition = {
      ...TEN,
      fields: [{ field: 'other', symbols: 'numerals', width: [1, 8] }, ...TEN.fields],
      symbolSets: { key: { ...TEN.symbolSets['key']!, repeater: 'X' } as never },
    };
    expect(marksOn(wide, 1944, 11, 5, 5)).toEqual(['0BBKCC', '0BBKCX', '0BXKCC', '0BXKCX', '1BBKCC']);
    expect(marksOn(wide, 1944, 11, 5)).toHaveLength(MARKS_WRITTEN);
  });
});
