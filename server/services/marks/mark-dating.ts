import type { CompiledCipher } from '#domain/ciphers/compiled-cipher.ts';
import { decode } from '#domain/ciphers/decode.ts';
import type { DecodeStatus } from '#domain/ciphers/decoding.ts';
import type { Day, DaySpan } from '#domain/dates/day.ts';
import { parseReading } from '#domain/marks/reading.ts';
import type { Reading } from '#domain/marks/reading.ts';

/** What a date mark means under a cipher, as far as the record keeps it. */
export type MarkDating = {
  readonly status: DecodeStatus;
  /** How many dates; the likeliest 200 are in `candidates`. */
  readonly total: number;
  readonly candidates: readonly (DaySpan & { readonly share: number })[];
  readonly likelihood: number;
  /** Why there is none, in a sentence; `null` where there is one. */
  readonly reason: string | null;
};

/** Texts kept; the record repeats itself, but not without end. */
const MOST_KEPT = 50_000;

/** Dates marks under one cipher, each text once. Breaks, look-alikes and limits are as everywhere on the record: no limits, no look-alikes. */
export function markDating(cipher: CompiledCipher, asOf: Day): (text: string) => MarkDating {
  return remembering((text) => {
    const { status, total, candidates, reasons, likelihood } = decode(readingOnRecord(text), cipher, { asOf, datesOnly: true });
    return {
      status,
      total,
      candidates: candidates.map(({ from, to, share }) => ({ from, to, share })),
      likelihood,
      reason: status === 'none' ? (reasons[0]?.message ?? null) : null,
    };
  });
}

/**
 * A reading on record.
 *
 * @throws RangeError for text that is none: it was checked before it was kept.
 */
export function readingOnRecord(text: string): Reading {
  const reading = parseReading(text);
  if (!reading.ok) throw new RangeError('A reading on record is no reading');
  return reading.value;
}

/** The same answer for the same text, worked out once as long as there are not too many. */
export function remembering<Answer>(work: (text: string) => Answer): (text: string) => Answer {
  const known = new Map<string, Answer>();
  return (text) => {
    const before = known.get(text);
    if (before !== undefined) return before;
    if (known.size >= MOST_KEPT) known.clear();
    const answer = work(text);
    known.set(text, answer);
    return answer;
  };
}
