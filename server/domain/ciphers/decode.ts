import { daysIn } from '../dates/day-span.ts';
import { formatDay, formatSpan } from '../dates/format-day.ts';
import type { Day, DaySpan } from '../dates/day.ts';
import type { Reading } from '../marks/reading.ts';
import type { CompiledCipher } from './compiled-cipher.ts';
import { canDate, daysInQuestion, daysInUse, YEARS_WITHOUT_YEAR, type DayLimits } from './days-in-use.ts';
import type { Candidate, Decoding, Precision, Reason } from './decoding.ts';
import { choicesOfCombination } from './enumerate.ts';
import { isWholeUnit, numberOn } from './field-calendar.ts';
import { rowsOf } from './lattice.ts';
import { firstByWeight } from './ranking.ts';
import { reasonsFor } from './reasons.ts';
import { uncertainPositions, whatSettles, whichGapsSettle, type Question } from './settle.ts';
import type { SpanTable } from './span-table.ts';
import { likeliestSpelling } from './spelling.ts';
import { STEPS_ALLOWED, workOut, type Working } from './work-out.ts';

export type DecodeOptions = {
  /** The day up to which a cipher still in use is looked at. */
  readonly asOf: Day;
  /** Days to keep to: a casting's years of production, say. */
  readonly limits?: DayLimits | undefined;
  /** Whether a glyph seen for certain may be one it is taken for. */
  readonly lookAlikes?: boolean | undefined;
  /** Whether only the dates are wanted: `settle` and `splits` are left empty, and `reasons` where there is a date. Several times as quick. */
  readonly datesOnly?: boolean | undefined;
};

/** At most so many candidates are listed; `Decoding.total` counts them all. */
const CANDIDATES_LISTED = 200;

/** What would settle the reading is worked out only where that costs no more than this. */
const STEPS_TO_SETTLE = 300_000;
/** What working a reading out costs at the least. */
const STEPS_A_LOOK = 300;

const NOTHING_LEFT = { settle: [], splits: [], steps: 0 } as const;

const NOTHING_FOUND = { status: 'none', total: 0, candidates: [], settle: [], splits: [], likelihood: 0 } as const;

/**
 * The dates a reading can mean under a cipher.
 *
 * A *spelling* is a text for each field, in order. A day carries a spelling when every date field's number on that day
 * (`field-calendar.ts`) is one its text stands for, so fields that say the same thing twice have to agree. For the texts that
 * an exception names the days are the exception's, narrowed by the fields it does not name, in place of the table's own or
 * (`replaces: false`) beside them.
 *
 * The likelihood of the reading given a spelling is the product over its glyphs: 1 where it was seen as cast, 1/n for one of n
 * alternatives, 1/(the cipher's distinct glyphs) for an unread one, 1 for what a `*` stands for; with `lookAlikes`, 0.9 for a
 * glyph seen as cast and 0.1 shared among those it may be taken for, where the cipher has any.
 *
 * A candidate is a run of days that one spelling covers, within the days in use and the limits. Spellings that cover exactly
 * the same run are one candidate; its text is the likeliest one's. Its share is days × likelihood over the sum of these.
 * `precision` is the finest unit the fields pin down where the run is one whole such unit, `day` for a single day however it
 * came about, otherwise `span`.
 *
 * `settle` and `splits` are left empty where so much is open that they would cost more than the decoding is allowed to, and
 * a reading that leaves still more open gets the reason `too-little-read` in place of candidates.
 *
 * @example RLKON under *ten* of the worked examples //=> 25 Jul 1939, share 1
 */
export function decode(reading: Reading, cipher: CompiledCipher, options: DecodeOptions): Decoding {
  const days = daysInQuestion(cipher, options.asOf, options.limits ?? {});
  const use = daysInUse(cipher, options.asOf);
  if (days === null || use === null) return { ...NOTHING_FOUND, reasons: [reasonForNoDays(use, cipher, options)], steps: 0 };
  if (!canDate(cipher, days)) return { ...NOTHING_FOUND, reasons: [limitsNeeded()], steps: 0 };

  const rows = rowsOf(reading, cipher, options.lookAlikes ?? false);
  const working = workOut(rows, reading.breaks, cipher, days);
  if (working.found?.givenUp === true) return { ...NOTHING_FOUND, reasons: [tooLittleRead()], steps: working.steps };

  const spans = working.found?.spans ?? null;
  const total = spans?.size ?? 0;
  const weight = working.found?.weight ?? 0;
  const candidates = spans === null ? [] : candidatesOf(working, spans, weight, cipher);
  const datesOnly = options.datesOnly ?? false;
  const left = datesOnly ? NOTHING_LEFT : whatIsLeft({ rows, breaks: reading.breaks, cipher, days }, working, spans);
  return {
    status: total === 0 ? 'none' : total === 1 ? 'dated' : 'several',
    total,
    candidates,
    reasons: datesOnly && total > 0 ? [] : reasonsFor({ reading, rows, cipher, use, days }, candidates),
    settle: left.settle,
    splits: left.splits,
    likelihood: weight / daysIn(days),
    steps: working.steps + left.steps,
  };
}

/**
 * The likelihood of a reading averaged over the days in question, without candidates; 0 where the cipher can't make it, or
 * where too little is read. With the work it took.
 */
export function likelihoodOf(
  reading: Reading,
  cipher: CompiledCipher,
  options: DecodeOptions,
): { readonly likelihood: number; readonly steps: number } {
  const days = daysInQuestion(cipher, options.asOf, options.limits ?? {});
  if (days === null || !canDate(cipher, days)) return { likelihood: 0, steps: 0 };
  const rows = rowsOf(reading, cipher, options.lookAlikes ?? false);
  const { found, steps } = workOut(rows, reading.breaks, cipher, days, { steps: STEPS_ALLOWED, keepSpans: false });
  return { likelihood: found === null || found.givenUp ? 0 : found.weight / daysIn(days), steps };
}

function candidatesOf(working: Working, spans: SpanTable, weight: number, cipher: CompiledCipher): readonly Candidate[] {
  return firstByWeight(spans, CANDIDATES_LISTED).map((index) => {
    const from = spans.from[index] ?? 0;
    const to = spans.to[index] ?? 0;
    const choices = choicesOfCombination(working.links, spans.combination[index] ?? 0);
    return {
      from,
      to,
      precision: precisionOf(from, to, cipher),
      share: spans.weight(index) / weight,
      ...likeliestSpelling(working.links, choices, working.lattice, (field) => numberOn(field, from, cipher.calendar)),
    };
  });
}

function precisionOf(from: Day, to: Day, cipher: CompiledCipher): Precision {
  if (from === to) return 'day';
  return isWholeUnit(cipher.calendar.unit, from, to, cipher.calendar) ? cipher.calendar.unit : 'span';
}

/** What would settle it: a glyph read for certain, or, where all are certain, a gap seen. */
function whatIsLeft(
  question: Question,
  working: Working,
  spans: SpanTable | null,
): Pick<Decoding, 'settle' | 'splits'> & { readonly steps: number } {
  if (spans === null || spans.size <= 1) return NOTHING_LEFT;
  const uncertain = uncertainPositions(question.rows);
  const isGlyph = uncertain.length > 0;
  const places = isGlyph ? uncertain.length : question.rows.length - 1;
  const looks = isGlyph ? uncertain.reduce((sum, position) => sum + (question.rows[position]?.glyphs.length ?? 0), 0) : places;
  if (working.steps * places + STEPS_A_LOOK * looks > STEPS_TO_SETTLE) return NOTHING_LEFT;
  return isGlyph ? { ...whatSettles(question), splits: [] } : { ...whichGapsSettle(question, spans), settle: [] };
}

function reasonForNoDays(use: DaySpan | null, cipher: CompiledCipher, options: DecodeOptions): Reason {
  if (use === null) {
    return { code: 'not-in-use', message: `This cipher comes into use on ${formatDay(cipher.usedFrom)}, after ${formatDay(options.asOf)}` };
  }
  return { code: 'outside-limits', message: `This cipher was in use ${formatSpan(use)}, which is outside the limits` };
}

function limitsNeeded(): Reason {
  return {
    code: 'limits-needed',
    message: `This cipher doesn’t tell the year: set limits no more than ${String(YEARS_WITHOUT_YEAR)} years apart`,
  };
}

function tooLittleRead(): Reason {
  return { code: 'too-little-read', message: 'Too little of the mark is read to list what it can mean: read another glyph, or set limits' };
}
