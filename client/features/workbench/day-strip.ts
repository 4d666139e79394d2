import type { CompiledCipher } from '#domain/ciphers/compiled-cipher.ts';
import { daysInUse } from '#domain/ciphers/days-in-use.ts';
import { write } from '#domain/ciphers/write.ts';
import type { WrittenMark } from '#domain/ciphers/write.ts';
import { civilOf, dayOf, daysInMonth } from '#domain/dates/day.ts';
import type { Day, DaySpan } from '#domain/dates/day.ts';
import type { Division } from '../../ui/plate-brackets.tsx';
import { fieldWord } from '../decode/divisions.ts';

/**
 * Days that would all carry the same marks, as far as they run on: one day, or the week, month or year a cipher tells no closer. No marks
 * outside the cipher's use, or where it has no symbols; such days stand alone.
 */
export type DaysWritten = DaySpan & { readonly marks: readonly WrittenMark[] };

export const STEPS = ['day', 'month', 'year'] as const;
export type Step = (typeof STEPS)[number];

/** Marks worked out of one day; a cipher with a shift letter has as many as there are letters. */
const MARKS = 12;

/** No run is followed further than this: a code year, with room. */
const LONGEST_RUN = 400;

/** The days that go with one day, and so many runs on either side, in their order. */
export function stripOf(cipher: CompiledCipher, day: Day, around: number, today: Day): readonly DaysWritten[] {
  const marksOn = (one: Day) => write(one, cipher, { asOf: today, most: MARKS });
  const inHand = runOver(day, marksOn);
  const strip = [inHand];
  for (let place = 0; place < around; place += 1) {
    strip.unshift(runOver((strip[0] ?? inHand).from - 1, marksOn));
    strip.push(runOver((strip.at(-1) ?? inHand).to + 1, marksOn));
  }
  return strip;
}

function runOver(day: Day, marksOn: (one: Day) => readonly WrittenMark[]): DaysWritten {
  const marks = marksOn(day);
  const texts = textsOf(marks);
  const isAlike = (one: Day) => marks.length > 0 && textsOf(marksOn(one)) === texts;
  let [from, to] = [day, day];
  while (day - from < LONGEST_RUN && isAlike(from - 1)) from -= 1;
  while (to - day < LONGEST_RUN && isAlike(to + 1)) to += 1;
  return { from, to, marks };
}

function textsOf(marks: readonly WrittenMark[]): string {
  return marks.map(({ text }) => text).join(' | ');
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
