import type { CipherDefinition, FieldDefinition, SymbolSet } from '#domain/ciphers/definition.ts';

/**
 * Layouts that many makers used, to begin from. Letters are given only where nearly everybody had the same; the rest is left to be
 * filled in, so that nothing is put forward that no source said.
 */
export type Shape = {
  readonly code: string;
  readonly name: string;
  /** What it is, and what is left to fill in. */
  readonly about: string;
  readonly fields: readonly FieldDefinition[];
  readonly symbolSets: CipherDefinition['symbolSets'];
};

const NO_KEY: SymbolSet = { kind: 'digits', symbols: {} };
/** A to M without I, which is taken for 1 (common practice, no source). */
const MONTH_LETTERS: SymbolSet = {
  kind: 'values',
  symbols: { A: 1, B: 2, C: 3, D: 4, E: 5, F: 6, G: 7, H: 8, J: 9, K: 10, L: 11, M: 12 },
};
/** 1 to 9, then the first letters of the last three months (IEC 60062, date of manufacture in two characters). */
const MONTH_SIGNS: SymbolSet = {
  kind: 'values',
  symbols: { 1: 1, 2: 2, 3: 3, 4: 4, 5: 5, 6: 6, 7: 7, 8: 8, 9: 9, O: 10, N: 11, D: 12 },
};
const MONTH_NAMES: SymbolSet = {
  kind: 'values',
  symbols: { JAN: 1, FEB: 2, MAR: 3, APR: 4, MAY: 5, JUN: 6, JUL: 7, AUG: 8, SEP: 9, OCT: 10, NOV: 11, DEC: 12 },
};
const CYCLE_OF_TWENTY: SymbolSet = { kind: 'values', symbols: {}, repeatsEvery: 20 };

const figures = (field: 'year' | 'month' | 'day' | 'week' | 'quarter' | 'dayOfYear', width: 1 | 2 | 3 | readonly [1, 2]): FieldDefinition => ({
  field,
  symbols: 'numerals',
  width,
});
const GAP: FieldDefinition = { field: 'literal', text: '-' };

export const SHAPES: readonly Shape[] = [
  {
    code: 'ten-letter-key',
    name: 'Ten-letter key',
    about: 'Month, day and year in letters of a key word. Type the word below.',
    fields: [
      { field: 'month', symbols: 'key', width: [1, 2] },
      { field: 'day', symbols: 'key', width: [1, 2] },
      { field: 'year', symbols: 'key', width: 2 },
    ],
    symbolSets: { key: NO_KEY },
  },
  {
    code: 'letter-months',
    name: 'Letter months',
    about: 'A letter for the month, A to M without I; the day in figures; the last figure of the year.',
    fields: [{ field: 'month', symbols: 'months', width: 1 }, figures('day', [1, 2]), figures('year', 1)],
    symbolSets: { months: MONTH_LETTERS },
  },
  {
    code: 'year-letters',
    name: 'Year letters on a cycle',
    about: 'A letter for the year that comes round, then the month in figures. Type the letters in order, and the year the first stands for.',
    fields: [{ field: 'year', symbols: 'years', width: 1 }, figures('month', 2)],
    symbolSets: { years: CYCLE_OF_TWENTY },
  },
  {
    code: 'year-letter-month-sign',
    name: 'Year letter, month sign',
    about: 'A letter for the year that comes round, then 1 to 9, O, N, D for the month (as IEC 60062 has it). Type the year letters.',
    fields: [
      { field: 'year', symbols: 'years', width: 1 },
      { field: 'month', symbols: 'months', width: 1 },
    ],
    symbolSets: { years: CYCLE_OF_TWENTY, months: MONTH_SIGNS },
  },
  {
    code: 'week-and-year',
    name: 'Week and year',
    about: 'Two figures for the week, two for the year. Say how the weeks are numbered.',
    fields: [figures('week', 2), figures('year', 2)],
    symbolSets: {},
  },
  {
    code: 'year-and-week',
    name: 'Year and week',
    about: 'Two figures for the year, two for the week.',
    fields: [figures('year', 2), figures('week', 2)],
    symbolSets: {},
  },
  {
    code: 'day-of-year',
    name: 'Day of the year',
    about: 'Three figures for the day of the year, then the last figure of the year.',
    fields: [figures('dayOfYear', 3), figures('year', 1)],
    symbolSets: {},
  },
  {
    code: 'quarter-and-year',
    name: 'Quarter and year',
    about: 'One figure for the quarter, two for the year.',
    fields: [figures('quarter', 1), figures('year', 2)],
    symbolSets: {},
  },
  {
    code: 'plain-figures',
    name: 'Plain figures with gaps',
    about: 'Day, month and year in figures, parted by gaps.',
    fields: [figures('day', [1, 2]), GAP, figures('month', [1, 2]), GAP, figures('year', 2)],
    symbolSets: {},
  },
  {
    code: 'whole-date',
    name: 'Year, month, day',
    about: 'Two figures each, noughts in front, without gaps.',
    fields: [figures('year', 2), figures('month', 2), figures('day', 2)],
    symbolSets: {},
  },
  {
    code: 'month-name',
    name: 'Month in three letters',
    about: 'JAN to DEC, then two figures for the year.',
    fields: [{ field: 'month', symbols: 'months', width: 3 }, figures('year', 2)],
    symbolSets: { months: MONTH_NAMES },
  },
];

/** Begins a draft from a shape: fields, symbols and exceptions are the shape's; the years in use stay as they were said. */
export function beginFrom(shape: Pick<Shape, 'fields' | 'symbolSets'>, { usedFrom, usedTo, yearStart }: CipherDefinition): CipherDefinition {
  return {
    fields: shape.fields,
    symbolSets: shape.symbolSets,
    ...(yearStart === undefined ? {} : { yearStart }),
    usedFrom,
    usedTo,
  };
}
