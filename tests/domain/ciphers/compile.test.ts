import { describe, expect, it } from 'vitest';
import { compileCipher } from '#domain/ciphers/compile.ts';
import type { CipherFault } from '#domain/ciphers/cipher-fault.ts';
import type { CipherDefinition, FieldDefinition, SymbolSet } from '#domain/ciphers/definition.ts';
import { decode } from '#domain/ciphers/decode.ts';
import { dayOf } from '#domain/dates/day.ts';
import { compiled, HES, numbered, parsed, TEN } from './worked-ciphers.ts';

type Place = readonly [code: CipherFault['code'], path: string];

function faultsOf(definition: CipherDefinition): Place[] {
  const result = compileCipher(definition);
  return result.ok ? [] : result.fault.map(({ code, path }): Place => [code, path.join('.')]);
}

function withSet(set: SymbolSet): CipherDefinition {
  return { ...HES, symbolSets: { ...HES.symbolSets, odd: set } };
}

function withFields(...fields: readonly FieldDefinition[]): CipherDefinition {
  return { ...HES, fields };
}

const [MONTH, DAY, YEAR] = HES.fields as readonly [FieldDefinition, FieldDefinition, FieldDefinition];
const NUMERALS = '0123456789';

describe('compileCipher', () => {
  it('takes the worked ciphers', () => {
    expect(faultsOf(TEN)).toEqual([]);
    expect(faultsOf(HES)).toEqual([]);
  });

  it('compares symbols upper-cased and in NFKC', () => {
    const lower = { ...HES, symbolSets: { letters: { kind: 'values' as const, symbols: numbered('abcdefghjklｍ', 1) } } };
    const answer = decode(parsed('M147'), compiled(lower), { asOf: dayOf(2026, 12, 1) });
    expect(answer.candidates.map(({ from }) => from)).toEqual([1927, 1937, 1947, 1957].map((year) => dayOf(year, 12, 14)));
  });

  const REFUSED: readonly (readonly [what: string, definition: CipherDefinition, faults: readonly Place[]])[] = [
    ['a set that is not there', withFields({ ...MONTH, symbols: 'none' } as FieldDefinition, DAY, YEAR), [['unknown-set', 'fields.0.symbols']]],
    ['a set named like a part of every object', withFields({ field: 'year', symbols: 'constructor', width: 1 }), [['unknown-set', 'fields.0.symbols']]],
    [
      'numerals given again',
      { ...HES, symbolSets: { ...HES.symbolSets, numerals: { kind: 'digits', symbols: { A: '1' } } } },
      [['numerals-redefined', 'symbolSets.numerals']],
    ],
    ['one symbol for two digits', withSet({ kind: 'digits', symbols: { a: '1', A: '2' } }), [['same-symbol-twice', 'symbolSets.odd.symbols.A']]],
    ['one symbol for two numbers', withSet({ kind: 'values', symbols: { jan: 1, JAN: 2 } }), [['same-symbol-twice', 'symbolSets.odd.symbols.JAN']]],
    ['two digits for one symbol', withSet({ kind: 'digits', symbols: { A: '12' } }), [['not-a-digit', 'symbolSets.odd.symbols.A']]],
    ['a digit that is none', withSet({ kind: 'digits', symbols: { A: 'B' } }), [['not-a-digit', 'symbolSets.odd.symbols.A']]],
    ['no digit', withSet({ kind: 'digits', symbols: { A: '' } }), [['not-a-digit', 'symbolSets.odd.symbols.A']]],
    ['a symbol of two glyphs for a digit', withSet({ kind: 'digits', symbols: { AB: '1' } }), [['not-a-symbol', 'symbolSets.odd.symbols.AB']]],
    ['a symbol that is no glyph', withSet({ kind: 'values', symbols: { '*': 1 } }), [['not-a-symbol', 'symbolSets.odd.symbols.*']]],
    ['a symbol of nine glyphs', withSet({ kind: 'values', symbols: { ABCDEFGHI: 1 } }), [['not-a-symbol', 'symbolSets.odd.symbols.ABCDEFGHI']]],
    ['a repeater that is a digit', withSet({ kind: 'digits', symbols: { A: '1' }, repeater: 'a' }), [['same-symbol-twice', 'symbolSets.odd.repeater']]],
    ['a repeater of two glyphs', withSet({ kind: 'digits', symbols: { A: '1' }, repeater: 'XX' }), [['not-a-symbol', 'symbolSets.odd.repeater']]],
    ['half a number', withSet({ kind: 'values', symbols: { A: 1.5 } }), [['not-a-value', 'symbolSets.odd.symbols.A']]],
    ['a number below nought', withSet({ kind: 'values', symbols: { A: -1 } }), [['not-a-value', 'symbolSets.odd.symbols.A']]],
    ['no number', withSet({ kind: 'values', symbols: { A: [] } }), [['not-a-value', 'symbolSets.odd.symbols.A']]],
    [
      'more numbers than a symbol may have',
      withSet({ kind: 'values', symbols: { A: Array.from({ length: 65 }, (_, index) => index) } }),
      [['too-many-values', 'symbolSets.odd.symbols.A']],
    ],
    ['a cycle of no years', withSet({ kind: 'values', symbols: { A: 1 }, repeatsEvery: 0 }), [['impossible-cycle', 'symbolSets.odd.repeatsEvery']]],
    [
      'a cycle of months',
      { ...HES, symbolSets: { letters: { kind: 'values', symbols: numbered('ABCDEFGHJKLM', 1), repeatsEvery: 4 } } },
      [['cycle-on-other-field', 'fields.0.symbols']],
    ],
    ['months from 13 on', { ...HES, symbolSets: { letters: { kind: 'values', symbols: numbered('ABC', 13) } } }, [['not-a-value', 'fields.0.symbols']]],
    [
      'digits that the day needs and the set lacks',
      {
        ...withFields(MONTH, { field: 'day', symbols: 'few', width: 2 }, YEAR),
        symbolSets: { ...HES.symbolSets, few: { kind: 'digits', symbols: { A: '0', B: '1', C: '2', D: '3' } } },
      },
      [['missing-digit', 'fields.1.symbols']],
    ],
    ['a width of nought', withFields(MONTH, { field: 'day', symbols: 'numerals', width: 0 }, YEAR), [['impossible-width', 'fields.1.width']]],
    ['a width the wrong way round', withFields(MONTH, { field: 'day', symbols: 'numerals', width: [2, 1] }, YEAR), [['impossible-width', 'fields.1.width']]],
    ['half a width', withFields(MONTH, { field: 'day', symbols: 'numerals', width: 1.5 }, YEAR), [['impossible-width', 'fields.1.width']]],
    ['a width that is no number', withFields(MONTH, { field: 'day', symbols: 'numerals', width: NaN }, YEAR), [['impossible-width', 'fields.1.width']]],
    ['a year of five digits', withFields(MONTH, DAY, { field: 'year', symbols: 'numerals', width: 5 }), [['impossible-width', 'fields.2.width']]],
    ['a day of one digit', withFields(MONTH, { field: 'day', symbols: 'numerals', width: 1 }, YEAR), [['impossible-width', 'fields.1.width']]],
    ['a width that no symbol has', withFields({ field: 'month', symbols: 'letters', width: 3 }, DAY, YEAR), [['impossible-width', 'fields.0.width']]],
    ['two months', withFields(MONTH, MONTH, DAY, YEAR), [['same-field-twice', 'fields.1']]],
    [
      'two details of one name',
      withFields(YEAR, { field: 'other', symbols: 'letters', width: 1 }, { field: 'other', symbols: 'letters', width: 1, name: 'other' }),
      [['same-field-twice', 'fields.2']],
    ],
    ['a detail without a name', withFields(YEAR, { field: 'other', symbols: 'letters', width: 1, name: ' ' }), [['impossible-name', 'fields.1.name']]],
    ['a rule for weeks on a month', withFields({ field: 'month', symbols: 'letters', width: 1, week: 'iso' }, DAY, YEAR), [['misplaced-week-rule', 'fields.0.week']]],
    ['lettering that is no glyph', withFields(YEAR, { field: 'literal', text: 'No?' }), [['impossible-literal', 'fields.1.text']]],
    ['empty lettering', withFields(YEAR, { field: 'literal', text: '' }), [['impossible-literal', 'fields.1.text']]],
    ['lettering beyond all bounds', withFields(YEAR, { field: 'literal', text: 'A'.repeat(100_000) }), [['impossible-literal', 'fields.1.text']]],
    ['no fields', withFields(), [['no-fields', 'fields']]],
    ['no field with a date', withFields({ field: 'other', symbols: 'letters', width: 1 }), [['no-date-field', 'fields']]],
    ['an end before the start', { ...HES, usedFrom: '1958-12-31', usedTo: '1926-01-01' }, [['ends-before-it-starts', 'usedTo']]],
    ['a 30 February', { ...HES, usedFrom: '1926-02-30' }, [['not-a-day', 'usedFrom']]],
    ['a month 13', { ...HES, usedTo: '1958-13-01' }, [['not-a-day', 'usedTo']]],
    ['a year outside the calendar of castings', { ...HES, usedFrom: '1066-10-14' }, [['outside-years', 'usedFrom']]],
    ['a code year from a month 13', { ...HES, yearStart: '13-01' }, [['not-a-day', 'yearStart']]],
    ['a code year from the leap day', { ...HES, yearStart: '02-29' }, [['not-a-day', 'yearStart']]],
    ['a code year without its day', { ...HES, yearStart: '05' }, [['not-a-day', 'yearStart']]],
    [
      'an exception for a field that is not there',
      { ...HES, exceptions: [{ fields: { week: '01' }, from: '1930-01-01', to: '1930-01-02' }] },
      [['exception-names-absent-field', 'exceptions.0.fields.week']],
    ],
    [
      'an exception for a symbol that is not there',
      { ...HES, exceptions: [{ fields: { month: 'Z', day: '123' }, from: '1930-01-01', to: '1930-01-02' }] },
      [
        ['exception-names-absent-symbol', 'exceptions.0.fields.month'],
        ['exception-names-absent-symbol', 'exceptions.0.fields.day'],
      ],
    ],
    ['an exception for nothing', { ...HES, exceptions: [{ fields: {}, from: '1930-01-01', to: '1930-01-02' }] }, [['exception-without-field', 'exceptions.0.fields']]],
    [
      'an exception that ends before it starts',
      { ...HES, exceptions: [{ fields: { month: 'A' }, from: '1930-01-02', to: '1930-01-01' }] },
      [['ends-before-it-starts', 'exceptions.0.to']],
    ],
    [
      'an exception on no day',
      { ...HES, exceptions: [{ fields: { month: 'A' }, from: '1930-04-31', to: 'May' }] },
      [
        ['not-a-day', 'exceptions.0.from'],
        ['not-a-day', 'exceptions.0.to'],
      ],
    ],
    ['more fields than there may be', withFields(...Array.from({ length: 10_000 }, () => MONTH)), [['too-many-fields', 'fields']]],
    [
      'more symbols than there may be',
      withSet({ kind: 'values', symbols: Object.fromEntries(Array.from({ length: 65 }, (_, index) => [`A${index}`, index])) }),
      [['too-many-symbols', 'symbolSets.odd.symbols']],
    ],
    [
      'more sets than there may be',
      { ...HES, symbolSets: Object.fromEntries(Array.from({ length: 25 }, (_, index) => [`set ${index}`, HES.symbolSets['letters']!])) },
      [['too-many-sets', 'symbolSets'], ['unknown-set', 'fields.0.symbols']],
    ],
    [
      'more exceptions than there may be',
      { ...HES, exceptions: Array.from({ length: 201 }, () => ({ fields: { month: 'A' }, from: '1930-01-01', to: '1930-01-02' })) },
      [['too-many-exceptions', 'exceptions']],
    ],
  ];

  it.each(REFUSED)('refuses %s', (_, definition, faults) => {
    expect(faultsOf(definition)).toEqual(faults);
  });

  it('tells all faults at once, and nothing that follows from them only', () => {
    const exceptions = [{ fields: { day: '1' }, from: '1930-01-01', to: '1930-01-02' }];
    const definition = { ...withFields(MONTH, { field: 'day', symbols: 'numerals', width: 9 }, YEAR), usedFrom: '1926', exceptions };
    expect(faultsOf(definition)).toEqual([
      ['not-a-day', 'usedFrom'],
      ['impossible-width', 'fields.1.width'],
    ]);
  });

  it('asks for no digit that the years in use never show', () => {
    const set = { kind: 'digits' as const, symbols: { A: '1', B: '2', C: '3' } };
    const short = { ...HES, fields: [{ field: 'year' as const, symbols: 'few', width: 1 }], symbolSets: { few: set }, usedFrom: '1931-01-01' };
    expect(faultsOf({ ...short, usedTo: '1933-12-31' })).toEqual([]);
    expect(faultsOf({ ...short, usedTo: '1934-01-01' })).toEqual([['missing-digit', 'fields.0.symbols']]);
    expect(faultsOf({ ...short, usedTo: null })).toEqual([['missing-digit', 'fields.0.symbols']]);
  });

  it('lets every field read numerals without a set', () => {
    expect(compiled(withFields(YEAR)).usedGlyphs).toHaveLength(NUMERALS.length);
  });
});
