import { civilOf, daysInMonth, type CivilDay, type Day, type DaySpan } from './day.ts';

export const MONTHS = [
  'January',
  'February',
  'March',
  'April',
  'May',
  'June',
  'July',
  'August',
  'September',
  'October',
  'November',
  'December',
] as const;
const SHORT_NAME = 3;

/**
 * A day as people read it.
 * @example formatDay(dayOf(1939, 3, 12)) //=> '12 Mar 1939'
 */
export function formatDay(day: Day): string {
  const civil = civilOf(day);
  return `${dayAndMonth(civil)} ${String(civil.year)}`;
}

/**
 * A span as people read it: no more is written than tells its ends apart, and whole months and years go by their names.
 *
 * | span | reads |
 * | --- | --- |
 * | one day | `12 Mar 1939` |
 * | within a month | `3–9 Mar 1939` |
 * | within a year | `28 Mar – 3 Apr 1939` |
 * | over the new year | `28 Dec 1931 – 3 Jan 1932` |
 * | a whole month | `March 1937` |
 * | a whole year | `1939` |
 * | whole months, whole years | `January – March 1937`, `1939–1941` |
 */
export function formatSpan(span: DaySpan): string {
  if (span.from === span.to) return formatDay(span.from);
  const from = civilOf(span.from);
  const to = civilOf(span.to);
  if (from.day === 1 && to.day === daysInMonth(to.year, to.month)) return formatMonths(from, to);
  if (from.year !== to.year) return `${formatDay(span.from)} – ${formatDay(span.to)}`;
  if (from.month !== to.month) return `${dayAndMonth(from)} – ${formatDay(span.to)}`;
  return `${String(from.day)}–${formatDay(span.to)}`;
}

/** Whole months, from the first of one to the last of another. */
function formatMonths(from: CivilDay, to: CivilDay): string {
  if (from.month === 1 && to.month === 12) {
    return from.year === to.year ? String(from.year) : `${String(from.year)}–${String(to.year)}`;
  }
  const end = `${monthName(to.month)} ${String(to.year)}`;
  if (from.year !== to.year) return `${monthName(from.month)} ${String(from.year)} – ${end}`;
  return from.month === to.month ? end : `${monthName(from.month)} – ${end}`;
}

function dayAndMonth(civil: CivilDay): string {
  return `${String(civil.day)} ${monthName(civil.month).slice(0, SHORT_NAME)}`;
}

function monthName(month: number): string {
  return MONTHS[month - 1] ?? '';
}
