import type { Day, DaySpan } from './day.ts';

/** Spans are closed and never empty: a function that would answer an empty span answers `null`. */

/** The span from one day to another, or `null` where the first comes after the last. */
export function daySpan(from: Day, to: Day): DaySpan | null {
  return from <= to ? { from, to } : null;
}

/** The days two spans share. */
export function overlap(one: DaySpan, other: DaySpan): DaySpan | null {
  return daySpan(Math.max(one.from, other.from), Math.min(one.to, other.to));
}

/** Whether the day lies in the span. */
export function includesDay(span: DaySpan, day: Day): boolean {
  return span.from <= day && day <= span.to;
}

/** Whether every day of `inner` lies in `outer`. */
export function coversSpan(outer: DaySpan, inner: DaySpan): boolean {
  return outer.from <= inner.from && inner.to <= outer.to;
}

/** Whether both spans are the same days. */
export function sameSpan(one: DaySpan, other: DaySpan): boolean {
  return one.from === other.from && one.to === other.to;
}

/** How many days it holds, both ends counted. */
export function daysIn(span: DaySpan): number {
  return span.to - span.from + 1;
}
