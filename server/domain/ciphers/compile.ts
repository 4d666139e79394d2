import { daysInMonth } from '../dates/day.ts';
import type { GlyphIndex } from '../marks/glyphs.ts';
import { fail, succeed, type Result } from '../result.ts';
import type { CipherFault, Report } from './cipher-fault.ts';
import type { CipherCalendar, CompiledCipher, CompiledField, LiteralPiece } from './compiled-cipher.ts';
import { checkDay, compileExceptions } from './compile-exceptions.ts';
import { checkFields, finishField, type CheckedField } from './compile-fields.ts';
import { maskOf } from './glyph-mask.ts';
import { compileSets, glyphsOfSet, type CheckedSet } from './compile-sets.ts';
import { CIPHER_LIMITS, DATE_FIELDS, type CipherDefinition, type DateField, type WeekRule } from './definition.ts';
import { LAST_POSSIBLE_DAY, yearsBetween } from './field-calendar.ts';

const MONTH_AND_DAY = /^(\d{2})-(\d{2})$/;
/** Any year without a leap day: code years start on a day that every year has. */
const COMMON_YEAR = 2001;
const UNITS: readonly (readonly [DateField, CipherCalendar['unit']])[] = [
  ['day', 'day'],
  ['dayOfYear', 'day'],
  ['week', 'week'],
  ['month', 'month'],
  ['quarter', 'quarter'],
];

/**
 * Checks a definition's meaning and readies it for the decoder. A definition is refused with every fault in it, each with its
 * path; one that is too large anywhere is refused without being read further there.
 *
 * Fine points: symbols and literals are folded (NFKC, upper case) before they are compared. A literal's break characters are
 * cast as breaks: they hold no glyph, and a reader may type the break or leave it out. A set serves any field; numbers that a
 * field can't have (a month 13) are passed over, unless none is left. `exceptions[].fields.other` means the only `other`
 * field, or among several the one without a name.
 */
export function compileCipher(definition: CipherDefinition): Result<CompiledCipher, readonly CipherFault[]> {
  const faults: CipherFault[] = [];
  const report: Report = (code, path, message) => {
    faults.push({ path, code, message });
  };

  const usedFrom = checkDay(definition.usedFrom, ['usedFrom'], report);
  const usedTo = definition.usedTo === null ? null : checkDay(definition.usedTo, ['usedTo'], report);
  if (usedFrom !== null && usedTo !== null && usedFrom > usedTo) {
    report('ends-before-it-starts', ['usedTo'], 'the cipher goes out of use before it comes into use');
  }
  const sets = compileSets(definition, report);
  const calendar = compileCalendar(definition, report);
  if (definition.fields.length > CIPHER_LIMITS.fields) {
    report('too-many-fields', ['fields'], `a cipher has at most ${String(CIPHER_LIMITS.fields)} fields`);
    return fail(faults);
  }
  if (definition.fields.length === 0) report('no-fields', ['fields'], 'a cipher has one field at least');
  else if (!definition.fields.some((field) => isDateField(field.field))) {
    report('no-date-field', ['fields'], 'no field says anything about the date');
  }

  const lastDay = definition.usedTo === null ? LAST_POSSIBLE_DAY : usedTo;
  const yearsInUse = usedFrom === null || lastDay === null ? null : yearsBetween(usedFrom, lastDay, calendar);
  const { fields, trailingBreak } = checkFields(definition, sets, yearsInUse, report);
  const { exceptions, named } = compileExceptions(definition, fields, report);
  if (faults.length > 0 || usedFrom === null) return fail(faults);

  const usedGlyphs = distinct(setsInUse(fields).flatMap(glyphsOfSet), fields);
  return succeed({
    fields: fields.map((field, index): CompiledField => (isPiece(field) ? field : finishField(field, named.get(index) ?? []))),
    calendar,
    usedFrom,
    usedTo,
    exceptions,
    distinctGlyphs: distinct([...sets.values()].flatMap(glyphsOfSet), fields).length,
    usedGlyphs,
    glyphMask: maskOf(usedGlyphs),
    least: sum(fields.map((field) => (isPiece(field) ? field.glyphs.length : field.least))),
    most: sum(fields.map((field) => (isPiece(field) ? field.glyphs.length : field.most))),
    trailingBreak,
  });
}

function compileCalendar(definition: CipherDefinition, report: Report): CipherCalendar {
  const fields = definition.fields.slice(0, CIPHER_LIMITS.fields);
  const kinds = new Set(fields.map((field) => field.field));
  return {
    hasYear: kinds.has('year'),
    yearStart: definition.yearStart === undefined ? null : compileYearStart(definition.yearStart, report),
    week: fields.reduce<WeekRule | null>((rule, field) => (field.field === 'week' ? (field.week ?? 'iso') : rule), null),
    unit: UNITS.find(([kind]) => kinds.has(kind))?.[1] ?? 'year',
  };
}

function compileYearStart(yearStart: string, report: Report): CipherCalendar['yearStart'] {
  const parts = MONTH_AND_DAY.exec(yearStart);
  const [month, day] = [Number(parts?.[1] ?? 0), Number(parts?.[2] ?? 0)];
  if (month >= 1 && month <= 12 && day >= 1 && day <= daysInMonth(COMMON_YEAR, month)) return { month, day };
  report('not-a-day', ['yearStart'], 'a code year starts on a day that every year has, written MM-DD');
  return null;
}

function setsInUse(fields: readonly (CheckedField | LiteralPiece)[]): readonly CheckedSet[] {
  return fields.flatMap((field) => (isPiece(field) ? [] : [field.set]));
}

function distinct(glyphs: readonly GlyphIndex[], fields: readonly (CheckedField | LiteralPiece)[]): readonly GlyphIndex[] {
  const literals = fields.flatMap((field) => (isPiece(field) ? field.glyphs : []));
  return [...new Set([...glyphs, ...literals])].sort((a, b) => a - b);
}

function isPiece(field: CheckedField | LiteralPiece): field is LiteralPiece {
  return field.kind === 'literal';
}

function isDateField(kind: string): kind is DateField {
  return DATE_FIELDS.some((field) => field === kind);
}

function sum(numbers: readonly number[]): number {
  return numbers.reduce((total, number) => total + number, 0);
}
