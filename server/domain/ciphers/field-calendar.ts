import {
  civilOf,
  dayOf,
  dayOfYear,
  daysInMonth,
  firstSundayOf,
  isoWeekOf,
  isoWeekStart,
  quarterOfMonth,
  startOfYear,
  type Day,
} from '../dates/day.ts';
import type { CipherCalendar, Numbers } from './compiled-cipher.ts';
import { CIPHER_LIMITS, type DateField, type WeekRule } from './definition.ts';
import { FIELD_NUMBERS } from './field-numbers.ts';

/**
 * Every date field is a function of the day, and a day is meant when all fields agree with it.
 *
 * | field | its number on a day |
 * | --- | --- |
 * | month, day, quarter, dayOfYear | the calendar's |
 * | week | by the field's rule |
 * | year | the code year where the cipher says when it starts; otherwise, where there is a week field, the year its rule counts in; otherwise the calendar year |
 */
export function numberOn(field: DateField, day: Day, calendar: CipherCalendar): number {
  switch (field) {
    case 'year':
      return yearOn(day, calendar);
    case 'quarter':
      return quarterOfMonth(civilOf(day).month);
    case 'month':
      return civilOf(day).month;
    case 'week':
      return weekOn(day, calendar.week ?? 'iso');
    case 'day':
      return civilOf(day).day;
    case 'dayOfYear':
      return dayOfYear(day);
  }
}

const DAYS_IN_LEAP_YEAR = 366;

/** Number → days from the start of the month or year to the number's first day; in a common year, in a leap year. */
type Starts = readonly [common: readonly number[], leap: readonly number[]];

const STARTS: Readonly<Record<Exclude<DateField, 'year'>, Starts>> = {
  quarter: [startsOfMonths(2001, 3), startsOfMonths(2000, 3)],
  month: [startsOfMonths(2001, 1), startsOfMonths(2000, 1)],
  week: alike(evenStarts(FIELD_NUMBERS.week.greatest, 7)),
  day: alike(evenStarts(FIELD_NUMBERS.day.greatest, 1)),
  dayOfYear: alike(evenStarts(FIELD_NUMBERS.dayOfYear.greatest, 1)),
};

/** First day of the year that the cipher's year field counts. */
export function yearBegins(year: number, calendar: CipherCalendar): Day {
  const { yearStart } = calendar;
  if (yearStart !== null) return dayOf(year, yearStart.month, yearStart.day);
  return calendar.week === null ? startOfYear(year) : weekYearBegins(year, calendar.week);
}

/** The first and the last day that any cipher can be in use. */
export const FIRST_POSSIBLE_DAY = dayOf(CIPHER_LIMITS.earliestYear, 1, 1);
export const LAST_POSSIBLE_DAY = dayOf(CIPHER_LIMITS.latestYear, 12, 31);

/** Runs of days as a flat list: first and last day of each, ascending, apart by a day at least. */
export type Runs = number[];

/**
 * Runs of days cut where a field's numbers start afresh (months for `day`, years for most others), so that each choice of
 * numbers only has to look up where they lie. A flat list, `PIECE` entries each: first and last day of the piece, first and last
 * day of the whole month or year it belongs to.
 */
export type Pieces = number[];

export const PIECE = 4;

/** Cuts runs for a field other than the year. Fills `out`, emptying it first. */
export function cutRuns(runs: Readonly<Runs>, field: Exclude<DateField, 'year'>, calendar: CipherCalendar, out: Pieces): void {
  out.length = 0;
  for (let index = 0; index < runs.length; index += 2) {
    const from = runs[index] ?? 0;
    const to = runs[index + 1] ?? 0;
    if (field === 'day') cutAtMonths(from, to, out);
    else {
      const rule = field === 'week' ? (calendar.week ?? 'iso') : 'simple';
      let begins = weekYearBegins(weekYearOn(from, rule), rule);
      for (let year = weekYearOn(from, rule); begins <= to; year += 1) {
        const next = weekYearBegins(year + 1, rule);
        out.push(Math.max(from, begins), Math.min(to, next - 1), begins, next - 1);
        begins = next;
      }
    }
  }
}

/** The days of the pieces on which the field has one of the numbers. Fills `out`, emptying it first. */
export function pickDays(pieces: Readonly<Pieces>, field: Exclude<DateField, 'year'>, numbers: readonly number[], out: Runs): void {
  out.length = 0;
  for (let index = 0; index < pieces.length; index += PIECE) {
    const from = pieces[index] ?? 0;
    const to = pieces[index + 1] ?? 0;
    const begins = pieces[index + 2] ?? 0;
    const ends = pieces[index + 3] ?? 0;
    const starts = STARTS[field][ends - begins + 1 === DAYS_IN_LEAP_YEAR ? 1 : 0];
    for (const number of numbers) {
      const first = begins + (starts[number] ?? 0);
      if (first > to) break;
      addRun(out, Math.max(from, first), Math.min(to, begins + (starts[number + 1] ?? 0) - 1));
    }
  }
}

/** The days of `runs` in one of the years. Fills `out`, emptying it first. */
export function pickYears(runs: Readonly<Runs>, years: Numbers, calendar: CipherCalendar, out: Runs): void {
  out.length = 0;
  for (let index = 0; index < runs.length; index += 2) restrictToYears(runs[index] ?? 0, runs[index + 1] ?? 0, years, calendar, out);
}

/** The days of `runs` on which the field has one of the numbers. */
export function restrictRuns(runs: Readonly<Runs>, field: DateField, numbers: Numbers, calendar: CipherCalendar): Runs {
  const out: Runs = [];
  if (field === 'year') {
    pickYears(runs, numbers, calendar, out);
    return out;
  }
  const pieces: Pieces = [];
  cutRuns(runs, field, calendar, pieces);
  pickDays(pieces, field, numbers.values, out);
  return out;
}

/** Whether a year is one of the numbers. */
export function isAmong(numbers: Numbers, value: number): boolean {
  if (numbers.every === 0) return numbers.values.includes(value);
  return numbers.values.includes(value % numbers.every);
}

/** Adds a run, joined to the last one where no day lies between. Runs come in ascending order. */
export function addRun(runs: Runs, from: Day, to: Day): void {
  if (from > to) return;
  const last = runs.length - 1;
  if (last > 0 && (runs[last] ?? 0) + 1 === from) runs[last] = to;
  else runs.push(from, to);
}

function restrictToYears(from: Day, to: Day, numbers: Numbers, calendar: CipherCalendar, out: Runs): void {
  const first = yearOn(from, calendar);
  const last = yearOn(to, calendar);
  const addYear = (year: number): void => {
    addRun(out, Math.max(from, yearBegins(year, calendar)), Math.min(to, yearBegins(year + 1, calendar) - 1));
  };
  if (numbers.every === 0) {
    for (const year of numbers.values) if (year >= first && year <= last) addYear(year);
  } else if (numbers.values.length === 1) {
    const residue = numbers.values[0] ?? 0;
    const gap = (residue - first) % numbers.every;
    for (let year = first + (gap < 0 ? gap + numbers.every : gap); year <= last; year += numbers.every) addYear(year);
  } else {
    for (let year = first; year <= last; year += 1) if (isAmong(numbers, year)) addYear(year);
  }
}

function cutAtMonths(from: Day, to: Day, out: Pieces): void {
  let { year, month } = civilOf(from);
  let begins = dayOf(year, month, 1);
  while (begins <= to) {
    const next = begins + daysInMonth(year, month);
    out.push(Math.max(from, begins), Math.min(to, next - 1), begins, next - 1);
    begins = next;
    month = month === 12 ? 1 : month + 1;
    if (month === 1) year += 1;
  }
}

function yearOn(day: Day, calendar: CipherCalendar): number {
  const { yearStart } = calendar;
  if (yearStart === null) return calendar.week === null ? civilOf(day).year : weekYearOn(day, calendar.week);
  const civil = civilOf(day);
  const begun = civil.month > yearStart.month || (civil.month === yearStart.month && civil.day >= yearStart.day);
  return begun ? civil.year : civil.year - 1;
}

function weekOn(day: Day, rule: WeekRule): number {
  if (rule === 'iso') return isoWeekOf(day).week;
  return Math.floor((day - weekYearBegins(weekYearOn(day, rule), rule)) / 7) + 1;
}

/** The year whose weeks the rule counts on that day. */
function weekYearOn(day: Day, rule: WeekRule): number {
  switch (rule) {
    case 'iso':
      return isoWeekOf(day).year;
    case 'simple':
      return civilOf(day).year;
    case 'first-full-sunday': {
      const { year } = civilOf(day);
      return day >= firstSundayOf(year) ? year : year - 1;
    }
  }
}

function weekYearBegins(year: number, rule: WeekRule): Day {
  switch (rule) {
    case 'iso':
      return isoWeekStart(year, 1);
    case 'simple':
      return startOfYear(year);
    case 'first-full-sunday':
      return firstSundayOf(year);
  }
}

function endOfMonth(year: number, month: number): Day {
  return dayOf(year, month, daysInMonth(year, month));
}

/** Whether the run is exactly one of the cipher's whole units: a day, a week, a month, a quarter or a code year. */
export function isWholeUnit(unit: CipherCalendar['unit'], from: Day, to: Day, calendar: CipherCalendar): boolean {
  switch (unit) {
    case 'day':
      return from === to;
    case 'week': {
      const rule = calendar.week ?? 'iso';
      const year = weekYearOn(from, rule);
      const ends = Math.min(weekYearBegins(year + 1, rule) - 1, from + 6);
      return (from - weekYearBegins(year, rule)) % 7 === 0 && to === ends;
    }
    case 'month':
    case 'quarter': {
      const { year, month, day } = civilOf(from);
      const months = unit === 'month' ? 1 : 3;
      return day === 1 && (month - 1) % months === 0 && to === endOfMonth(year, month + months - 1);
    }
    case 'year': {
      const year = yearOn(from, calendar);
      return from === yearBegins(year, calendar) && to === yearBegins(year + 1, calendar) - 1;
    }
  }
}

/** The numbers the year field has between two days. */
export function yearsBetween(from: Day, to: Day, calendar: CipherCalendar): { readonly first: number; readonly last: number } {
  return {
    first: Math.max(FIELD_NUMBERS.year.least, yearOn(from, calendar)),
    last: Math.min(FIELD_NUMBERS.year.greatest, yearOn(to, calendar)),
  };
}

function startsOfMonths(year: number, monthsInUnit: number): readonly number[] {
  const units = Array.from({ length: 12 / monthsInUnit + 1 }, (_, index) => dayOf(year, index * monthsInUnit + 1, 1));
  return [0, ...units.map((day) => day - startOfYear(year))];
}

function evenStarts(greatest: number, days: number): readonly number[] {
  return [0, ...Array.from({ length: greatest + 1 }, (_, index) => index * days)];
}

function alike(starts: readonly number[]): Starts {
  return [starts, starts];
}
