import { includesDay } from '../dates/day-span.ts';
import type { Day } from '../dates/day.ts';
import { glyphAt, type GlyphIndex } from '../marks/glyphs.ts';
import { writeNumber } from './compile-fields.ts';
import type { CompiledCipher, CompiledException, CompiledField, DigitsField } from './compiled-cipher.ts';
import { daysInUse } from './days-in-use.ts';
import type { FieldSpan } from './decoding.ts';
import type { DateField } from './definition.ts';
import { isAmong, numberOn } from './field-calendar.ts';

export type WrittenMark = {
  /** In the mark notation: the glyphs, and the breaks that literals cast. */
  readonly text: string;
  readonly spans: readonly FieldSpan[];
  /** Name of an `other` field → its glyphs. */
  readonly details: Readonly<Record<string, string>>;
};

export type WriteOptions = {
  /** The day up to which a cipher still in use is looked at. */
  readonly asOf: Day;
  /** At most so many marks; `MARKS_WRITTEN` where it is not said. */
  readonly most?: number | undefined;
};

export const MARKS_WRITTEN = 1_000;

/** What stands in each field of one mark, as glyphs. */
type FieldTexts = readonly (readonly GlyphIndex[])[];

/**
 * Every mark the day would carry: `decode` finds the day again from each of them. Empty on days the cipher is not in use or has
 * no symbols for. One mark for each spelling: symbols that share a value, the repeater used or not, exceptions where they hold,
 * and each text of an `other` field. As those can be millions, no more than `most` marks are given: all date spellings with
 * the first text of the `other` fields, then with the next, and so on.
 */
export function write(day: Day, cipher: CompiledCipher, options: WriteOptions): readonly WrittenMark[] {
  const use = daysInUse(cipher, options.asOf);
  if (use === null || !includesDay(use, day)) return [];
  const most = options.most ?? MARKS_WRITTEN;
  const marks = new Map<string, WrittenMark>();
  const add = (texts: FieldTexts): void => {
    const key = texts.map((text) => text.join()).join('|');
    if (!marks.has(key)) marks.set(key, markOf(texts, day, cipher));
  };

  const plain = cipher.fields.map((field) => textsOn(field, day, cipher, most));
  for (const texts of combined(cipher, plain)) {
    if (marks.size >= most) break;
    if (!cipher.exceptions.some((exception) => exception.replaces && matches(exception, texts, cipher))) add(texts);
  }
  for (const exception of cipher.exceptions) {
    if (!includesDay(exception.span, day)) continue;
    const named = plain.map((texts, index) => textsNamed(exception, index, cipher) ?? texts);
    for (const texts of combined(cipher, named)) {
      if (marks.size >= most) break;
      add(texts);
    }
  }
  return [...marks.values()];
}

/** All texts of a field on a day, at most so many. */
function textsOn(field: CompiledField, day: Day, cipher: CompiledCipher, most: number): FieldTexts {
  if (field.kind === 'literal') return [field.glyphs];
  if (field.kind === 'other') {
    return field.system === 'values' ? field.symbols.map((symbol) => symbol.glyphs) : fillings(field, most);
  }
  const number = numberOn(field.kind, day, cipher.calendar);
  if (field.system === 'values') {
    return field.symbols.filter((symbol) => isAmong(symbol.numbers, number)).map((symbol) => symbol.glyphs);
  }
  return numberTexts(field, field.kind, number, most);
}

function numberTexts(field: DigitsField, kind: DateField, number: number, most: number): FieldTexts {
  const texts: (readonly GlyphIndex[])[] = [];
  for (let width = field.least; width <= field.most; width += 1) {
    const figures = writeNumber(kind, number, width, field.least === field.most);
    if (figures === null) continue;
    let started: (readonly GlyphIndex[])[] = [[]];
    for (let index = 0; index < figures.length; index += 1) {
      const symbols = field.set.glyphsOf[Number(figures[index])] ?? [];
      const again = index > 0 && figures[index] === figures[index - 1] && field.set.repeater !== null;
      started = extended(started, again ? [...symbols, field.set.repeater] : symbols, most);
    }
    texts.push(...started);
  }
  return texts;
}

/** Texts of an `other` field written in digits, the shortest first. */
function fillings(field: DigitsField, most: number): FieldTexts {
  const { glyphs, repeater } = field.set;
  const texts: (readonly GlyphIndex[])[] = [];
  let started: (readonly GlyphIndex[])[] = [[]];
  for (let width = 1; width <= field.most && texts.length < most; width += 1) {
    started = extended(started, repeater === null || width === 1 ? glyphs : [...glyphs, repeater], most);
    if (width >= field.least) texts.push(...started);
  }
  return texts.slice(0, most);
}

function extended(texts: FieldTexts, glyphs: readonly (GlyphIndex | null)[], most: number): (readonly GlyphIndex[])[] {
  const longer: (readonly GlyphIndex[])[] = [];
  for (const text of texts) {
    for (const glyph of glyphs) {
      if (longer.length === most) return longer;
      if (glyph !== null) longer.push([...text, glyph]);
    }
  }
  return longer;
}

/** One text for each field, in every combination; `other` fields change last. */
function* combined(cipher: CompiledCipher, texts: readonly FieldTexts[]): Generator<FieldTexts> {
  const order = texts
    .map((_, index) => index)
    .sort((one, other) => Number(cipher.fields[other]?.kind === 'other') - Number(cipher.fields[one]?.kind === 'other'));
  const chosen: (readonly GlyphIndex[])[] = texts.map(() => []);
  function* choose(depth: number): Generator<FieldTexts> {
    const field = order[depth];
    if (field === undefined) {
      yield [...chosen];
      return;
    }
    for (const text of texts[field] ?? []) {
      chosen[field] = text;
      yield* choose(depth + 1);
    }
  }
  yield* choose(0);
}

function textsNamed(exception: CompiledException, index: number, cipher: CompiledCipher): FieldTexts | null {
  const key = exception.named.get(index);
  const field = cipher.fields[index];
  if (key === undefined || field === undefined || field.kind === 'literal') return null;
  return field.named.filter((text) => text.key === key).map((text) => text.glyphs);
}

function matches(exception: CompiledException, texts: FieldTexts, cipher: CompiledCipher): boolean {
  for (const index of exception.named.keys()) {
    const [named] = textsNamed(exception, index, cipher) ?? [];
    if (named?.join() !== texts[index]?.join()) return false;
  }
  return true;
}

function markOf(texts: FieldTexts, day: Day, cipher: CompiledCipher): WrittenMark {
  const spans: FieldSpan[] = [];
  const details: [string, string][] = [];
  let written = '';
  let start = 0;
  for (const [index, field] of cipher.fields.entries()) {
    const text = (texts[index] ?? []).map(glyphAt).join('');
    const isDated = field.kind !== 'literal' && field.kind !== 'other';
    spans.push({
      field: field.kind,
      start,
      end: start + text.length,
      text,
      value: isDated ? numberOn(field.kind, day, cipher.calendar) : null,
    });
    if (field.kind === 'other') details.push([field.name, text]);
    written += field.leadingBreak + text;
    start += text.length;
  }
  return { text: written + cipher.trailingBreak, spans, details: Object.fromEntries(details) };
}
