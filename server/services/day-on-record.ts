import { parseDay } from '#domain/dates/day.ts';
import type { Day, DaySpan } from '#domain/dates/day.ts';

/**
 * The day that ISO text names, where it was checked before: a parsed request or a `date` column.
 *
 * @throws RangeError on any other text.
 */
export function dayOnRecord(text: string): Day {
  const day = parseDay(text);
  if (!day.ok) throw new RangeError('A day on record is not a day');
  return day.value;
}

/** Both ends of a span on record. */
export function spanOnRecord({ from, to }: { readonly from: string; readonly to: string }): DaySpan {
  return { from: dayOnRecord(from), to: dayOnRecord(to) };
}
