import type { z } from 'zod';
import type { tryCipher } from '#contract/cipher-workbench.ts';
import { formatSpan } from '#domain/dates/format-day.ts';
import { readingOf } from '#server/services/ciphers/try-cipher.ts';
import type { TriedCipher } from '#server/services/ciphers/try-cipher.ts';
import type { MarkDating } from '#server/services/marks/mark-dating.ts';

type Answer = z.input<(typeof tryCipher)['answer']>;

/** Dates told of one mark. */
const MOST_DATES = 10;

export function presentTriedCipher({ marks, draft, inForce, changed, rows, unlisted }: TriedCipher): Answer {
  return {
    marks,
    draft,
    inForce,
    changed,
    rows: rows.map((row) => ({ item: row.item, draft: presentReading(row.draft), inForce: row.inForce && presentReading(row.inForce) })),
    unlisted,
  };
}

function presentReading(dating: MarkDating): Answer['rows'][number]['draft'] {
  return { reading: readingOf(dating), dates: dating.candidates.slice(0, MOST_DATES).map(formatSpan) };
}
