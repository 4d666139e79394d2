import { foldCase, GLYPH_COUNT, glyphIndex, type GlyphIndex } from '../marks/glyphs.ts';
import { BREAK_CHARACTERS } from '../marks/reading.ts';
import type { CipherFault, Report } from './cipher-fault.ts';
import {
  NO_NUMBERS,
  type CompiledDigits,
  type CompiledField,
  type LiteralPiece,
  type NamedNode,
  type NamedText,
  type Numbers,
  type ValueSymbol,
} from './compiled-cipher.ts';
import type { CheckedSet, CheckedValues } from './compile-sets.ts';
import {
  CIPHER_LIMITS,
  type CipherDefinition,
  type DateField,
  type DatedField,
  type LiteralField,
  type OtherField,
} from './definition.ts';
import { cycleOfDigits, FIELD_NUMBERS, FIELD_WORDS } from './field-numbers.ts';

/** A field whose width and symbols have been checked; `compileExceptions` adds the texts that exceptions name in it. */
export type CheckedField = {
  readonly kind: DateField | 'other';
  readonly name: string;
  readonly least: number;
  readonly most: number;
  readonly leadingBreak: string;
  readonly set: CheckedSet;
};

export type CheckedFields = { readonly fields: readonly (CheckedField | LiteralPiece)[]; readonly trailingBreak: string };

/** The year numbers the cipher's life reaches into. */
export type YearsInUse = { readonly first: number; readonly last: number };

const NAME_LENGTH = 40;

/** Checks each field by itself and against the others. A field with a fault is left out of the answer. */
export function checkFields(
  definition: CipherDefinition,
  sets: ReadonlyMap<string, CheckedSet>,
  yearsInUse: YearsInUse | null,
  report: Report,
): CheckedFields {
  const fields: (CheckedField | LiteralPiece)[] = [];
  let breaks = '';
  reportTwins(definition, report);
  definition.fields.forEach((field, index) => {
    const path = ['fields', index];
    if (field.field === 'literal') {
      const literal = splitLiteral(field, breaks, path, report);
      fields.push(...literal.pieces);
      breaks = literal.trailingBreak;
      return;
    }
    const checked = checkField(field, breaks, sets, yearsInUse, path, report);
    if (checked === null) return;
    fields.push(checked);
    breaks = '';
  });
  return { fields, trailingBreak: breaks };
}

/** The field in its final form, with the texts that exceptions name in it. */
export function finishField(field: CheckedField, named: readonly NamedText[]): CompiledField {
  const { kind, name, least, most, leadingBreak, set } = field;
  const shared = { kind, name, least, most, leadingBreak, named };
  if (set.kind === 'digits') return { ...shared, system: 'digits', set: set.digits, namedTree: treeOf(named) };
  const symbols = symbolsOfField(field, set.values, named);
  return {
    ...shared,
    system: 'values',
    symbols,
    symbolsByFirst: Array.from({ length: GLYPH_COUNT }, (_, glyph) => symbols.filter((symbol) => symbol.glyphs[0] === glyph)),
  };
}

/** What the table says of a text, whatever exceptions say: `null` where the field can't hold it. */
export function numbersOfText(field: CheckedField, glyphs: readonly GlyphIndex[]): Numbers | null {
  if (glyphs.length < field.least || glyphs.length > field.most) return null;
  if (field.set.kind === 'digits') return numbersOfDigits(field, field.set.digits, glyphs);
  const spelled = glyphs.join();
  const symbol = field.set.values.symbols.find((candidate) => candidate.glyphs.join() === spelled);
  return symbol === undefined ? null : suitedNumbers(field.kind, symbol.values, field.set.values.repeatsEvery);
}

function reportTwins(definition: CipherDefinition, report: Report): void {
  const seen = new Set<string>();
  definition.fields.forEach((field, index) => {
    if (field.field === 'literal') return;
    const claim = field.field === 'other' ? `other ${detailName(field)}` : field.field;
    if (seen.has(claim)) {
      const what = field.field === 'other' ? `two details are called “${detailName(field)}”` : `two fields claim the ${FIELD_WORDS[field.field]}`;
      report('same-field-twice', ['fields', index], what);
    }
    seen.add(claim);
  });
}

function checkField(
  field: DatedField | OtherField,
  leadingBreak: string,
  sets: ReadonlyMap<string, CheckedSet>,
  yearsInUse: YearsInUse | null,
  path: CipherFault['path'],
  report: Report,
): CheckedField | null {
  const width = checkWidth(field, path, report);
  const set = sets.get(field.symbols);
  if (set === undefined) report('unknown-set', [...path, 'symbols'], `there is no symbol set “${field.symbols.slice(0, NAME_LENGTH)}”`);
  if (field.field === 'other') {
    if (detailName(field).trim() === '' || detailName(field).length > NAME_LENGTH) {
      report('impossible-name', [...path, 'name'], `a detail’s name has 1 to ${String(NAME_LENGTH)} characters`);
    }
  } else if (field.week !== undefined && field.field !== 'week') {
    report('misplaced-week-rule', [...path, 'week'], 'only a week field has a rule for weeks');
  }
  if (width === null || set === undefined) return null;

  const checked: CheckedField = { kind: field.field, name: detailName(field), ...width, leadingBreak, set };
  if (set.kind === 'values') checkValues(checked, set.values, path, report);
  else if (checked.kind === 'other') {
    if (set.digits.glyphs.length === 0) report('impossible-width', [...path, 'symbols'], 'the set has no symbol to fill the field with');
  } else checkDigits(checked.kind, checked, set.digits, yearsInUse, path, report);
  return checked;
}

function checkWidth(
  field: DatedField | OtherField,
  path: CipherFault['path'],
  report: Report,
): { readonly least: number; readonly most: number } | null {
  const { width } = field;
  const [least, most] = typeof width === 'number' ? [width, width] : width;
  if (Number.isInteger(least) && Number.isInteger(most) && least >= 1 && least <= most && most <= CIPHER_LIMITS.fieldWidth) {
    return { least, most };
  }
  report('impossible-width', [...path, 'width'], `a width is 1 to ${String(CIPHER_LIMITS.fieldWidth)} glyphs, the least first`);
  return null;
}

function checkValues(field: CheckedField, set: CheckedValues, path: CipherFault['path'], report: Report): void {
  if (set.repeatsEvery !== null && field.kind !== 'year') {
    report('cycle-on-other-field', [...path, 'symbols'], 'only a year’s symbols can repeat');
    return;
  }
  const fitting = set.symbols.filter((symbol) => symbol.glyphs.length >= field.least && symbol.glyphs.length <= field.most);
  if (fitting.length === 0) {
    report('impossible-width', [...path, 'width'], 'no symbol of the set has a length that the field allows');
  } else if (field.kind !== 'other' && !fitting.some((symbol) => !isEmpty(suitedNumbers(field.kind, symbol.values, set.repeatsEvery)))) {
    report('not-a-value', [...path, 'symbols'], `no symbol of the set stands for a ${FIELD_WORDS[field.kind]}`);
  }
}

/** A number must fit its field's width, and the set must have the digits to write it. */
function checkDigits(
  kind: DateField,
  width: { readonly least: number; readonly most: number },
  set: CompiledDigits,
  yearsInUse: YearsInUse | null,
  path: CipherFault['path'],
  report: Report,
): void {
  const { digits } = FIELD_NUMBERS[kind];
  if (width.most > digits) {
    report('impossible-width', [...path, 'width'], `a ${FIELD_WORDS[kind]} has at most ${plural(digits, 'digit')}`);
    return;
  }
  if (kind !== 'year' && width.most < digits) {
    report('impossible-width', [...path, 'width'], `a ${FIELD_WORDS[kind]} takes up to ${plural(digits, 'digit')}`);
    return;
  }
  const missing = digitsNeeded(kind, width, yearsInUse).filter((digit) => set.glyphsOf[digit]?.length === 0);
  if (missing.length > 0) {
    report('missing-digit', [...path, 'symbols'], `the ${FIELD_WORDS[kind]} needs a symbol for ${missing.join(', ')}`);
  }
}

function digitsNeeded(
  kind: DateField,
  width: { readonly least: number; readonly most: number },
  yearsInUse: YearsInUse | null,
): readonly number[] {
  if (kind === 'year' && yearsInUse === null) return [];
  const first = kind === 'year' ? (yearsInUse?.first ?? 0) : FIELD_NUMBERS[kind].least;
  const last = kind === 'year' ? (yearsInUse?.last ?? 0) : FIELD_NUMBERS[kind].greatest;
  const needed = new Set<number>();
  for (let number = first; number <= last && needed.size < 10; number += 1) {
    for (let glyphs = width.least; glyphs <= width.most; glyphs += 1) {
      const text = writeNumber(kind, number, glyphs, width.least === width.most);
      for (const figure of text ?? '') needed.add(Number(figure));
    }
  }
  return [...needed].sort((a, b) => a - b);
}

/**
 * A number in this many figures; `null` where it has no such form. Fixed width: zeros before it. Otherwise no leading zero.
 * A year of fewer than four figures shows its last ones.
 */
export function writeNumber(kind: DateField, number: number, glyphs: number, fixed: boolean): string | null {
  const shown = kind === 'year' && glyphs < FIELD_NUMBERS.year.digits ? String(number).padStart(4, '0').slice(-glyphs) : String(number);
  if (fixed) return shown.length <= glyphs ? shown.padStart(glyphs, '0') : null;
  return shown.length === glyphs && (shown === '0' || !shown.startsWith('0')) ? shown : null;
}

function numbersOfDigits(field: CheckedField, set: CompiledDigits, glyphs: readonly GlyphIndex[]): Numbers | null {
  let number = 0;
  let before = -1;
  let first = -1;
  for (const glyph of glyphs) {
    const digit = glyph === set.repeater ? before : (set.digitOf[glyph] ?? -1);
    if (digit < 0) return null;
    if (first < 0) first = digit;
    number = number * 10 + digit;
    before = digit;
  }
  if (field.kind === 'other') return NO_NUMBERS;
  if (field.least !== field.most && glyphs.length > 1 && first === 0) return NO_NUMBERS;
  const every = field.kind === 'year' ? cycleOfDigits(glyphs.length) : 0;
  const { least, greatest } = FIELD_NUMBERS[field.kind];
  return every > 0 || (number >= least && number <= greatest) ? { values: [number], every } : NO_NUMBERS;
}

/** The values a field of this kind can have, ascending. */
function suitedNumbers(kind: DateField | 'other', values: readonly number[], repeatsEvery: number | null): Numbers {
  if (kind === 'other') return NO_NUMBERS;
  if (kind === 'year' && repeatsEvery !== null) {
    return { values: ascending(values.map((value) => value % repeatsEvery)), every: repeatsEvery };
  }
  const { least, greatest } = FIELD_NUMBERS[kind];
  return { values: ascending(values.filter((value) => value >= least && value <= greatest)), every: 0 };
}

function symbolsOfField(field: CheckedField, set: CheckedValues, named: readonly NamedText[]): readonly ValueSymbol[] {
  const keyOf = new Map<string, number>();
  return set.symbols
    .filter((symbol) => symbol.glyphs.length >= field.least && symbol.glyphs.length <= field.most)
    .map(({ glyphs, values }) => {
      const numbers = suitedNumbers(field.kind, values, set.repeatsEvery);
      const spelled = glyphs.join();
      const name = named.find((text) => text.glyphs.join() === spelled);
      if (name !== undefined) return { glyphs, numbers, key: name.key };
      const meaning = numbers.values.join();
      const key = keyOf.get(meaning) ?? keyOf.size;
      keyOf.set(meaning, key);
      return { glyphs, numbers, key };
    });
}

/** A literal's glyphs, cut at its breaks: where a break is cast, a field ends. */
function splitLiteral(
  field: LiteralField,
  breaksBefore: string,
  path: CipherFault['path'],
  report: Report,
): { readonly pieces: readonly LiteralPiece[]; readonly trailingBreak: string } {
  const pieces: LiteralPiece[] = [];
  let glyphs: GlyphIndex[] = [];
  let leadingBreak = breaksBefore;
  let count = 0;
  const finish = (): void => {
    if (glyphs.length === 0) return;
    pieces.push({ kind: 'literal', glyphs, leadingBreak });
    glyphs = [];
    leadingBreak = '';
  };
  for (const character of foldCase(field.text.slice(0, CIPHER_LIMITS.literalLength * 4))) {
    const glyph = glyphIndex(character);
    count += 1;
    if (glyph !== null) glyphs.push(glyph);
    else if (BREAK_CHARACTERS.includes(character)) {
      finish();
      leadingBreak += character;
    } else {
      report('impossible-literal', [...path, 'text'], 'fixed lettering holds A–Z, 0–9 and breaks');
      return { pieces: [], trailingBreak: '' };
    }
  }
  finish();
  if (count === 0 || count > CIPHER_LIMITS.literalLength) {
    report('impossible-literal', [...path, 'text'], `fixed lettering has 1 to ${String(CIPHER_LIMITS.literalLength)} characters`);
  }
  return { pieces, trailingBreak: leadingBreak };
}

function treeOf(named: readonly NamedText[]): NamedNode | null {
  if (named.length === 0) return null;
  const grow = (texts: readonly (readonly GlyphIndex[])[]): NamedNode => {
    const byFirst = new Map<GlyphIndex, (readonly GlyphIndex[])[]>();
    for (const [first, ...rest] of texts) {
      if (first === undefined) continue;
      const branch = byFirst.get(first);
      if (branch === undefined) byFirst.set(first, [rest]);
      else branch.push(rest);
    }
    return {
      children: new Map([...byFirst].map(([glyph, rests]) => [glyph, grow(rests)])),
      ends: texts.some((text) => text.length === 0),
    };
  };
  return grow(named.map((text) => text.glyphs));
}

function detailName(field: DatedField | OtherField): string {
  return field.field === 'other' ? (field.name ?? 'other') : field.field;
}

function isEmpty(numbers: Numbers): boolean {
  return numbers.values.length === 0;
}

function ascending(values: readonly number[]): readonly number[] {
  return [...new Set(values)].sort((a, b) => a - b);
}

function plural(count: number, noun: string): string {
  return `${String(count)} ${noun}${count === 1 ? '' : 's'}`;
}
