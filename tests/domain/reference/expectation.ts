import { dayOf, daysInMonth, parseDay, type DaySpan } from '#domain/dates/day.ts';

/** What an example of the reference expects, read from its notation (see `fixtures/reference/reference-table.ts`). */
export type Expectation =
  | { readonly kind: 'invalid' }
  | { readonly kind: 'unresolved-year' }
  | { readonly kind: 'alternatives'; readonly alternatives: readonly Expected[] };

/** A span of days; or a week by its number, where the source does not fix its days. */
export type Expected =
  | { readonly kind: 'days'; readonly span: DaySpan; readonly openEnded: boolean }
  | { readonly kind: 'week'; readonly year: number; readonly week: number };

/** Fixtures are written by hand, so anything that is not in the notation is a mistake in them and throws. */
export function readExpectation(text: string): Expectation {
  if (text === 'invalid') return { kind: 'invalid' };
  if (text === 'unresolved:year') return { kind: 'unresolved-year' };
  return { kind: 'alternatives', alternatives: text.split(' | ').map(readAlternative) };
}

/** The days expected, for examples that name days. */
export function expectedDays(text: string): readonly DaySpan[] {
  const expectation = readExpectation(text);
  if (expectation.kind !== 'alternatives') throw new Error(`no days in ${text}`);
  return expectation.alternatives.map((one) => {
    if (one.kind !== 'days') throw new Error(`a week by its number in ${text}`);
    return one.span;
  });
}

function readAlternative(text: string): Expected {
  const week = /^(\d{4})-W(\d{2})$/.exec(text);
  if (week !== null) return { kind: 'week', year: Number(week[1]), week: Number(week[2]) };
  const [from, to] = text.split('/');
  if (from === undefined) throw new Error(`not a date: ${text}`);
  if (to === undefined) return { kind: 'days', span: readSpan(from), openEnded: false };
  if (to === '..') return { kind: 'days', span: readSpan(from), openEnded: true };
  return { kind: 'days', span: { from: readSpan(from).from, to: readSpan(to).to }, openEnded: false };
}

/** A day, a month, a quarter or a year. */
function readSpan(text: string): DaySpan {
  const parts = /^(\d{4})(?:-(?:Q([1-4])|(\d{2})))?$/.exec(text);
  if (parts === null) return readDay(text);
  const year = Number(parts[1]);
  const quarter = parts[2];
  const month = parts[3];
  if (quarter !== undefined) return months(year, Number(quarter) * 3 - 2, Number(quarter) * 3);
  return month === undefined ? months(year, 1, 12) : months(year, Number(month), Number(month));
}

function readDay(text: string): DaySpan {
  const day = parseDay(text);
  if (!day.ok) throw new Error(`not a date: ${text}`);
  return { from: day.value, to: day.value };
}

function months(year: number, first: number, last: number): DaySpan {
  return { from: dayOf(year, first, 1), to: dayOf(year, last, daysInMonth(year, last)) };
}
