import type { Day, DaySpan } from '../dates/day.ts';
import type { GlyphIndex } from '../marks/glyphs.ts';
import type { GlyphMask } from './glyph-mask.ts';
import type { DateField, WeekRule } from './definition.ts';

/**
 * A definition that has been checked, in the form the decoder works with: glyphs as indexes, days as integers, every symbol
 * with the numbers its field can give it. Only `compileCipher` makes one.
 */
export type CompiledCipher = {
  /** In the order they stand on the casting; a literal with breaks inside is several. */
  readonly fields: readonly CompiledField[];
  readonly calendar: CipherCalendar;
  /** Last day `null`: still in use. */
  readonly usedFrom: Day;
  readonly usedTo: Day | null;
  readonly exceptions: readonly CompiledException[];
  /** Distinct glyphs of all sets, `numerals`, literals and repeaters: what a `?` chooses from. */
  readonly distinctGlyphs: number;
  /** Glyphs that stand in some field. */
  readonly usedGlyphs: readonly GlyphIndex[];
  readonly glyphMask: GlyphMask;
  /** Fewest and most glyphs of a mark. */
  readonly least: number;
  readonly most: number;
  /** Break characters a literal puts at the end of the mark. */
  readonly trailingBreak: string;
};

/** What turns a number in a field into days. */
export type CipherCalendar = {
  readonly hasYear: boolean;
  /** Month and day on which code years begin, where the cipher says so. */
  readonly yearStart: { readonly month: number; readonly day: number } | null;
  /** The rule of the `week` field, where there is one. */
  readonly week: WeekRule | null;
  /** What the fields pin down at best. */
  readonly unit: 'year' | 'quarter' | 'month' | 'week' | 'day';
};

export type CompiledField = LiteralPiece | DigitsField | ValuesField;

export type LiteralPiece = {
  readonly kind: 'literal';
  readonly glyphs: readonly GlyphIndex[];
  /** Break characters written before it. */
  readonly leadingBreak: string;
};

type SymbolField = {
  readonly kind: DateField | 'other';
  /** What a detail is called in an answer. */
  readonly name: string;
  readonly least: number;
  readonly most: number;
  readonly leadingBreak: string;
  /** Texts that an exception names in this field. */
  readonly named: readonly NamedText[];
};

/** Written with one symbol a digit. */
export type DigitsField = SymbolField & {
  readonly system: 'digits';
  readonly set: CompiledDigits;
  /** Root of the named texts, glyph by glyph; `null` where no exception names this field. */
  readonly namedTree: NamedNode | null;
};

/** Written with one symbol. */
export type ValuesField = SymbolField & {
  readonly system: 'values';
  /** Those of the set whose length suits the field's width. */
  readonly symbols: readonly ValueSymbol[];
  /** Glyph → the symbols that begin with it. */
  readonly symbolsByFirst: readonly (readonly ValueSymbol[])[];
};

export type CompiledDigits = {
  /** Glyph → digit, −1 for none. */
  readonly digitOf: Int8Array;
  /** Digit → its glyphs. */
  readonly glyphsOf: readonly (readonly GlyphIndex[])[];
  readonly glyphs: readonly GlyphIndex[];
  readonly repeater: GlyphIndex | null;
};

export type ValueSymbol = {
  readonly glyphs: readonly GlyphIndex[];
  readonly numbers: Numbers;
  /** Symbols of one field with the same key stand for the same numbers and are named by the same exceptions. */
  readonly key: number;
};

/**
 * Numbers a field's text stands for, ascending, only those the field can have. With `every` above 0 they are residues:
 * every number congruent to one of them modulo `every`.
 */
export type Numbers = { readonly values: readonly number[]; readonly every: number };

/** A text that an exception names: glyphs, what the table says of them, and the exceptions that name them. */
export type NamedText = {
  readonly glyphs: readonly GlyphIndex[];
  readonly numbers: Numbers;
  readonly key: number;
};

export type NamedNode = { readonly children: ReadonlyMap<GlyphIndex, NamedNode>; readonly ends: boolean };

export type CompiledException = {
  readonly span: DaySpan;
  readonly replaces: boolean;
  /** Index of the field in `CompiledCipher.fields` → key of the text it must hold. */
  readonly named: ReadonlyMap<number, number>;
};

export const NO_NUMBERS: Numbers = { values: [], every: 0 };
