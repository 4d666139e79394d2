import type { Day } from '../dates/day.ts';
import type { FieldKind } from './definition.ts';

/** What a decoder answers. Positions count glyphs from 0; `after: n` is the place between glyph n−1 and glyph n. */

export const PRECISIONS = ['day', 'week', 'month', 'quarter', 'year', 'span'] as const;
export type Precision = (typeof PRECISIONS)[number];

export const DECODE_STATUSES = ['dated', 'several', 'none'] as const;
export type DecodeStatus = (typeof DECODE_STATUSES)[number];

export const REASON_CODES = [
  'no-such-year',
  'no-such-quarter',
  'no-such-month',
  'no-such-week',
  'no-such-day',
  'fields-disagree',
  'leading-zero',
  'not-in-use',
  'outside-limits',
  'symbol-not-in-cipher',
  'too-few-glyphs',
  'too-many-glyphs',
  'field-cannot-end-at-break',
  'limits-needed',
  'too-little-read',
] as const;
export type ReasonCode = (typeof REASON_CODES)[number];

/** Glyphs [start, end) of the mark as the cipher would have cast them, and the number they stand for (null for a literal). */
export type FieldSpan = {
  readonly field: FieldKind;
  readonly start: number;
  readonly end: number;
  readonly text: string;
  readonly value: number | null;
};

export type Candidate = {
  readonly from: Day;
  readonly to: Day;
  readonly precision: Precision;
  /** Its part of the probability over all days; all candidates, listed or not, sum to 1. */
  readonly share: number;
  readonly spans: readonly FieldSpan[];
  /** Name of an `other` field → its glyphs. */
  readonly details: Readonly<Record<string, string>>;
};

export type Reason = { readonly code: ReasonCode; readonly message: string };

/** Expected entropy left, in bits, if this glyph were read for certain. */
export type Settle = { readonly position: number; readonly bits: number };

/** Expected entropy left, in bits, if it could be seen whether a field ends after glyph `after`. */
export type Split = { readonly after: number; readonly bits: number };

export type Decoding = {
  readonly status: DecodeStatus;
  /** How many candidates there are; `candidates` holds the first 200, by share, then by date. */
  readonly total: number;
  readonly candidates: readonly Candidate[];
  readonly reasons: readonly Reason[];
  readonly settle: readonly Settle[];
  readonly splits: readonly Split[];
  /** Likelihood of the reading averaged over the days in use (and within the limits); ranks ciphers against each other. */
  readonly likelihood: number;
  /** Work done, in inner steps of the enumeration: what the bench and the worst-case test count. */
  readonly steps: number;
};
