import type { DaySpan } from '../dates/day.ts';
import { formatSpan } from '../dates/format-day.ts';
import { glyphAt, glyphIndex } from '../marks/glyphs.ts';
import { writeGlyph, type Reading } from '../marks/reading.ts';
import type { CompiledCipher, CompiledField } from './compiled-cipher.ts';
import type { Candidate, Reason } from './decoding.ts';
import { DATE_FIELDS, type DateField } from './definition.ts';
import { FIRST_POSSIBLE_DAY, LAST_POSSIBLE_DAY, restrictRuns, yearBegins, yearsBetween, type Runs } from './field-calendar.ts';
import { FIELD_NUMBERS, FIELD_WORDS } from './field-numbers.ts';
import { buildLattice, type Row } from './lattice.ts';
import { linkFields, Walker, type Choice, type Link } from './links.ts';
import { workOut } from './work-out.ts';

/** At most so many reasons are given. */
const REASONS_LISTED = 20;

/** Splits looked at: the failed ones among them become reasons. */
const SPLITS_KEPT = 24;
/** Work allowed for finding out why splits fail whose fields can all be read. */
const STEPS_ALLOWED = 100_000;

/** How far from right a field is: its text can't be read though its width is right, each glyph too many or too few, a break inside it. */
const COST = { text: 1, glyph: 2, break: 2 } as const;

/** Splits further from right than this are not worth telling. */
const COST_TOLD = 6;

const ALL_DAYS: DaySpan = { from: FIRST_POSSIBLE_DAY, to: LAST_POSSIBLE_DAY };

/** The reading, its cipher, the days in use, and of these the days in question. */
export type Case = {
  readonly reading: Reading;
  readonly rows: readonly (Row | null)[];
  readonly cipher: CompiledCipher;
  readonly use: DaySpan;
  readonly days: DaySpan;
};

/** Ends of the fields, as places of the reading: field i takes glyphs from `ends[i - 1]` (0 for the first) to `ends[i]`. */
type Split = { readonly ends: readonly number[]; readonly cost: number };

/** A split as far as one field, and the same up to the field before. */
type Beginning = { readonly end: number; readonly cost: number; readonly before: Beginning | null };

type Budget = { steps: number };

/**
 * Why splits of the mark were thrown out, the most nearly right first: a split whose fields can all be read but agree on no
 * day, then those with fewer and smaller faults. A mark that no split can suit gets one reason for the whole.
 */
export function reasonsFor(matter: Case, candidates: readonly Candidate[]): readonly Reason[] {
  const whole = reasonsForWhole(matter);
  if (whole.length > 0) return whole;
  const splitter = new Splitter(matter);
  const good = new Set(candidates.map((candidate) => candidate.spans.map((span) => span.end).join()));
  const budget: Budget = { steps: STEPS_ALLOWED };
  const reasons = new Map<string, Reason>();
  for (const split of splitter.nearest()) {
    if (reasons.size === REASONS_LISTED) break;
    if (split.cost === 0 && good.has(split.ends.join())) continue;
    const reason = split.cost === 0 ? reasonForDays(matter, split, budget) : splitter.reasonFor(split);
    if (reason !== null) reasons.set(reason.message, reason);
  }
  return [...reasons.values()];
}

/** Glyphs the cipher doesn't have, or a mark too short or too long for it. */
function reasonsForWhole({ reading, cipher }: Case): readonly Reason[] {
  const foreign = reading.glyphs.flatMap((glyph, position): readonly Reason[] => {
    const seen = glyph.kind === 'sure' ? [glyph.glyph] : glyph.kind === 'oneOf' ? glyph.glyphs : [];
    if (seen.length === 0 || seen.some((one) => cipher.usedGlyphs.includes(glyphIndex(one) ?? -1))) return [];
    const what = seen.length === 1 ? `${seen.join()} is no symbol` : `none of ${seen.join(', ')} is a symbol`;
    return [{ code: 'symbol-not-in-cipher', message: `Glyph ${String(position + 1)}: ${what} of this cipher` }];
  });
  const hasRun = reading.glyphs.some((glyph) => glyph.kind === 'run');
  const count = reading.glyphs.length - (hasRun ? 1 : 0);
  const { least, most } = cipher;
  const marks = `its marks have ${least === most ? String(least) : `${String(least)} to ${String(most)}`}`;
  if (count > most) return [{ code: 'too-many-glyphs', message: `${glyphs(count)} are too many for this cipher: ${marks}` }, ...foreign];
  if (count < least && !hasRun) return [{ code: 'too-few-glyphs', message: `${glyphs(count)} are too few for this cipher: ${marks}` }, ...foreign];
  return foreign.slice(0, REASONS_LISTED);
}

/** Finds the splits that come nearest to being right. */
class Splitter {
  readonly #matter: Case;
  readonly #star: number;
  /** By field: start × places + end → whether some text of the field fits there, breaks aside. */
  readonly #readable: readonly ReadonlySet<number>[];
  readonly #places: number;

  constructor(matter: Case) {
    this.#matter = matter;
    this.#star = matter.rows.indexOf(null);
    this.#places = matter.rows.length + 1;
    const lattice = buildLattice(matter.rows, [], matter.cipher);
    const walker = new Walker(lattice, yearsBetween(ALL_DAYS.from, ALL_DAYS.to, matter.cipher.calendar));
    this.#readable = matter.cipher.fields.map((field) => {
      const readable = new Set<number>();
      for (let start = 0; start < this.#places; start += 1) {
        for (const choice of walker.choicesOf(field, this.#statesAt(start))) {
          if (isDated(field.kind) && choice.key >= 0 && choice.numbers.values.length === 0) continue;
          for (const state of choice.to) for (const end of this.#placesOf(state)) readable.add(start * this.#places + end);
        }
      }
      return readable;
    });
  }

  /** The splits of least cost, at most `SPLITS_KEPT`. Of equally good ones, those whose first fields end earlier come first. */
  nearest(): readonly Split[] {
    const { fields } = this.#matter.cipher;
    const last = this.#places - 1;
    let reached: (readonly Beginning[])[] = [[{ end: 0, cost: 0, before: null }]];
    fields.forEach((field, index) => {
      const next: Beginning[][] = Array.from({ length: this.#places }, () => []);
      const isLast = index === fields.length - 1;
      reached.forEach((beginnings, start) => {
        if (beginnings.length === 0) return;
        for (let end = isLast ? last : start; end <= last; end += 1) {
          const cost = this.#costOf(field, index, start, end);
          for (const before of beginnings) {
            if (before.cost + cost > COST_TOLD) break;
            next[end]?.push({ end, cost: before.cost + cost, before });
          }
        }
      });
      reached = next.map((beginnings) => beginnings.sort((one, other) => one.cost - other.cost).slice(0, SPLITS_KEPT));
    });
    return (reached[last] ?? []).map((beginning) => ({ ends: endsOf(beginning), cost: beginning.cost }));
  }

  /** Names the first field of the split that can't be. */
  reasonFor(split: Split): Reason | null {
    const shown = showSplit(this.#matter.reading, split);
    for (const [index, field] of this.#matter.cipher.fields.entries()) {
      const start = split.ends[index - 1] ?? 0;
      const end = split.ends[index] ?? start;
      const cost = this.#costOf(field, index, start, end);
      if (cost === 0) continue;
      const { code, message } = this.#faultOf(field, start, end);
      return { code, message: `${shown}: ${message}` };
    }
    return null;
  }

  /** Automaton states that a place of the reading stands for: after a `*`, whether it was empty or not. */
  #statesAt(place: number): number[] {
    if (this.#star < 0 || place <= this.#star) return [place];
    return place === this.#star + 1 ? [this.#star, this.#places - 1] : [place - 1];
  }

  /** The other way round. */
  #placesOf(state: number): readonly number[] {
    if (this.#star < 0 || state < this.#star) return [state];
    if (state === this.#star) return [state, state + 1];
    return [state === this.#places - 1 ? this.#star + 1 : state + 1];
  }

  /** 0 where the field can be read there. A field can lie wholly inside a `*`; otherwise it takes a glyph at least. */
  #costOf(field: CompiledField, index: number, start: number, end: number): number {
    if (end === start) return this.#star >= 0 && (start === this.#star || start === this.#star + 1) ? 0 : Infinity;
    const hasRun = this.#star >= start && this.#star < end;
    const astray = this.#astray(field, end - start - (hasRun ? 1 : 0), hasRun);
    const broken = this.#breakInside(start, end) === null ? 0 : COST.break;
    if (astray !== 0) return broken + Math.abs(astray) * COST.glyph;
    return broken + (this.#readable[index]?.has(start * this.#places + end) === true ? 0 : COST.text);
  }

  /** Glyphs too many (above 0) or too few (below 0) for the field. */
  #astray(field: CompiledField, count: number, hasRun: boolean): number {
    const least = field.kind === 'literal' ? field.glyphs.length : field.least;
    const most = field.kind === 'literal' ? field.glyphs.length : field.most;
    if (count > most) return count - most;
    return count < least && !hasRun ? count - least : 0;
  }

  #breakInside(start: number, end: number): number | null {
    return this.#matter.reading.breaks.find((place) => place > start && place < end) ?? null;
  }

  #faultOf(field: CompiledField, start: number, end: number): Reason {
    const { reading, rows } = this.#matter;
    const word = field.kind === 'other' ? field.name : FIELD_WORDS[field.kind];
    const broken = this.#breakInside(start, end);
    if (broken !== null) {
      return { code: 'field-cannot-end-at-break', message: `the ${word} can’t end at the gap after glyph ${String(broken)}` };
    }
    const text = reading.glyphs.slice(start, end).map(writeGlyph).join('');
    const hasRun = this.#star >= start && this.#star < end;
    const astray = this.#astray(field, end - start - (hasRun ? 1 : 0), hasRun);
    const number = hasRun ? null : numberShown(field, rows.slice(start, end));
    if (number !== null && isDated(field.kind) && field.kind !== 'year' && astray > 0 && !isPossible(field.kind, number)) {
      return noSuch(field.kind, String(number));
    }
    if (astray !== 0) {
      const least = field.kind === 'literal' ? field.glyphs.length : field.least;
      const most = field.kind === 'literal' ? field.glyphs.length : field.most;
      return {
        code: astray > 0 ? 'too-many-glyphs' : 'too-few-glyphs',
        message: `the ${word} has ${least === most ? glyphs(least) : `${String(least)} to ${glyphs(most)}`} in this cipher, not ${String(end - start - (hasRun ? 1 : 0))}`,
      };
    }
    if (field.kind === 'literal') {
      return { code: 'symbol-not-in-cipher', message: `the cipher has ${field.glyphs.map(glyphAt).join('')} there, not ${text}` };
    }
    if (field.system === 'digits') {
      const place = rows.slice(start, end).findIndex((row) => row !== null && !row.glyphs.some((glyph) => canWrite(field, glyph)));
      const stranger = reading.glyphs[start + place];
      if (place >= 0 && stranger !== undefined) {
        return { code: 'symbol-not-in-cipher', message: `${writeGlyph(stranger)} is no symbol for the ${word}` };
      }
      if (field.least !== field.most && end - start > 1 && beginsWithNought(field, rows[start])) {
        return { code: 'leading-zero', message: `the ${word} ${text} begins with a nought` };
      }
    }
    if (isDated(field.kind)) return noSuch(field.kind, number === null ? text : String(number));
    return { code: 'symbol-not-in-cipher', message: `${text} is no symbol for the ${word}` };
  }
}

/** Every field can be read, so the days are at fault: outside the limits, not in use, or no such day at all. */
function reasonForDays(matter: Case, split: Split, budget: Budget): Reason | null {
  const { rows, cipher, use, days } = matter;
  const shown = showSplit(matter.reading, split);
  const breaks = [...new Set([...matter.reading.breaks, ...split.ends])].filter((place) => place > 0 && place < rows.length);
  breaks.sort((one, other) => one - other);
  const hasDays = (within: DaySpan): boolean => {
    const { found, steps } = workOut(rows, breaks, cipher, within, { steps: budget.steps, keepSpans: false });
    budget.steps = Math.max(0, budget.steps - steps);
    return found !== null && (found.givenUp || found.weight > 0);
  };
  if (budget.steps === 0 || hasDays(days)) return null;
  if (hasDays(use)) return { code: 'outside-limits', message: `${shown}: outside the limits, ${formatSpan(days)}` };
  const lattice = buildLattice(rows, breaks, cipher);
  const { links, spelled } = linkFields(cipher, lattice, yearsBetween(ALL_DAYS.from, ALL_DAYS.to, cipher.calendar));
  if (!spelled) return null;
  const agree = (within: DaySpan, ...kinds: readonly DateField[]): boolean => someDay(links, kinds, within, cipher, budget);
  const number = (kind: DateField): string => numberChosen(links, kind);
  const years = wholeYears(use, cipher);
  if (!agree(use, 'year') || agree(years, ...DATE_FIELDS)) {
    const when = number('year') === '' ? 'then' : `in a year ${number('year')}`;
    return { code: 'not-in-use', message: `${shown}: this cipher was not in use ${when}; it was in use ${formatSpan(use)}` };
  }
  if (!agree(years, 'year', 'month', 'day')) {
    return { code: 'no-such-day', message: `${shown}: no day ${number('day')} in month ${number('month')}` };
  }
  if (!agree(years, 'year', 'dayOfYear')) {
    return { code: 'no-such-day', message: `${shown}: no day ${number('dayOfYear')} in that year` };
  }
  if (!agree(years, 'year', 'week')) return { code: 'no-such-week', message: `${shown}: no week ${number('week')} in that year` };
  return { code: 'fields-disagree', message: `${shown}: the fields agree on no day` };
}

/** The days in use, made up to whole years of the cipher. */
function wholeYears(use: DaySpan, cipher: CompiledCipher): DaySpan {
  const { first, last } = yearsBetween(use.from, use.to, cipher.calendar);
  return { from: yearBegins(first, cipher.calendar), to: yearBegins(last + 1, cipher.calendar) - 1 };
}

/** Whether the fields of these kinds, the others aside, agree on any day of the span; taken for granted where that is long to find out. */
function someDay(
  links: readonly Link[],
  kinds: readonly DateField[],
  within: DaySpan,
  cipher: CompiledCipher,
  budget: Budget,
): boolean {
  const open = kinds.flatMap((kind) => links.filter((link) => link.field.kind === kind));
  const search = (depth: number, runs: Readonly<Runs>): boolean => {
    const link = open[depth];
    if (link === undefined) return true;
    return link.choices.some((choice) => {
      budget.steps -= 1 + runs.length / 2;
      if (budget.steps < 0) return true;
      const { kind } = link.field;
      const narrowed = isDated(kind) ? restrictRuns(runs, kind, choice.numbers, cipher.calendar) : runs;
      return narrowed.length > 0 && search(depth + 1, narrowed);
    });
  };
  return search(0, [within.from, within.to]);
}

/** The number a field shows, where it can be but one; otherwise nothing. */
function numberChosen(links: readonly Link[], kind: DateField): string {
  const choices: readonly Choice[] = links.find((link) => link.field.kind === kind)?.choices ?? [];
  const numbers = new Set(choices.flatMap((choice) => choice.numbers.values));
  const [number] = numbers;
  const every = choices[0]?.numbers.every ?? 0;
  if (number === undefined || numbers.size > 1) return '';
  return every === 10 || every === 100 || every === 1000 ? String(number).padStart(String(every).length - 1, '0') : String(number);
}

/** The number in a digits field whose every glyph can be but one digit. */
function numberShown(field: CompiledField, rows: readonly (Row | null)[]): number | null {
  if (field.kind === 'literal' || field.system !== 'digits') return null;
  let number = 0;
  let before = -1;
  for (const row of rows) {
    const [glyph] = row?.glyphs ?? [];
    if (row === null || glyph === undefined || row.glyphs.length > 1) return null;
    const digit = glyph === field.set.repeater ? before : (field.set.digitOf[glyph] ?? -1);
    if (digit < 0) return null;
    number = number * 10 + digit;
    before = digit;
  }
  return number;
}

function canWrite(field: Extract<CompiledField, { system: 'digits' }>, glyph: number): boolean {
  return glyph === field.set.repeater || (field.set.digitOf[glyph] ?? -1) >= 0;
}

function beginsWithNought(field: Extract<CompiledField, { system: 'digits' }>, row: Row | null | undefined): boolean {
  return row !== null && row !== undefined && row.glyphs.every((glyph) => (field.set.digitOf[glyph] ?? -1) <= 0);
}

const NO_SUCH = {
  year: 'no-such-year',
  quarter: 'no-such-quarter',
  month: 'no-such-month',
  week: 'no-such-week',
  day: 'no-such-day',
  dayOfYear: 'no-such-day',
} as const;

function noSuch(kind: DateField, shown: string): Reason {
  return { code: NO_SUCH[kind], message: `no ${FIELD_WORDS[kind]} ${shown}` };
}

function isPossible(kind: DateField, number: number): boolean {
  return number >= FIELD_NUMBERS[kind].least && number <= FIELD_NUMBERS[kind].greatest;
}

function isDated(kind: CompiledField['kind']): kind is DateField {
  return kind !== 'literal' && kind !== 'other';
}

function endsOf(beginning: Beginning): readonly number[] {
  const ends: number[] = [];
  for (let part = beginning; part.before !== null; part = part.before) ends.unshift(part.end);
  return ends;
}

/** The mark with a dot between its fields. */
function showSplit(reading: Reading, split: Split): string {
  return split.ends
    .map((end, index) => reading.glyphs.slice(split.ends[index - 1] ?? 0, end).map(writeGlyph).join(''))
    .filter((text) => text !== '')
    .join('·');
}

function glyphs(count: number): string {
  return `${String(count)} glyph${count === 1 ? '' : 's'}`;
}
