import { compileCipher } from '#domain/ciphers/compile.ts';
import { daysInUse } from '#domain/ciphers/days-in-use.ts';
import { decode } from '#domain/ciphers/decode.ts';
import type { Decoding } from '#domain/ciphers/decoding.ts';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { write } from '#domain/ciphers/write.ts';
import { daysIn, includesDay } from '#domain/dates/day-span.ts';
import type { Day, DaySpan } from '#domain/dates/day.ts';
import { parseReading } from '#domain/marks/reading.ts';
import type { Reading } from '#domain/marks/reading.ts';

/** A day written in a cipher and read back. */
export type WorkedDay = {
  readonly day: Day;
  /** The marks that day would carry, in the mark notation; the first is the one worked. Empty where the cipher has no symbols for it. */
  readonly marks: readonly string[];
  readonly reading: Reading | null;
  readonly decoding: Decoding | null;
};

/** Spellings shown of one day; a cipher with a shift letter has as many as there are letters. */
const SPELLINGS = 12;
/** A prime, so that one day's choice says nothing about the next. */
const STRIDE = 7919;
/** A cipher without a year is read back within a year either way. */
const YEAR = 366;

/** The days a cipher was in use up to today; null for a definition that makes no sense or has not begun. */
export function lifeOf(definition: CipherDefinition, today: Day): DaySpan | null {
  const compiled = compileCipher(definition);
  return compiled.ok ? daysInUse(compiled.value, today) : null;
}

/** Today's choice of day out of a cipher's life: the same for everyone all day, another tomorrow. */
export function choiceOfDay(today: Day, life: DaySpan): Day {
  const length = daysIn(life);
  return life.from + ((((today * STRIDE) % length) + length) % length);
}

/** Writes a day and reads it back, as the register itself would; null for a definition that makes no sense or a day outside its use. */
export function workDay(definition: CipherDefinition, day: Day, today: Day): WorkedDay | null {
  const compiled = compileCipher(definition);
  if (!compiled.ok) return null;
  const life = daysInUse(compiled.value, today);
  if (life === null || !includesDay(life, day)) return null;
  const marks = write(day, compiled.value, { asOf: today, most: SPELLINGS }).map(({ text }) => text);
  const parsed = marks[0] === undefined ? null : parseReading(marks[0]);
  if (parsed === null || !parsed.ok) return { day, marks: [], reading: null, decoding: null };
  const limits = compiled.value.calendar.hasYear ? {} : { limits: { from: day - YEAR, to: day + YEAR } };
  return { day, marks, reading: parsed.value, decoding: decode(parsed.value, compiled.value, { asOf: today, ...limits }) };
}
