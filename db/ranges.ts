import { parseDay, writeDay } from '#domain/dates/day.ts';

/**
 * Ranges as PostgreSQL writes them and as the register uses them: both ends included, `null` where an end is open.
 *
 * PostgreSQL keeps int4range, int8range and daterange in the one form `[from,upTo)`, so `[3,7]` comes back as `[3,8)`; the codec takes
 * the one off again. An empty range holds nothing and is read as `null`, like no overlap; no column may hold one.
 *
 * | PostgreSQL                | read as                                        |
 * | ------------------------- | ---------------------------------------------- |
 * | `[1001,1391)`             | `{ from: '1001', to: '1390' }`                 |
 * | `[1,)`                    | `{ from: '1', to: null }`                      |
 * | `[1938-07-01,1944-04-01)` | `{ from: '1938-07-01', to: '1944-03-31' }`     |
 */

/** First and last number, decimal digits: serials can be larger than a double holds. */
export type NumberRange = { readonly from: string | null; readonly to: string | null };

/** First and last day, ISO 8601. */
export type DateRange = { readonly from: string | null; readonly to: string | null };

/** Least and most, small whole numbers (days of lead). */
export type CountRange = { readonly from: number | null; readonly to: number | null };

export function parseNumberRange(text: string): NumberRange | null {
  return mapEnds(
    text,
    (digits) => digits,
    (digits) => String(BigInt(digits) - 1n),
  );
}

export function parseDateRange(text: string): DateRange | null {
  return mapEnds(text, (day) => day, dayBefore);
}

export function parseCountRange(text: string): CountRange | null {
  return mapEnds(text, Number, (digits) => Number(digits) - 1);
}

/** A range as an input literal of any range type. `null`, no range at all, stays `null`. */
export function writeRange(range: NumberRange | DateRange | CountRange | null): string | null {
  return range === null ? null : `[${range.from ?? ''},${range.to ?? ''}]`;
}

/** @throws RangeError on text that is no range in `[)` form: the column is of a type this codec is not for. */
function mapEnds<End>(
  text: string,
  first: (end: string) => End,
  last: (upTo: string) => End,
): { from: End | null; to: End | null } | null {
  if (text === 'empty') return null;
  const [, from, upTo] = /^[[(]([^,]*),([^,]*)\)$/.exec(text) ?? [];
  if (from === undefined || upTo === undefined) throw new RangeError(`not a range of whole steps: ${text}`);
  return { from: from === '' ? null : first(from), to: upTo === '' ? null : last(upTo) };
}

function dayBefore(iso: string): string {
  const day = parseDay(iso);
  if (!day.ok) throw new RangeError(day.fault.message);
  return writeDay(day.value - 1);
}
