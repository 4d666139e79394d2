import type { DaySpan } from '#domain/dates/day.ts';
import { formatSpan } from '#domain/dates/format-day.ts';
import { spanOnRecord } from '#server/services/day-on-record.ts';

/** Dates named in one line; the rest are counted. */
const MOST_NAMED = 3;

/** @example sayDates([…], 4) //=> '14 Mar 1927, 14 Mar 1937, 14 Mar 1947 or 1 more' */
export function sayDates(dates: readonly DaySpan[], total: number): string {
  const named = dates.slice(0, MOST_NAMED).map(formatSpan);
  const left = total - named.length;
  if (left > 0) return `${named.join(', ')} or ${left} more`;
  return named.length < 2 ? (named[0] ?? '') : `${named.slice(0, -1).join(', ')} or ${named.at(-1) ?? ''}`;
}

/** Days as they stand on record, either end of which may not be known. */
export function sayOpenDays({ from, to }: { readonly from: string | null; readonly to: string | null }): string {
  if (from !== null && to !== null) return formatSpan(spanOnRecord({ from, to }));
  if (from !== null) return `from ${formatSpan(spanOnRecord({ from, to: from }))} on`;
  return to === null ? 'on days nobody knows' : `up to ${formatSpan(spanOnRecord({ from: to, to }))}`;
}

/** Numbers as they stand on record. */
export function sayNumbers({ from, to }: { readonly from: string | null; readonly to: string | null }): string {
  if (from === null && to === null) return 'every number';
  if (from === null) return `up to ${to ?? ''}`;
  return to === null ? `${from} and later` : from === to ? from : `${from} to ${to}`;
}
