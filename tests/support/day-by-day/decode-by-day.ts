import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { lookAlikesOf } from '#domain/marks/look-alikes.ts';
import type { Glyph, Reading } from '#domain/marks/reading.ts';
import { dayNumber } from './calendar-by-day.ts';
import { setOf, spellingsOn, type Texts } from './spellings-by-day.ts';

/**
 * The decoder a second time, by its definition and nothing else: goes through every day of the cipher's life, spells the day in
 * every way, weighs each spelling against the reading glyph by glyph, and only then looks which days run together.
 */

export type ByDayOptions = {
  readonly asOf: number;
  readonly limits?: { readonly from?: number; readonly to?: number };
  readonly lookAlikes?: boolean;
};

export type SpellingByDay = { readonly texts: Texts; readonly likelihood: number; readonly runs: readonly { from: number; to: number }[] };

export type ByDay = {
  readonly spellings: readonly SpellingByDay[];
  /** `from to` → share. */
  readonly shares: ReadonlyMap<string, number>;
  readonly likelihood: number;
  readonly days: number;
};

const NONE: ByDay = { spellings: [], shares: new Map(), likelihood: 0, days: 0 };

export function decodeByDay(reading: Reading, definition: CipherDefinition, options: ByDayOptions): ByDay {
  const first = Math.max(dayNumber(definition.usedFrom), options.limits?.from ?? -Infinity);
  const last = Math.min(definition.usedTo === null ? options.asOf : dayNumber(definition.usedTo), options.limits?.to ?? Infinity);
  if (first > last || (!hasYear(definition) && isMoreThanFiveYears(first, last))) return NONE;

  const found = new Map<string, { texts: Texts; likelihood: number; days: number[] }>();
  const weigh = scaleFor(reading, definition, options.lookAlikes ?? false);
  for (let day = first; day <= last; day += 1) {
    for (const texts of spellingsOn(day, definition)) {
      const key = texts.join('|');
      const known = found.get(key);
      if (known !== undefined) {
        known.days.push(day);
        continue;
      }
      const likelihood = weigh(texts);
      if (likelihood > 0) found.set(key, { texts, likelihood, days: [day] });
    }
  }
  const spellings = [...found.values()].map(({ texts, likelihood, days }) => ({ texts, likelihood, runs: runsOf(days) }));
  const weights = weightsOf(spellings);
  const total = sum([...weights.values()]);
  return {
    spellings,
    shares: new Map([...weights].map(([span, weight]) => [span, weight / total])),
    likelihood: total / (last - first + 1),
    days: last - first + 1,
  };
}

/** Expected entropy over the candidates, in bits, once it is known what `lookAt` sees of the spelling truly cast. */
export function entropyLeft(answer: ByDay, lookAt: (texts: Texts) => string): number {
  const outcomes = new Map<string, SpellingByDay[]>();
  for (const spelling of answer.spellings) {
    const seen = lookAt(spelling.texts);
    const outcome = outcomes.get(seen);
    if (outcome === undefined) outcomes.set(seen, [spelling]);
    else outcome.push(spelling);
  }
  const total = sum([...weightsOf(answer.spellings).values()]);
  return sum(
    [...outcomes.values()].map((spellings) => {
      const weights = [...weightsOf(spellings).values()];
      const outcome = sum(weights);
      return (outcome / total) * sum(weights.map((weight) => -(weight / outcome) * Math.log2(weight / outcome)));
    }),
  );
}

/** The glyph truly cast where the reading has one at `position`; a `*` has none. */
export function glyphCastAt(position: number, reading: Reading): (texts: Texts) => string {
  return (texts) => {
    const mark = texts.join('');
    return mark[placeInMark(position, mark.length, reading)]!;
  };
}

/** Whether a field ends at a place of the reading. */
export function endsAt(place: number, reading: Reading): (texts: Texts) => string {
  return (texts) => String(fieldEnds(texts).has(placeInMark(place, texts.join('').length, reading)));
}

function weightsOf(spellings: readonly SpellingByDay[]): ReadonlyMap<string, number> {
  const weights = new Map<string, number>();
  for (const { likelihood, runs } of spellings) {
    for (const { from, to } of runs) {
      const span = `${from} ${to}`;
      weights.set(span, (weights.get(span) ?? 0) + likelihood * (to - from + 1));
    }
  }
  return weights;
}

/** Likelihood of the reading, given the texts cast. */
function scaleFor(reading: Reading, definition: CipherDefinition, lookAlikes: boolean): (texts: Texts) => number {
  const distinct = allGlyphs(definition).size;
  const used = usedGlyphs(definition);
  const hasRun = reading.glyphs.some((glyph) => glyph.kind === 'run');
  const count = reading.glyphs.length - (hasRun ? 1 : 0);
  return (texts) => {
    const mark = texts.join('');
    if (mark.length < count || (mark.length > count && !hasRun)) return 0;
    const ends = fieldEnds(texts);
    if (reading.breaks.some((place) => !ends.has(placeInMark(place, mark.length, reading)))) return 0;
    let likelihood = 1;
    reading.glyphs.forEach((glyph, position) => {
      if (glyph.kind === 'run') return;
      likelihood *= chanceOf(glyph, mark[placeInMark(position, mark.length, reading)]!, distinct, used, lookAlikes);
    });
    return likelihood;
  };
}

function chanceOf(seen: Exclude<Glyph, { kind: 'run' }>, cast: string, distinct: number, used: ReadonlySet<string>, lookAlikes: boolean): number {
  if (seen.kind === 'unread') return 1 / distinct;
  if (seen.kind === 'oneOf') return seen.glyphs.includes(cast) ? 1 / seen.glyphs.length : 0;
  const others = lookAlikes ? [...lookAlikesOf(seen.glyph)].filter((other) => used.has(other)) : [];
  if (others.length === 0) return seen.glyph === cast ? 1 : 0;
  if (seen.glyph === cast) return 0.9;
  return others.includes(cast) ? 0.1 / others.length : 0;
}

/** Where a place of the reading lies in a mark of that length: what comes after the `*` is counted from the end. */
function placeInMark(place: number, length: number, reading: Reading): number {
  const run = reading.glyphs.findIndex((glyph) => glyph.kind === 'run');
  return run < 0 || place <= run ? place : length - (reading.glyphs.length - place);
}

function fieldEnds(texts: Texts): ReadonlySet<number> {
  const ends = new Set([0]);
  let end = 0;
  for (const text of texts) ends.add((end += text.length));
  return ends;
}

function runsOf(days: readonly number[]): readonly { from: number; to: number }[] {
  const runs: { from: number; to: number }[] = [];
  for (const day of days) {
    const last = runs.at(-1);
    if (last?.to === day - 1) last.to = day;
    else runs.push({ from: day, to: day });
  }
  return runs;
}

function allGlyphs(definition: CipherDefinition): ReadonlySet<string> {
  const sets = Object.values(definition.symbolSets).flatMap((set) => [
    ...Object.keys(set.symbols),
    ...(set.kind === 'digits' ? [set.repeater ?? ''] : []),
  ]);
  return new Set([...'0123456789', ...sets.join('').toUpperCase(), ...literalGlyphs(definition)]);
}

function usedGlyphs(definition: CipherDefinition): ReadonlySet<string> {
  const sets = definition.fields.flatMap((field) => {
    if (field.field === 'literal') return [];
    const set = setOf(field, definition);
    return [...Object.keys(set.symbols), ...(set.kind === 'digits' ? [set.repeater ?? ''] : [])];
  });
  return new Set([...sets.join('').toUpperCase(), ...literalGlyphs(definition)]);
}

function literalGlyphs(definition: CipherDefinition): string {
  return definition.fields
    .map((field) => (field.field === 'literal' ? field.text.toUpperCase().replace(/[^A-Z0-9]/g, '') : ''))
    .join('');
}

function hasYear(definition: CipherDefinition): boolean {
  return definition.fields.some((field) => field.field === 'year');
}

function isMoreThanFiveYears(first: number, last: number): boolean {
  const date = new Date(first * 86_400_000);
  date.setUTCFullYear(date.getUTCFullYear() + 5);
  return last >= date.getTime() / 86_400_000;
}

function sum(numbers: readonly number[]): number {
  return numbers.reduce((total, number) => total + number, 0);
}
