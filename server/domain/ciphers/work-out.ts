import type { DaySpan } from '../dates/day.ts';
import type { CompiledCipher } from './compiled-cipher.ts';
import { enumerate, type Allowed, type Enumeration } from './enumerate.ts';
import { yearsBetween } from './field-calendar.ts';
import { buildLattice, type Lattice, type Row } from './lattice.ts';
import { linkFields, type Link } from './links.ts';

/** A reading worked through one cipher: the ways its fields can be spelled, and the spans of days these mean. */
export type Working = {
  readonly lattice: Lattice;
  readonly links: readonly Link[];
  /** `null` where the reading can't be spelled at all. */
  readonly found: Enumeration | null;
  readonly steps: number;
};

/** Beyond this the work is given up: the reading leaves too much open to be worth listing. */
export const STEPS_ALLOWED = 1_400_000;

/** `breaks` counts glyphs of the reading; `days` are those in question. */
export function workOut(
  rows: readonly (Row | null)[],
  breaks: readonly number[],
  cipher: CompiledCipher,
  days: DaySpan,
  allowed: Allowed = { steps: STEPS_ALLOWED, keepSpans: true },
): Working {
  const lattice = buildLattice(rows, breaks, cipher);
  const { links, spelled, steps } = linkFields(cipher, lattice, yearsBetween(days.from, days.to, cipher.calendar));
  if (!spelled) return { lattice, links, found: null, steps };
  const found = enumerate(cipher, lattice, links, days, allowed);
  return { lattice, links, found, steps: steps + found.steps };
}
