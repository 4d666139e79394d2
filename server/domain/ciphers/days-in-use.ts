import { daySpan, overlap } from '../dates/day-span.ts';
import { civilOf, dayOf, type Day, type DaySpan } from '../dates/day.ts';
import type { CompiledCipher } from './compiled-cipher.ts';
import { FIRST_POSSIBLE_DAY, LAST_POSSIBLE_DAY } from './field-calendar.ts';

/** First and last day to look at; what is left out is open. */
export type DayLimits = { readonly from?: Day | undefined; readonly to?: Day | undefined };

/** A cipher without a year field dates nothing unless the days in question are no more years than this. */
export const YEARS_WITHOUT_YEAR = 5;

/** The days a cipher is in use, up to `asOf` where it still is; `null` where that is before its first. */
export function daysInUse(cipher: CompiledCipher, asOf: Day): DaySpan | null {
  return daySpan(cipher.usedFrom, Math.min(cipher.usedTo ?? asOf, LAST_POSSIBLE_DAY));
}

/** The limits as a span; `null` where they end before they start or lie outside every cipher's days. */
function spanOfLimits(limits: DayLimits): DaySpan | null {
  return daySpan(Math.max(limits.from ?? FIRST_POSSIBLE_DAY, FIRST_POSSIBLE_DAY), Math.min(limits.to ?? LAST_POSSIBLE_DAY, LAST_POSSIBLE_DAY));
}

/** The days in use within the limits. */
export function daysInQuestion(cipher: CompiledCipher, asOf: Day, limits: DayLimits): DaySpan | null {
  const use = daysInUse(cipher, asOf);
  const within = spanOfLimits(limits);
  return use === null || within === null ? null : overlap(use, within);
}

/** Whether the cipher can date a mark on these days: it has a year field, or they are five years at most. */
export function canDate(cipher: CompiledCipher, days: DaySpan): boolean {
  if (cipher.calendar.hasYear) return true;
  const { year, month, day } = civilOf(days.from);
  return days.to < dayOf(year + YEARS_WITHOUT_YEAR, month, day);
}
