import { civilOf, parseDay } from '#domain/dates/day.ts';
import type { Day } from '#domain/dates/day.ts';
import { formatDay, formatSpan } from '#domain/dates/format-day.ts';

/** The calendar day an answer of the register names. Throws on text that is no day: the contract has already checked it. */
export function dayFrom(iso: string): Day {
  const parsed = parseDay(iso);
  if (!parsed.ok) throw new RangeError(parsed.fault.message);
  return parsed.value;
}

/** `1939-03-12` → `12 Mar 1939`. */
export function sayDay(iso: string): string {
  return formatDay(dayFrom(iso));
}

/** Days `from` to `to`, both included, as short as they can be said: `3–9 Mar 1939`. */
export function saySpan({ from, to }: { readonly from: string; readonly to: string }): string {
  return formatSpan({ from: dayFrom(from), to: dayFrom(to) });
}

/** A span whose ends may be unknown or still open: `from 1 Apr 1944`, `until 31 Dec 1954`, `dates not on record`. */
export function sayOpenSpan({ from, to }: { readonly from: string | null; readonly to: string | null }): string {
  if (from !== null && to !== null) return saySpan({ from, to });
  if (from !== null) return `from ${sayDay(from)}`;
  if (to !== null) return `until ${sayDay(to)}`;
  return 'dates not on record';
}

/** The day part of a timestamp: `2026-03-04T10:00:00Z` → `4 Mar 2026`. */
export function sayMoment(timestamp: string): string {
  return sayDay(timestamp.slice(0, 10));
}

/** The years a span touches: `1928–1954`, `1941`, `1928 on`, `until 1954`. */
export function sayYears({ from, to }: { readonly from: string | null; readonly to: string | null }): string {
  const first = from === null ? null : civilOf(dayFrom(from)).year;
  const last = to === null ? null : civilOf(dayFrom(to)).year;
  if (first === null) return last === null ? 'years not on record' : `until ${last}`;
  if (last === null) return `${first} on`;
  return first === last ? String(first) : `${first}–${last}`;
}
