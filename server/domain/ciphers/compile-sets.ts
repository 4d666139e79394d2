import { foldCase, glyphIndex, GLYPH_COUNT, type GlyphIndex } from '../marks/glyphs.ts';
import type { Report } from './cipher-fault.ts';
import type { CompiledDigits } from './compiled-cipher.ts';
import { CIPHER_LIMITS, type CipherDefinition, type DigitsSet, type ValuesSet } from './definition.ts';

/** A `values` set with its symbols as glyphs; which numbers suit depends on the field. */
export type CheckedValues = {
  readonly symbols: readonly { readonly glyphs: readonly GlyphIndex[]; readonly values: readonly number[] }[];
  readonly repeatsEvery: number | null;
};

export type CheckedSet =
  | { readonly kind: 'digits'; readonly digits: CompiledDigits }
  | { readonly kind: 'values'; readonly values: CheckedValues };

const NUMERALS = 'numerals';

const DIGITS = '0123456789';

/** Name → set, `numerals` included. A set with a fault is there as far as it can be understood, so that its fields can be checked too. */
export function compileSets(definition: CipherDefinition, report: Report): ReadonlyMap<string, CheckedSet> {
  const sets = new Map<string, CheckedSet>([[NUMERALS, { kind: 'digits', digits: compileNumerals() }]]);
  const names = Object.keys(definition.symbolSets);
  if (names.length > CIPHER_LIMITS.symbolSets) {
    report('too-many-sets', ['symbolSets'], `a cipher has at most ${String(CIPHER_LIMITS.symbolSets)} symbol sets`);
    return sets;
  }
  for (const name of names) {
    const set = definition.symbolSets[name];
    if (set === undefined) continue;
    if (name === NUMERALS) {
      report('numerals-redefined', ['symbolSets', name], 'numerals are always the figures 0–9 and can’t be given again');
    } else if (set.kind === 'digits') {
      sets.set(name, { kind: 'digits', digits: compileDigits(set, ['symbolSets', name], report) });
    } else {
      sets.set(name, { kind: 'values', values: compileValues(set, ['symbolSets', name], report) });
    }
  }
  return sets;
}

/** The glyphs a set writes with. */
export function glyphsOfSet(set: CheckedSet): readonly GlyphIndex[] {
  if (set.kind === 'values') return set.values.symbols.flatMap((symbol) => symbol.glyphs);
  return set.digits.repeater === null ? set.digits.glyphs : [...set.digits.glyphs, set.digits.repeater];
}

/** The glyphs of a text, upper-cased; `null` where one is no glyph. */
export function glyphsOf(text: string): readonly GlyphIndex[] | null {
  const glyphs: GlyphIndex[] = [];
  for (const character of foldCase(text)) {
    const glyph = glyphIndex(character);
    if (glyph === null) return null;
    glyphs.push(glyph);
  }
  return glyphs;
}

function compileNumerals(): CompiledDigits {
  return digitsFrom(
    [...DIGITS].flatMap((figure, digit) => {
      const glyph = glyphIndex(figure);
      return glyph === null ? [] : [{ glyph, digit }];
    }),
    null,
  );
}

function compileDigits(set: DigitsSet, path: readonly string[], report: Report): CompiledDigits {
  const entries: { glyph: GlyphIndex; digit: number }[] = [];
  const seen = new Map<GlyphIndex, string>();
  for (const [symbol, digit] of listedSymbols(set.symbols, path, report)) {
    const glyphs = glyphsOf(symbol);
    const [glyph] = glyphs ?? [];
    if (glyph === undefined || glyphs?.length !== 1) {
      report('not-a-symbol', [...path, 'symbols', symbol], `the symbol of a digit is one glyph A–Z or 0–9, not “${symbol}”`);
      continue;
    }
    if (digit.length !== 1 || !DIGITS.includes(digit)) {
      report('not-a-digit', [...path, 'symbols', symbol], `“${symbol}” must stand for one digit 0–9`);
      continue;
    }
    const before = seen.get(glyph);
    if (before !== undefined) {
      report('same-symbol-twice', [...path, 'symbols', symbol], `“${symbol}” and “${before}” are the same symbol`);
      continue;
    }
    seen.set(glyph, symbol);
    entries.push({ glyph, digit: DIGITS.indexOf(digit) });
  }
  return digitsFrom(entries, set.repeater === undefined ? null : compileRepeater(set.repeater, seen, path, report));
}

function compileRepeater(
  repeater: string,
  symbols: ReadonlyMap<GlyphIndex, string>,
  path: readonly string[],
  report: Report,
): GlyphIndex | null {
  const glyphs = glyphsOf(repeater);
  const [glyph] = glyphs ?? [];
  if (glyph === undefined || glyphs?.length !== 1) {
    report('not-a-symbol', [...path, 'repeater'], 'the repeater is one glyph A–Z or 0–9');
    return null;
  }
  if (symbols.has(glyph)) {
    report('same-symbol-twice', [...path, 'repeater'], `“${repeater}” already stands for a digit`);
    return null;
  }
  return glyph;
}

function compileValues(set: ValuesSet, path: readonly string[], report: Report): CheckedValues {
  const symbols: { glyphs: readonly GlyphIndex[]; values: readonly number[] }[] = [];
  const seen = new Map<string, string>();
  for (const [symbol, value] of listedSymbols(set.symbols, path, report)) {
    const glyphs = glyphsOf(symbol);
    if (glyphs === null || glyphs.length === 0 || glyphs.length > CIPHER_LIMITS.fieldWidth) {
      const most = String(CIPHER_LIMITS.fieldWidth);
      report('not-a-symbol', [...path, 'symbols', symbol], `a symbol is 1 to ${most} glyphs A–Z or 0–9, not “${symbol.slice(0, 20)}”`);
      continue;
    }
    const spelled = glyphs.join();
    const before = seen.get(spelled);
    if (before !== undefined) {
      report('same-symbol-twice', [...path, 'symbols', symbol], `“${symbol}” and “${before}” are the same symbol`);
      continue;
    }
    seen.set(spelled, symbol);
    symbols.push({ glyphs, values: compileNumbers(value, symbol, [...path, 'symbols', symbol], report) });
  }
  return { symbols, repeatsEvery: compileCycle(set.repeatsEvery, path, report) };
}

function compileNumbers(
  value: number | readonly number[],
  symbol: string,
  path: readonly string[],
  report: Report,
): readonly number[] {
  const numbers = typeof value === 'number' ? [value] : value;
  if (numbers.length === 0) {
    report('not-a-value', path, `“${symbol}” must stand for a number`);
    return [];
  }
  if (numbers.length > CIPHER_LIMITS.valuesPerSymbol) {
    report('too-many-values', path, `a symbol stands for at most ${String(CIPHER_LIMITS.valuesPerSymbol)} numbers`);
    return [];
  }
  if (!numbers.every((number) => Number.isInteger(number) && number >= 0 && number <= CIPHER_LIMITS.largestValue)) {
    report('not-a-value', path, `“${symbol}” must stand for whole numbers from 0 to ${String(CIPHER_LIMITS.largestValue)}`);
    return [];
  }
  return numbers;
}

function compileCycle(repeatsEvery: number | undefined, path: readonly string[], report: Report): number | null {
  if (repeatsEvery === undefined) return null;
  if (Number.isInteger(repeatsEvery) && repeatsEvery >= 1 && repeatsEvery <= CIPHER_LIMITS.largestValue) return repeatsEvery;
  report('impossible-cycle', [...path, 'repeatsEvery'], 'a cycle is a whole number of years, 1 at least');
  return null;
}

/** The symbols with their values; none where there are more than a set may have, so that a huge one is refused at once. */
function listedSymbols<Value>(
  symbols: Readonly<Record<string, Value>>,
  path: readonly string[],
  report: Report,
): readonly (readonly [string, Value])[] {
  const count = Object.keys(symbols).length;
  if (count <= CIPHER_LIMITS.symbolsPerSet) return Object.entries(symbols);
  report('too-many-symbols', [...path, 'symbols'], `a set has at most ${String(CIPHER_LIMITS.symbolsPerSet)} symbols`);
  return [];
}

function digitsFrom(
  entries: readonly { readonly glyph: GlyphIndex; readonly digit: number }[],
  repeater: GlyphIndex | null,
): CompiledDigits {
  const digitOf = new Int8Array(GLYPH_COUNT).fill(-1);
  for (const { glyph, digit } of entries) digitOf[glyph] = digit;
  return {
    digitOf,
    glyphsOf: [...DIGITS].map((_, digit) => entries.filter((entry) => entry.digit === digit).map((entry) => entry.glyph)),
    glyphs: entries.map((entry) => entry.glyph),
    repeater,
  };
}
