import { z } from 'zod';
import { civilOf, parseDay } from '#domain/dates/day.ts';
import type { DatePrecision, FactKind } from '#domain/vocabulary.ts';
import { IsoDay } from '../common.ts';

/** How one field of a fact is asked for and shown. `key` is the field's name in the payload, or in a row of a list. */
export type FactField = {
  readonly key: string;
  readonly label: string;
  readonly hint?: string;
  /** May be left blank; the payload then holds null, or an empty list. */
  readonly optional?: true;
} & (
  /** `blank`: what the payload holds where it was left blank, if that is not null. */
  | { readonly control: 'line'; readonly mono?: true; readonly blank?: '' }
  | { readonly control: 'prose' }
  /** A JSON number. */
  | { readonly control: 'number'; readonly unit?: string }
  /** A whole number as text, of any length. */
  | { readonly control: 'whole' }
  | { readonly control: 'yes-no' }
  | { readonly control: 'choice'; readonly choices: readonly { readonly value: string; readonly label: string }[] }
  /** `{ from, to }` of ISO days; `open`: either end may be blank. */
  | { readonly control: 'days'; readonly open?: true }
  /** `{ from, to }` of whole numbers as text; `open`: which ends may be blank. */
  | { readonly control: 'numbers'; readonly open: 'last' | 'both' }
  /** `{ from, to }` of JSON numbers, the last of which may be blank. */
  | { readonly control: 'counts'; readonly unit: string }
  /** The id of another fact. `within` names the field whose fact the choices must belong to. */
  | { readonly control: 'fact'; readonly of: FactKind; readonly within?: string }
  /** The id of an account of serial ranges; blank for the account its first source gives. */
  | { readonly control: 'account' }
  | { readonly control: 'rows'; readonly columns: readonly FactField[]; readonly row: string; readonly most: number }
  | { readonly control: 'cipher' }
);

/** What has a page of its own in the catalogue. */
export type FactPage = 'maker' | 'model' | 'partType' | 'casting' | 'serialRange' | 'cipher';

/**
 * What the register knows of one kind of fact before any database: what a contribution of it says, how that is asked for and shown. What
 * is done about it on the server stands in the module of the same name under `server/services/kinds`.
 */
export type KindForm<Payload extends z.ZodType = z.ZodType> = {
  readonly kind: FactKind;
  /** For a heading and, in small letters, within a sentence. */
  readonly name: string;
  readonly names: string;
  /** One sentence: what such an entry is for. */
  readonly about: string;
  /** On whose page of the catalogue such a fact is read. */
  readonly page: FactPage;
  /** What whoever works from it should beware of. */
  readonly caution?: { readonly title: string; readonly text: string };
  readonly payload: Payload;
  readonly fields: readonly FactField[];
};

export function kindForm<Payload extends z.ZodType>(form: KindForm<Payload>): KindForm<Payload> {
  return form;
}

/** Limits of texts, as the columns have them. */
export const FACT_LIMITS = { label: 200, prose: 4_000, rows: 40, number: 32 } as const;

export const Label = z.string().trim().min(1, 'Missing').max(FACT_LIMITS.label);
export const Prose = z.string().trim().min(1, 'Missing').max(FACT_LIMITS.prose);
export const OptionalLabel = Label.nullable();
export const OptionalProse = Prose.nullable();

/** Numbers as they stand on castings and in parts books. */
export const CastNumber = z
  .string()
  .trim()
  .toUpperCase()
  .max(FACT_LIMITS.number)
  .regex(/^[A-Z0-9](?:[A-Z0-9 ./-]*[A-Z0-9])?$/, 'Capitals, digits, and between them spaces, points, strokes or hyphens');

export const CalendarYear = z.int().min(1500).max(2199);

const OUT_OF_ORDER = 'Ends before it begins';

export const Days = z
  .strictObject({ from: IsoDay, to: IsoDay })
  .refine(({ from, to }) => from <= to, { error: OUT_OF_ORDER, path: ['to'] });

/** At least one end is known. */
export const OpenDays = z
  .strictObject({ from: IsoDay.nullable(), to: IsoDay.nullable() })
  .refine(({ from, to }) => from !== null || to !== null, { error: 'Give at least one of the two, or leave it out', path: ['from'] })
  .refine(({ from, to }) => from === null || to === null || from <= to, { error: OUT_OF_ORDER, path: ['to'] });

/** As PostgreSQL's bigint can hold it, with room for the next. */
export const SerialNumber = z.string().trim().regex(/^\d{1,18}$/, 'A whole number of at most 18 digits');

export const Numbers = z
  .strictObject({ from: SerialNumber, to: SerialNumber.nullable() })
  .refine(({ from, to }) => to === null || BigInt(from) <= BigInt(to), { error: OUT_OF_ORDER, path: ['to'] });

/** Both ends blank: every number. */
export const OpenNumbers = z
  .strictObject({ from: SerialNumber.nullable(), to: SerialNumber.nullable() })
  .refine(({ from, to }) => from === null || to === null || BigInt(from) <= BigInt(to), { error: OUT_OF_ORDER, path: ['to'] });

export const DATE_MEANING_CHOICES = [
  { value: 'built', label: 'Built' },
  { value: 'dispatched', label: 'Dispatched' },
  { value: 'sold', label: 'Sold' },
  { value: 'model-year', label: 'Model year' },
] as const;

export const DATE_PRECISION_CHOICES = [
  { value: 'day', label: 'To the day' },
  { value: 'month', label: 'To the month' },
  { value: 'year', label: 'To the year' },
] as const;

/** The ends of a span told to the month or the year are a month's or a year's first and last day. */
export function hasPrecision({ from, to }: { readonly from: string; readonly to: string }, precision: DatePrecision): boolean {
  const [first, last] = [parseDay(from), parseDay(to)];
  if (precision === 'day' || !first.ok || !last.ok) return true;
  const begins = civilOf(first.value);
  const next = civilOf(last.value + 1);
  const isWholeMonths = begins.day === 1 && next.day === 1;
  return precision === 'month' ? isWholeMonths : isWholeMonths && begins.month === 1 && next.month === 1;
}
