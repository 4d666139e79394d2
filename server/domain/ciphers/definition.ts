/**
 * A maker's date cipher as data: the fields in the order they stand on the casting, and the symbol sets they are written in.
 * This is the shape a definition is stored and exchanged in; `compileCipher` (compile.ts) checks its meaning.
 */

/** Fields that say something about the date, and the two that do not (`other`, `literal`). */
export const DATE_FIELDS = ['year', 'quarter', 'month', 'week', 'day', 'dayOfYear'] as const;
export type DateField = (typeof DATE_FIELDS)[number];

export const FIELD_KINDS = [...DATE_FIELDS, 'other', 'literal'] as const;
export type FieldKind = (typeof FIELD_KINDS)[number];

/**
 * How weeks are numbered. `iso`: ISO 8601, the year is the ISO week-year. `simple`: days 1–7 of the year are week 1 and so on.
 * `first-full-sunday`: week 1 is the first full Sunday-to-Saturday week (49 CFR 574.5); the days before it belong to the last week of the year before.
 */
export const WEEK_RULES = ['iso', 'simple', 'first-full-sunday'] as const;
export type WeekRule = (typeof WEEK_RULES)[number];

/** Limits of a definition. Widths and lengths count glyphs. */
export const CIPHER_LIMITS = {
  fields: 12,
  symbolSets: 24,
  symbolsPerSet: 64,
  valuesPerSymbol: 64,
  exceptions: 200,
  fieldWidth: 8,
  literalLength: 8,
  earliestYear: 1500,
  latestYear: 2199,
  largestValue: 9999,
} as const;

export type FieldWidth = number | readonly [least: number, most: number];

export type LiteralField = { readonly field: 'literal'; readonly text: string };
export type OtherField = {
  readonly field: 'other';
  readonly symbols: string;
  readonly width: FieldWidth;
  /** What the detail is called in an answer, `shift` say; `other` where it has no name. */
  readonly name?: string | undefined;
};
export type DatedField = {
  readonly field: DateField;
  readonly symbols: string;
  readonly width: FieldWidth;
  /** Only on a `week` field; `iso` where it is not said. */
  readonly week?: WeekRule | undefined;
};
export type FieldDefinition = LiteralField | OtherField | DatedField;

/** Symbol → digit. A number is written with as many symbols as it has digits. */
export type DigitsSet = {
  readonly kind: 'digits';
  readonly symbols: Readonly<Record<string, string>>;
  /** Stands for "the same as the digit before it" in the same field. */
  readonly repeater?: string | undefined;
};

/** Symbol → number, or the numbers it may stand for. A symbol is one glyph or a run of glyphs (`JAN`). */
export type ValuesSet = {
  readonly kind: 'values';
  readonly symbols: Readonly<Record<string, number | readonly number[]>>;
  /** Years only: the cycle's length; the symbol then stands for every year congruent to its own. */
  readonly repeatsEvery?: number | undefined;
};
export type SymbolSet = DigitsSet | ValuesSet;

/** A dated departure from the table. */
export type CipherException = {
  /** Field → the symbols that stand in it, exactly. Fields not named keep their meaning. */
  readonly fields: Readonly<Partial<Record<DateField | 'other', string>>>;
  /** First and last day, ISO, both included. */
  readonly from: string;
  readonly to: string;
  /** `true` (the default): the table's own reading of those symbols is taken away. `false`: it stands beside the exception. */
  readonly replaces?: boolean | undefined;
};

export type CipherDefinition = {
  readonly fields: readonly FieldDefinition[];
  /** `numerals` (0–9) is always there and may not be redefined. */
  readonly symbolSets: Readonly<Record<string, SymbolSet>>;
  /** `MM-DD`: code year Y runs from that day of Y for twelve months. */
  readonly yearStart?: string | undefined;
  /** First and last day in use, ISO, both included; `null` for the last = still in use at `asOf`. */
  readonly usedFrom: string;
  readonly usedTo: string | null;
  readonly exceptions?: readonly CipherException[] | undefined;
};
