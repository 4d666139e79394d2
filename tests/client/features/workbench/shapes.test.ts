// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { BLANK } from '#client/features/workbench/draft-definition.ts';
import { spreadKey, spreadRun } from '#client/features/workbench/key-word.ts';
import { beginFrom, SHAPES } from '#client/features/workbench/shapes.ts';
import { compileCipher } from '#domain/ciphers/compile.ts';
import type { CipherDefinition, SymbolSet } from '#domain/ciphers/definition.ts';
import { write } from '#domain/ciphers/write.ts';
import { dayOf } from '#domain/dates/day.ts';
import { CIPHER_TABLES } from '#fixtures/reference/tables.ts';

const USE = { usedFrom: '1920-01-01', usedTo: '1959-12-31' };

/** The shape with everything filled in that it leaves open. */
function filled(code: string): CipherDefinition {
  const shape = SHAPES.find((one) => one.code === code)!;
  return beginFrom({ ...shape, symbolSets: Object.fromEntries(Object.entries(shape.symbolSets).map(([name, set]) => [name, fill(set)])) }, { ...BLANK, ...USE });
}

function fill(set: SymbolSet): SymbolSet {
  if (Object.keys(set.symbols).length > 0) return set;
  const made = set.kind === 'digits' ? spreadKey('BLOCKPRINT') : spreadRun('ABCDEFGHKLMNPRSTUWXY', 1911);
  if (!made.ok) throw new Error(made.fault);
  return set.kind === 'digits' ? { ...set, symbols: made.value as Readonly<Record<string, string>> } : { ...set, symbols: made.value as Readonly<Record<string, number>> };
}

/** What 25 July 1939 is in each, worked out by hand; it was a Tuesday in ISO week 30 and the 206th day. */
const WRITTEN: Readonly<Record<string, string>> = {
  'ten-letter-key': 'RLKON',
  'letter-months': 'G259',
  'year-letters': 'K07',
  'year-letter-month-sign': 'K7',
  'week-and-year': '3039',
  'year-and-week': '3930',
  'day-of-year': '2069',
  'quarter-and-year': '339',
  'plain-figures': '25-7-39',
  'whole-date': '390725',
  'month-name': 'JUL39',
};

describe('shapes', () => {
  it('are named once each', () => {
    expect(new Set(SHAPES.map(({ code }) => code)).size).toBe(SHAPES.length);
    expect(new Set(SHAPES.map(({ name }) => name)).size).toBe(SHAPES.length);
    expect(Object.keys(WRITTEN).toSorted()).toEqual(SHAPES.map(({ code }) => code).toSorted());
  });
  it.each(Object.entries(WRITTEN))('%s, filled in, writes 25 July 1939 as %s', (code, mark) => {
    const compiled = compileCipher(filled(code));
    if (!compiled.ok) throw new Error(compiled.fault.map(({ message }) => message).join('; '));
    expect(write(dayOf(1939, 7, 25), compiled.value, { asOf: dayOf(1960, 1, 1) }).map(({ text }) => text)).toEqual([mark]);
  });
  // The tables name their sources: IEC 60062, 49 CFR 574.5, EIA-476, GS1 AI (11), MIL-STD-1168.
  it.each([
    ['iec_60062_date_code', 'yearMonth', 'year-letter-month-sign'],
    ['us_tyre_date_code', 'fourSymbols', 'week-and-year'],
    ['us_yww_yyww_codes', 'yearWeek', 'year-and-week'],
    ['gs1_ai11_production_date', 'day', 'whole-date'],
  ])('lay the fields out as %s does', (table, cipher, code) => {
    const definition = CIPHER_TABLES.find(({ name }) => name === table)!.ciphers[cipher]!;
    const layout = ({ fields }: Pick<CipherDefinition, 'fields'>) => fields.map((field) => (field.field === 'literal' ? field : { field: field.field, width: field.width }));
    expect(layout(SHAPES.find((one) => one.code === code)!)).toEqual(layout(definition));
  });
  it('give the months the letters and signs that IEC 60062 and MIL-STD-1168 give them', () => {
    const months = (table: string, cipher: string) => CIPHER_TABLES.find(({ name }) => name === table)!.ciphers[cipher]!.symbolSets['months'];
    const shape = (code: string) => SHAPES.find((one) => one.code === code)!.symbolSets['months'];
    expect(shape('year-letter-month-sign')).toEqual(months('iec_60062_date_code', 'yearMonth'));
    expect(shape('letter-months')).toEqual(months('us_mil_std_1168_lot', 'lot'));
  });
});

describe('beginFrom', () => {
  it('keeps the years in use and drops what hung on the old fields', () => {
    const before: CipherDefinition = { ...filled('ten-letter-key'), yearStart: '05-29', exceptions: [{ fields: { month: 'R' }, from: '1930-01-01', to: '1930-02-01' }] };
    expect(beginFrom(SHAPES.find(({ code }) => code === 'week-and-year')!, before)).toEqual({
      fields: [
        { field: 'week', symbols: 'numerals', width: 2 },
        { field: 'year', symbols: 'numerals', width: 2 },
      ],
      symbolSets: {},
      yearStart: '05-29',
      ...USE,
    });
  });
});
