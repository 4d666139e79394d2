import type { CipherDefinition, CipherException, DateField, FieldDefinition, FieldWidth, SymbolSet } from '#domain/ciphers/definition.ts';
import { dayNumber, shownOn } from './calendar-by-day.ts';

/** Texts of the fields in order; literals with breaks inside are several. */
export type Texts = readonly string[];

const NUMERALS: SymbolSet = { kind: 'digits', symbols: Object.fromEntries([...'0123456789'].map((digit) => [digit, digit])) };
const BREAKS = /[ \-./]+/;

/** Every way a day is spelled on the casting, by going through the definition as it stands. */
export function spellingsOn(day: number, definition: CipherDefinition): readonly Texts[] {
  const spelled = new Map<string, Texts>();
  const exceptions = definition.exceptions ?? [];
  const add = (texts: Texts): void => void spelled.set(texts.join('|'), texts);
  const all = definition.fields.map((field) => textsOn(field, day, definition));
  for (const texts of combinations(all)) {
    if (!exceptions.some((exception) => exception.replaces !== false && names(exception, texts, definition))) add(texts.flat());
  }
  for (const exception of exceptions) {
    if (day < dayNumber(exception.from) || day > dayNumber(exception.to)) continue;
    const named = definition.fields.map((field, index) => {
      const text = namedText(exception, field, definition);
      return text === null ? all[index]! : [[text]];
    });
    for (const texts of combinations(named)) add(texts.flat());
  }
  return [...spelled.values()];
}

/** The set a field is written in. */
export function setOf(field: FieldDefinition, definition: CipherDefinition): SymbolSet {
  if (field.field === 'literal') throw new Error('a literal has no symbols');
  return field.symbols === 'numerals' ? NUMERALS : definition.symbolSets[field.symbols]!;
}

function textsOn(field: FieldDefinition, day: number, definition: CipherDefinition): readonly Texts[] {
  if (field.field === 'literal') return [field.text.toUpperCase().split(BREAKS).filter((piece) => piece !== '')];
  const set = setOf(field, definition);
  const widths = widthsOf(field.width);
  if (field.field === 'other') {
    const texts = set.kind === 'values' ? Object.keys(set.symbols) : widths.flatMap((width) => runsOf(set, width));
    return texts.filter((text) => widths.includes(text.length)).map((text) => [text.toUpperCase()]);
  }
  const shown = shownOn(field.field, day, definition);
  if (set.kind === 'values') {
    return Object.entries(set.symbols)
      .filter(([symbol, value]) => widths.includes(symbol.length) && standsFor([value].flat(), set.repeatsEvery, shown))
      .map(([symbol]) => [symbol.toUpperCase()]);
  }
  return widths.flatMap((width) => {
    const figures = figuresOf(field.field, shown, width, widths.length === 1);
    return figures === null ? [] : symbolsFor(figures, set).map((text) => [text]);
  });
}

function widthsOf(width: FieldWidth): number[] {
  const [least, most] = typeof width === 'number' ? [width, width] : width;
  return Array.from({ length: most - least + 1 }, (_, index) => least + index);
}

function standsFor(values: readonly number[], cycle: number | undefined, shown: number): boolean {
  return values.some((value) => (cycle === undefined ? value === shown : (value - shown) % cycle === 0));
}

function figuresOf(field: DateField, shown: number, width: number, fixed: boolean): string | null {
  const figures = field === 'year' ? String(shown).slice(-width) : String(shown);
  if (fixed) return figures.length > width ? null : figures.padStart(width, '0');
  if (figures.length !== width) return null;
  return width > 1 && figures.startsWith('0') ? null : figures;
}

function symbolsFor(figures: string, set: Extract<SymbolSet, { kind: 'digits' }>): readonly string[] {
  let texts = [''];
  [...figures].forEach((figure, index) => {
    const symbols = Object.keys(set.symbols).filter((symbol) => set.symbols[symbol] === figure);
    if (index > 0 && figures[index - 1] === figure && set.repeater !== undefined) symbols.push(set.repeater);
    texts = texts.flatMap((text) => symbols.map((symbol) => text + symbol.toUpperCase()));
  });
  return texts;
}

function runsOf(set: Extract<SymbolSet, { kind: 'digits' }>, width: number): readonly string[] {
  let texts = [''];
  for (let index = 0; index < width; index += 1) {
    const symbols = Object.keys(set.symbols);
    if (index > 0 && set.repeater !== undefined) symbols.push(set.repeater);
    texts = texts.flatMap((text) => symbols.map((symbol) => text + symbol));
  }
  return texts;
}

function names(exception: CipherException, texts: readonly Texts[], definition: CipherDefinition): boolean {
  return definition.fields.every((field, index) => {
    const named = namedText(exception, field, definition);
    return named === null || named === texts[index]!.join('');
  });
}

/** The text the exception wants in the field; `null` where it names none. Several `other` fields: the one without a name. */
function namedText(exception: CipherException, field: FieldDefinition, definition: CipherDefinition): string | null {
  if (field.field === 'literal') return null;
  const others = definition.fields.filter((other) => other.field === 'other').length;
  if (field.field === 'other' && others > 1 && field.name !== undefined && field.name !== 'other') return null;
  return exception.fields[field.field]?.toUpperCase() ?? null;
}

function* combinations(all: readonly (readonly Texts[])[]): Generator<readonly Texts[]> {
  const [first, ...rest] = all;
  if (first === undefined) {
    yield [];
    return;
  }
  for (const texts of first) for (const others of combinations(rest)) yield [texts, ...others];
}
