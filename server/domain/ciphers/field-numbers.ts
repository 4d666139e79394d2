import { CIPHER_LIMITS, type DateField } from './definition.ts';

/**
 * Least and greatest number a field can have, and how many digits the greatest takes. Years reach one past the limits of a
 * definition either way, because the first and last days of a calendar year can belong to the neighbour's weeks or code year.
 */
export type NumberRange = { readonly least: number; readonly greatest: number; readonly digits: number };

export const FIELD_NUMBERS: Readonly<Record<DateField, NumberRange>> = {
  year: { least: CIPHER_LIMITS.earliestYear - 1, greatest: CIPHER_LIMITS.latestYear + 1, digits: 4 },
  quarter: { least: 1, greatest: 4, digits: 1 },
  month: { least: 1, greatest: 12, digits: 2 },
  week: { least: 1, greatest: 53, digits: 2 },
  day: { least: 1, greatest: 31, digits: 2 },
  dayOfYear: { least: 1, greatest: 366, digits: 3 },
};

/** What the fields are called in a message. */
export const FIELD_WORDS: Readonly<Record<DateField | 'other' | 'literal', string>> = {
  year: 'year',
  quarter: 'quarter',
  month: 'month',
  week: 'week',
  day: 'day',
  dayOfYear: 'day of the year',
  other: 'other field',
  literal: 'fixed lettering',
};

/** Whether a text of this many digits names a year only by its last ones. */
export function cycleOfDigits(width: number): number {
  return width < FIELD_NUMBERS.year.digits ? 10 ** width : 0;
}
