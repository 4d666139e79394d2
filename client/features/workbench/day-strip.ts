import type { CompiledCipher } from '#domain/ciphers/compiled-cipher.ts';
import { daysInUse } from '#domain/ciphers/days-in-use.ts';
import { write } from '#domain/ciphers/write.ts';
import type { WrittenMark } from '#domain/ciphers/write.ts';
import { civilOf, dayOf, daysInMonth } from '#domain/dates/day.ts';
import type { Day, DaySpan } from '#domain/dates/day.ts';
import type { Division } from '../../ui/plate-brackets.tsx';
import { fieldWord } from '../decode/divisions.ts';

/** A day with the marks it would carry: none outside the cipher's use, or where it has no symbols for it. */
export type DayWritten = { readonly day: Day; readonly marks: readonly WrittenMark[] };

export const STEPS = ['day', 'month', 'year'] as const;
export type Step = (typeof STEPS)[number];

/** Marks worked out of one day; a cipher with a shift letter has as many as there are letters. */
const MARKS = 12;

/** A day and its neighbours, so many on either side. */
export function stripOf(cipher: CompiledCipher, day: Day, around: number, today: Day): readonly DayWritten[] {
  return Array.from({ length: 2 * around + 1 }, (_, place) => {
    const one = day - around + place;
    return { day: one, marks: write(one, cipher, { asOf: today, most: MARKS }) };
  });
}

/** The day to begin with: the middle of the cipher's use, so that both neighbours have marks. Null where it is not in use yet. */
export function firstDay(cipher: CompiledCipher, today: Day): Day | null {
  const use = daysInUse(cipher, today);
  return use === null ? null : Math.floor((use.from + use.to) / 2);
}

/** A day, month or year on or back; the last day of a month that has no such day. */
export function stepped(day: Day, step: Step, by: -1 | 1): Day {
  if (step === 'day') return day + by;
  const { year, month, day: ofMonth } = civilOf(day);
  const months = year * 12 + (month - 1) + by * (step === 'month' ? 1 : 12);
  const [toYear, toMonth] = [Math.floor(months / 12), (months % 12) + 1];
  return dayOf(toYear, toMonth, Math.min(ofMonth, daysInMonth(toYear, toMonth)));
}

/** The fields of a mark as brackets under its plate. */
export function divisionOf({ text, spans }: WrittenMark): Division {
  return {
    key: text,
    groups: spans
      .filter(({ start, end }) => end > start)
      .map(({ field, start, end, text: glyphs, value }) => ({ field: fieldWord(field), start, end, value: value === null ? glyphs : String(value) })),
  };
}

/** The days a mark is looked for in: all of them, or about the day in hand where the cipher does not tell the year. */
export function limitsAround(cipher: CompiledCipher, day: Day | null): { readonly limits?: DaySpan } {
  return cipher.calendar.hasYear || day === null ? {} : { limits: { from: stepped(day, 'year', -1), to: stepped(day, 'year', 1) } };
}
