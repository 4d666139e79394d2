import type {
  CipherDefinition,
  DateField,
  FieldDefinition,
  FieldKind,
  FieldWidth,
  SymbolSet,
  WeekRule,
} from '#domain/ciphers/definition.ts';
import { civilOf } from '#domain/dates/day.ts';
import { MONTHS } from '#domain/dates/format-day.ts';
import { dayFrom } from '../../lib/say-date.ts';
import { sayCount } from '../../lib/say-number.ts';

const FIELDS: Readonly<Record<Exclude<FieldKind, 'other' | 'literal'>, string>> = {
  year: 'year',
  quarter: 'quarter',
  month: 'month',
  week: 'week',
  day: 'day',
  dayOfYear: 'day of the year',
};

/** Every kind of field, to choose one by. */
export const FIELD_NAMES: Readonly<Record<FieldKind, string>> = { ...FIELDS, other: 'other detail', literal: 'fixed lettering' };

const WEEKS: Readonly<Record<WeekRule, string>> = {
  iso: 'weeks run Monday to Sunday and belong to the year of their Thursday (ISO 8601)',
  simple: 'days 1 to 7 of the year are week 1, and so on',
  'first-full-sunday': 'week 1 is the first full week from Sunday to Saturday',
};

const QUARTERS = ['January to March', 'April to June', 'July to September', 'October to December'] as const;

/** What a field is called: `month`, `fixed`, or the name a detail was given. */
export function sayField(field: FieldDefinition): string {
  if (field.field === 'literal') return 'fixed';
  return field.field === 'other' ? (field.name ?? 'other') : FIELDS[field.field];
}

/** The fewest and most glyphs a field takes. */
export function widthOf(field: FieldDefinition): { readonly least: number; readonly most: number } {
  if (field.field === 'literal') {
    const glyphs = [...field.text].filter((character) => /[A-Za-z0-9]/.test(character)).length;
    return { least: glyphs, most: glyphs };
  }
  return widthBetween(field.width);
}

function widthBetween(width: FieldWidth): { readonly least: number; readonly most: number } {
  return typeof width === 'number' ? { least: width, most: width } : { least: width[0], most: width[1] };
}

/** `one glyph`, `one or two glyphs`, `none or one glyph`, `2 to 4 glyphs`. */
export function sayWidth(field: FieldDefinition): string {
  const { least, most } = widthOf(field);
  const noun = most === 1 ? 'glyph' : 'glyphs';
  if (least === most) return `${sayCount(least)} ${noun}`;
  const from = least === 0 ? 'none' : sayCount(least);
  return most - least === 1 ? `${from} or ${sayCount(most)} ${noun}` : `${from} to ${sayCount(most)} ${noun}`;
}

/** How a field is to be read beyond its symbols, as sentences without a stop; empty where nothing needs saying. */
export function fieldRemarks(field: FieldDefinition, sets: CipherDefinition['symbolSets']): string[] {
  if (field.field === 'literal') return ['always the same'];
  if (field.field === 'other') return ['says nothing about the date'];
  const { least, most } = widthOf(field);
  const isDigits = field.symbols === 'numerals' || sets[field.symbols]?.kind === 'digits';
  return [
    ...(isDigits && least !== most ? ['no nought in front'] : []),
    ...(isDigits && least === most && most > 1 && field.field !== 'year' ? ['noughts in front fill it up'] : []),
    ...(isDigits && field.field === 'year' && most === 1 ? ['the last figure of the year'] : []),
    ...(isDigits && field.field === 'year' && most === 2 ? ['the last two figures of the year'] : []),
    ...(field.field === 'week' ? [WEEKS[field.week ?? 'iso']] : []),
  ];
}

/** Symbols of a `digits` set in the order 1 to 9 and 0, where every digit has one symbol: the key as it was kept in mind. */
export function keyOf(set: SymbolSet): string | null {
  if (set.kind !== 'digits') return null;
  const symbols = ['1', '2', '3', '4', '5', '6', '7', '8', '9', '0'].map((digit) =>
    Object.keys(set.symbols).filter((symbol) => set.symbols[symbol] === digit),
  );
  return symbols.every(({ length }) => length === 1) ? symbols.flat().join('') : null;
}

export type SymbolLine = { readonly symbol: string; readonly means: string };

/**
 * What each symbol of a set stands for in a field: months and quarters by name, years spelled out over the cipher's life
 * (up to `asOf` where it is still in use), a digit as it is.
 */
export function symbolLines(
  set: SymbolSet,
  field: DateField | 'other',
  used: { readonly from: string; readonly to: string | null },
  asOf: string,
): SymbolLine[] {
  if (set.kind === 'digits') {
    const lines = Object.entries(set.symbols)
      .map(([symbol, digit]) => ({ symbol, means: digit }))
      .toSorted((one, other) => ((Number(one.means) + 9) % 10) - ((Number(other.means) + 9) % 10));
    return set.repeater === undefined ? lines : [...lines, { symbol: set.repeater, means: 'the figure before it again' }];
  }
  return Object.entries(set.symbols).map(([symbol, value]) => ({
    symbol,
    means: sayValues(typeof value === 'number' ? [value] : value, field, set.repeatsEvery, used, asOf),
  }));
}

function sayValues(
  values: readonly number[],
  field: DateField | 'other',
  repeatsEvery: number | undefined,
  used: { readonly from: string; readonly to: string | null },
  asOf: string,
): string {
  if (field === 'month') return values.map((value) => MONTHS[value - 1] ?? String(value)).join(' or ');
  if (field === 'quarter') return values.map((value) => QUARTERS[value - 1] ?? String(value)).join(' or ');
  if (field !== 'year' || repeatsEvery === undefined) return values.join(' or ');
  const first = civilOf(dayFrom(used.from)).year;
  const last = civilOf(dayFrom(used.to ?? asOf)).year;
  const years = Array.from({ length: last - first + 1 }, (_, place) => first + place);
  const meant = years.filter((year) =>
    values.some((value) => (((year - value) % repeatsEvery) + repeatsEvery) % repeatsEvery === 0),
  );
  return meant.length === 0 ? 'no year in use' : meant.join(', ');
}

/** `05-29` → `29 May`. */
export function sayYearStart(yearStart: string): string {
  const [month, day] = yearStart.split('-').map(Number);
  return `${day ?? 1} ${MONTHS[(month ?? 1) - 1] ?? ''}`;
}
