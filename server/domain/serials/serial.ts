import { fail, succeed, type Result } from '../result.ts';

/**
 * Serials as stamped on machines: a prefix (which may be empty), a number, and perhaps a suffix of letters.
 *
 * Case, spaces, hyphens, dots, commas and leading zeros do not matter. The look-alike pairs O/0 and I/1, and a small l among
 * digits for 1, are matched and reported. Two rounds are made over the prefixes the model is known by, the longest first: one
 * that takes every glyph as typed, then one that lets look-alikes stand for each other. Where no known prefix matches, the last
 * run of digits is the number.
 *
 * | typed      | known prefixes | prefix | number | suffix | taken otherwise |
 * | ---------- | -------------- | ------ | ------ | ------ | --------------- |
 * | `3c-01207` | `3C`           | `3C`   | 1207   |        |                 |
 * | `BO12`     | `B`, `BO`      | `BO`   | 12     |        |                 |
 * | `B012`     | `BO`           | `BO`   | 12     |        | 0 as O          |
 * | `3C12O7 A` | `3C`           | `3C`   | 1207   | `A`    | O as 0          |
 * | `K44`      | `3C`           | `K`    | 44     |        |                 |
 */

export const SERIAL_LIMITS = {
  /** Characters of a serial as typed, separators counted. */
  glyphs: 40,
  /**
   * The greatest number; the one after it still fits a signed 64-bit column, where ranges keep the first number past their end.
   */
  number: 2n ** 63n - 2n,
} as const;

/** One glyph that was matched as its look-alike. `at` counts characters of the text as typed, from 0. */
export type Substitution = { readonly at: number; readonly seen: string; readonly taken: string };

export type ParsedSerial = {
  readonly asStamped: string;
  /** Upper-cased, without separators; one of the known prefixes unless none matched. */
  readonly prefix: string;
  readonly number: bigint;
  /** The digits the number was read from, leading zeros kept. */
  readonly digits: string;
  readonly suffix: string;
  readonly substitutions: readonly Substitution[];
};

export const SERIAL_FAULTS = ['too-long', 'not-a-glyph', 'no-digits', 'number-too-large'] as const;
/** `at` counts characters of the text as typed, from 0. */
export type SerialFault = { readonly code: (typeof SERIAL_FAULTS)[number]; readonly at: number };

/** A glyph upper-cased, as typed, and its place in the text. */
type Stamp = { readonly at: number; readonly glyph: string; readonly typed: string };

type SplitSerial = {
  readonly prefix: string;
  readonly digits: string;
  readonly suffix: string;
  readonly substitutions: readonly Substitution[];
};

/**
 * Reads a serial. `prefixes` are those of the model's series, in any spelling that differs only in case and separators; include
 * the empty one for a series of bare numbers. Whether a known prefix matched shows by comparing `prefix` with them.
 *
 * @example parseSerial('3C12O7', ['3C'])  //=> prefix '3C', number 1207n, substitutions [{ at: 4, seen: 'O', taken: '0' }]
 */
export function parseSerial(text: string, prefixes: readonly string[]): Result<ParsedSerial, SerialFault> {
  const stamps = stampsOf(text);
  if (!stamps.ok) return stamps;
  const split = splitAtKnownPrefix(stamps.value, prefixes.map(plainPrefix)) ?? splitAtLastNumber(stamps.value);
  if (split === null) return fail({ code: 'no-digits', at: 0 });
  const number = BigInt(split.digits);
  if (number > SERIAL_LIMITS.number) return fail({ code: 'number-too-large', at: stamps.value[split.prefix.length]?.at ?? 0 });
  return succeed({ asStamped: text, number, ...split });
}

/** The serial without separators and in capitals, leading zeros kept; `parseSerial` with the same prefixes undoes it. */
export function writeSerial(serial: Pick<ParsedSerial, 'prefix' | 'digits' | 'suffix'>): string {
  return serial.prefix + serial.digits + serial.suffix;
}

/** A prefix as serials are compared by: capitals, no separators. */
export function plainPrefix(prefix: string): string {
  return Array.from(prefix.normalize('NFKC').toUpperCase())
    .filter((glyph) => !isSeparator(glyph))
    .join('');
}

function stampsOf(text: string): Result<readonly Stamp[], SerialFault> {
  const stamps: Stamp[] = [];
  let at = 0;
  for (const character of text) {
    if (at >= SERIAL_LIMITS.glyphs) return fail({ code: 'too-long', at });
    const typed = character.normalize('NFKC');
    if (/^[A-Za-z0-9]$/.test(typed)) stamps.push({ at, glyph: typed.toUpperCase(), typed });
    else if (!isSeparator(typed)) return fail({ code: 'not-a-glyph', at });
    at += 1;
  }
  return succeed(stamps);
}

/**
 * NFKC turns the spaces and hyphens that may not break into plain ones; U+2010 and the en dash are what text editors make of a
 * hyphen.
 */
function isSeparator(glyph: string): boolean {
  return /^[\s.,\-\u2010\u2013]$/.test(glyph);
}

function splitAtKnownPrefix(stamps: readonly Stamp[], prefixes: readonly string[]): SplitSerial | null {
  const longestFirst = prefixes.toSorted((one, other) => other.length - one.length);
  for (const mayFold of [false, true]) {
    for (const prefix of longestFirst) {
      const split = splitAfter(prefix, stamps, mayFold);
      if (split !== null) return split;
    }
  }
  return null;
}

function splitAfter(prefix: string, stamps: readonly Stamp[], mayFold: boolean): SplitSerial | null {
  const glyphs = Array.from(prefix);
  const readsAsPrefix = glyphs.every((glyph, place) => {
    const stamp = stamps[place];
    return stamp !== undefined && (stamp.glyph === glyph || (mayFold && mayPassFor(stamp, glyph)));
  });
  if (!readsAsPrefix) return null;
  const end = endOfNumber(stamps, glyphs.length);
  const number = stamps.slice(glyphs.length, end);
  const suffix = stamps.slice(end);
  if (number.length === 0 || suffix.some((stamp) => isDigit(stamp.glyph))) return null;
  if (!mayFold && !number.every((stamp) => isDigit(stamp.glyph))) return null;
  // With nothing before it, a number typed in letters alone is a word.
  if (prefix === '' && !number.some((stamp) => isDigit(stamp.glyph))) return null;
  return assemble(glyphs, stamps.slice(0, glyphs.length), number, suffix);
}

/**
 * Without a known prefix: the last run of digits is the number, from its first sure digit on; what stands before it is the
 * prefix.
 */
function splitAtLastNumber(stamps: readonly Stamp[]): SplitSerial | null {
  const lastDigit = stamps.findLastIndex((stamp) => isDigit(stamp.glyph));
  if (lastDigit === -1) return null;
  let runStart = lastDigit;
  for (let place = lastDigit; place >= 0; place -= 1) {
    const stamp = stamps[place];
    if (stamp === undefined || digitOf(stamp) === null) break;
    if (isDigit(stamp.glyph)) runStart = place;
  }
  const before = stamps.slice(0, runStart);
  const end = endOfNumber(stamps, runStart);
  return assemble(
    before.map((stamp) => stamp.glyph),
    before,
    stamps.slice(runStart, end),
    stamps.slice(end),
  );
}

function assemble(
  prefix: readonly string[],
  prefixStamps: readonly Stamp[],
  numberStamps: readonly Stamp[],
  suffixStamps: readonly Stamp[],
): SplitSerial {
  const digits = numberStamps.map((stamp) => digitOf(stamp) ?? stamp.glyph);
  const taken = [...prefix, ...digits];
  return {
    prefix: prefix.join(''),
    digits: digits.join(''),
    suffix: suffixStamps.map((stamp) => stamp.glyph).join(''),
    substitutions: [...prefixStamps, ...numberStamps].flatMap((stamp, place) => {
      const glyph = taken[place] ?? stamp.glyph;
      return glyph === stamp.glyph ? [] : [{ at: stamp.at, seen: stamp.typed, taken: glyph }];
    }),
  };
}

/**
 * Where the run of digits and look-alikes from `start` ends. A small l at its end is a suffix: only inside a number does it pass
 * for 1.
 */
function endOfNumber(stamps: readonly Stamp[], start: number): number {
  const stop = stamps.findIndex((stamp, place) => place >= start && digitOf(stamp) === null);
  let end = stop === -1 ? stamps.length : stop;
  while (end > start && stamps[end - 1]?.typed === 'l') end -= 1;
  return end;
}

function mayPassFor(stamp: Stamp, glyph: string): boolean {
  const digit = digitOf(stamp);
  return digit !== null && digit === digitOf({ at: stamp.at, glyph, typed: glyph });
}

/** The digit a glyph is or may be read as. */
function digitOf(stamp: Stamp): string | null {
  if (isDigit(stamp.glyph)) return stamp.glyph;
  if (stamp.glyph === 'O') return '0';
  return stamp.glyph === 'I' || stamp.typed === 'l' ? '1' : null;
}

function isDigit(glyph: string): boolean {
  return glyph >= '0' && glyph <= '9';
}
