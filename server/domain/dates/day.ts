import { fail, succeed, type Result } from '../result.ts';

/** A calendar day: whole days since 1970-01-01, negative before it. Never a local-time `Date`. */
export type Day = number;

/** Days `from` to `to`, both included. */
export type DaySpan = { readonly from: Day; readonly to: Day };

/** A day as the proleptic Gregorian calendar names it; months and days count from 1. */
export type CivilDay = { readonly year: number; readonly month: number; readonly day: number };

/** A week of ISO 8601: weeks run Monday to Sunday and belong to the year that holds their Thursday. */
export type IsoWeek = { readonly year: number; readonly week: number };

export const DAY_FAULTS = ['not-a-date', 'no-such-day'] as const;
export type DayFault = { readonly code: (typeof DAY_FAULTS)[number]; readonly message: string };

const DAYS_IN_WEEK = 7;
const DAYS_IN_ERA = 146_097;
const YEARS_IN_ERA = 400;
/** Days from 1 March of year 0 to 1970-01-01; counting years from March puts the leap day last. */
const EPOCH_FROM_MARCH_ZERO = 719_468;
const DAYS_BEFORE_MONTH = [0, 31, 59, 90, 120, 151, 181, 212, 243, 273, 304, 334, 365] as const;
const ISO_DAY = /^(\d{4})-(\d{2})-(\d{2})$/;

/**
 * The day with this year, month (1–12) and day of the month. The arguments are taken as they are: a day past the month's end
 * runs on into the next month. Text from outside goes through `parseDay`, which refuses such days.
 */
export function dayOf(year: number, month: number, day: number): Day {
  const marchYear = month > 2 ? year : year - 1;
  const era = Math.floor(marchYear / YEARS_IN_ERA);
  const yearOfEra = marchYear - era * YEARS_IN_ERA;
  const dayOfMarchYear = Math.floor((153 * (month > 2 ? month - 3 : month + 9) + 2) / 5) + day - 1;
  const dayOfEra = yearOfEra * 365 + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100) + dayOfMarchYear;
  return era * DAYS_IN_ERA + dayOfEra - EPOCH_FROM_MARCH_ZERO;
}

/** Year, month and day of the month; `dayOf` undoes it. */
export function civilOf(day: Day): CivilDay {
  const fromMarchZero = day + EPOCH_FROM_MARCH_ZERO;
  const era = Math.floor(fromMarchZero / DAYS_IN_ERA);
  const dayOfEra = fromMarchZero - era * DAYS_IN_ERA;
  const yearOfEra = Math.floor(
    (dayOfEra - Math.floor(dayOfEra / 1460) + Math.floor(dayOfEra / 36_524) - Math.floor(dayOfEra / 146_096)) / 365,
  );
  const dayOfMarchYear = dayOfEra - (365 * yearOfEra + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100));
  const monthFromMarch = Math.floor((5 * dayOfMarchYear + 2) / 153);
  const month = monthFromMarch < 10 ? monthFromMarch + 3 : monthFromMarch - 9;
  return {
    year: era * YEARS_IN_ERA + yearOfEra + (month <= 2 ? 1 : 0),
    month,
    day: dayOfMarchYear - Math.floor((153 * monthFromMarch + 2) / 5) + 1,
  };
}

/** Reads `YYYY-MM-DD` exactly: four, two and two digits, and a day that the calendar has. */
export function parseDay(iso: string): Result<Day, DayFault> {
  const parts = ISO_DAY.exec(iso);
  if (parts === null) return fail({ code: 'not-a-date', message: 'a date is written YYYY-MM-DD' });
  const [year, month, day] = [Number(parts[1]), Number(parts[2]), Number(parts[3])];
  if (month < 1 || month > 12 || day < 1 || day > daysInMonth(year, month)) {
    return fail({ code: 'no-such-day', message: `there is no day ${iso}` });
  }
  return succeed(dayOf(year, month, day));
}

/** `YYYY-MM-DD`, for the years 0 to 9999; `parseDay` undoes it. */
export function writeDay(day: Day): string {
  const civil = civilOf(day);
  return [padded(civil.year, 4), padded(civil.month, 2), padded(civil.day, 2)].join('-');
}

export function isLeapYear(year: number): boolean {
  return year % 4 === 0 && (year % 100 !== 0 || year % 400 === 0);
}

export function daysInYear(year: number): number {
  return isLeapYear(year) ? 366 : 365;
}

/** Month 1–12. */
export function daysInMonth(year: number, month: number): number {
  return daysBeforeMonth(year, month + 1) - daysBeforeMonth(year, month);
}

/** 1 for 1 January. */
export function dayOfYear(day: Day): number {
  return day - startOfYear(civilOf(day).year) + 1;
}

/** 1 January. */
export function startOfYear(year: number): Day {
  return dayOf(year, 1, 1);
}

/** Quarter 1–4 of a month 1–12. */
export function quarterOfMonth(month: number): number {
  return Math.floor((month + 2) / 3);
}

/** 1 for Monday to 7 for Sunday, as ISO 8601 numbers them. */
export function isoWeekday(day: Day): number {
  const sinceMonday = (day + 3) % DAYS_IN_WEEK;
  return (sinceMonday < 0 ? sinceMonday + DAYS_IN_WEEK : sinceMonday) + 1;
}

/** The ISO 8601 week of a day; its year is the ISO week-year, which near 1 January may not be the calendar's. */
export function isoWeekOf(day: Day): IsoWeek {
  const thursday = day - isoWeekday(day) + 4;
  const { year } = civilOf(thursday);
  return { year, week: Math.floor((thursday - startOfYear(year)) / DAYS_IN_WEEK) + 1 };
}

/** The Monday of an ISO 8601 week. Week 1 holds 4 January. */
export function isoWeekStart(year: number, week: number): Day {
  const fourth = dayOf(year, 1, 4);
  return fourth - isoWeekday(fourth) + 1 + (week - 1) * DAYS_IN_WEEK;
}

/** 52 or 53. */
export function isoWeeksIn(year: number): number {
  return (isoWeekStart(year + 1, 1) - isoWeekStart(year, 1)) / DAYS_IN_WEEK;
}

/** The first Sunday of a calendar year. */
export function firstSundayOf(year: number): Day {
  const first = startOfYear(year);
  return first + DAYS_IN_WEEK - isoWeekday(first);
}

function daysBeforeMonth(year: number, month: number): number {
  return (DAYS_BEFORE_MONTH[month - 1] ?? 0) + (month > 2 && isLeapYear(year) ? 1 : 0);
}

function padded(value: number, width: number): string {
  return String(value).padStart(width, '0');
}
