import { overlap } from '../dates/day-span.ts';
import type { DaySpan } from '../dates/day.ts';
import { NO_NUMBERS, type CompiledCipher, type CompiledException } from './compiled-cipher.ts';
import type { DateField } from './definition.ts';
import { addRun, cutRuns, pickDays, pickYears, restrictRuns, PIECE, type Pieces, type Runs } from './field-calendar.ts';
import type { Lattice } from './lattice.ts';
import type { Choice, Link } from './links.ts';
import { SpanTable } from './span-table.ts';

export type Enumeration = {
  /** Empty where only the weight was asked for. */
  readonly spans: SpanTable;
  /** Days times likelihood, over all spans. */
  readonly weight: number;
  readonly steps: number;
  /** The work went over the limit and was given up; `spans` is then incomplete. */
  readonly givenUp: boolean;
};

export type Allowed = {
  readonly steps: number;
  /** `false`: only the weight is wanted, and the spans need not be kept. */
  readonly keepSpans: boolean;
};

/** Coarse to fine, so that a year that can't be cuts off its months and days. */
const CALENDAR_ORDER: readonly (DateField | 'other')[] = ['year', 'quarter', 'month', 'week', 'dayOfYear', 'day', 'other'];

/**
 * All spans of days that the links' choices can mean within `window`, with their likelihoods.
 *
 * Choices are combined in the order of the calendar, each narrowing the runs of days left over. Where the fields stand on the
 * casting is another order; so before a field's turn the likelihood of everything around it is worked out once, with the
 * choices made and all choices of the fields still to come, and each choice then costs its own ways through only.
 */
export function enumerate(
  cipher: CompiledCipher,
  lattice: Lattice,
  links: readonly Link[],
  window: DaySpan,
  allowed: Allowed,
): Enumeration {
  return new Enumerator(cipher, lattice, links, window, allowed).run();
}

/** The choices, one a link, that a number kept with a span stands for. */
export function choicesOfCombination(links: readonly Link[], combination: number): readonly Choice[] {
  let rest = combination;
  return links.flatMap((link) => {
    const index = rest % link.choices.length;
    rest = (rest - index) / link.choices.length;
    return link.choices[index] ?? [];
  });
}

/** What the parts of the work count for, in steps: about their cost in time, one way through one choice being 1. */
const STEPS = { choice: 1, cut: 4, piece: 1, run: 1, record: 6, exception: 6 } as const;

class Enumerator {
  readonly #cipher: CompiledCipher;
  readonly #lattice: Lattice;
  readonly #window: DaySpan;
  readonly #allowed: Allowed;
  /** The links that leave something to choose, in the order of the calendar. */
  readonly #order: readonly Link[];
  readonly #radix: readonly number[];
  readonly #together: readonly Choice[];
  /** By link: the choice made, or all its choices together while it is still to come. */
  readonly #current: Choice[];
  readonly #levels: readonly Level[];
  readonly #spans = new SpanTable();
  /** Combinations that exceptions bear on, done once each. */
  readonly #settled = new Set<number>();
  readonly #spare: Float64Array;
  #weight = 0;
  #steps = 0;

  constructor(cipher: CompiledCipher, lattice: Lattice, links: readonly Link[], window: DaySpan, allowed: Allowed) {
    this.#cipher = cipher;
    this.#lattice = lattice;
    this.#window = window;
    this.#allowed = allowed;
    this.#order = links.filter(isOpen).sort((one, other) => rankOf(one) - rankOf(other));
    let radix = 1;
    this.#radix = links.map((link) => {
      const here = radix;
      radix *= link.choices.length;
      return here;
    });
    this.#together = links.map((link) => together(link.choices, lattice.states));
    this.#current = [...this.#together];
    this.#levels = this.#order.map((link) => levelFor(link, lattice.states));
    this.#spare = new Float64Array(lattice.states);
  }

  run(): Enumeration {
    this.#descend(0, [this.#window.from, this.#window.to], 0, null);
    for (const exception of this.#cipher.exceptions) {
      const days = overlap(exception.span, this.#window);
      if (days !== null && this.#canMatch(exception)) this.#descend(0, [days.from, days.to], 0, exception);
    }
    return { spans: this.#spans, weight: this.#weight, steps: this.#steps, givenUp: this.#steps > this.#allowed.steps };
  }

  /**
   * Makes the choice at this depth and goes on. Within an exception the fields it names must hold its texts and narrow nothing:
   * its days are given, and only the other fields narrow them.
   */
  #descend(depth: number, runs: Readonly<Runs>, combination: number, exception: CompiledException | null): void {
    const level = this.#levels[depth];
    if (level === undefined) return;
    const { index: link, choices } = level.link;
    const wanted = exception?.named.get(link);
    const narrows = wanted === undefined ? level.narrows : null;
    const isLast = depth === this.#levels.length - 1;
    const radix = this.#radix[link] ?? 1;
    this.#weighAround(level, isLast && this.#allowed.keepSpans);
    if (narrows !== null && narrows !== 'year') {
      cutRuns(runs, narrows, this.#cipher.calendar, level.pieces);
      this.#steps += STEPS.cut * (level.pieces.length / PIECE);
    }

    for (let index = 0; index < choices.length && this.#steps <= this.#allowed.steps; index += 1) {
      const choice = choices[index];
      if (choice === undefined || (wanted !== undefined && choice.key !== wanted)) continue;
      this.#steps += STEPS.choice + choice.from.length;
      const likelihood = weigh(choice, level);
      if (likelihood === 0) continue;
      let days = runs;
      if (narrows !== null) {
        if (narrows === 'year') pickYears(runs, choice.numbers, this.#cipher.calendar, level.days);
        else {
          pickDays(level.pieces, narrows, choice.numbers.values, level.days);
          this.#steps += STEPS.piece * (level.pieces.length / PIECE) * choice.numbers.values.length;
        }
        this.#steps += STEPS.run * level.days.length;
        if (level.days.length === 0) continue;
        ({ days } = level);
      }
      this.#current[link] = choice;
      const chosen = combination + index * radix;
      if (isLast) this.#record(days, chosen, likelihood, this.#allowed.keepSpans ? weighBest(choice, level) : 0);
      else this.#descend(depth + 1, days, chosen, exception);
    }
    const open = this.#together[link];
    if (open !== undefined) this.#current[link] = open;
  }

  #record(runs: Readonly<Runs>, combination: number, likelihood: number, best: number): void {
    let days = runs;
    const matching = this.#matchingExceptions();
    if (matching.length > 0) {
      if (this.#settled.has(combination)) return;
      this.#settled.add(combination);
      days = this.#daysWith(matching);
    }
    for (let index = 0; index < days.length; index += 2) {
      const from = days[index] ?? 0;
      const to = days[index + 1] ?? 0;
      this.#weight += likelihood * (to - from + 1);
      if (this.#allowed.keepSpans) this.#spans.add(from, to, likelihood, best, combination);
    }
    this.#steps += (STEPS.record * days.length) / 2;
  }

  #matchingExceptions(): readonly CompiledException[] {
    if (this.#cipher.exceptions.length === 0 || !this.#current.some((choice) => choice.key < 0)) return [];
    this.#steps += STEPS.exception * this.#cipher.exceptions.length;
    return this.#cipher.exceptions.filter((exception) => {
      for (const [index, key] of exception.named) if (this.#current[index]?.key !== key) return false;
      return true;
    });
  }

  /** Whether the reading can hold all the texts the exception names. */
  #canMatch(exception: CompiledException): boolean {
    for (const [index, key] of exception.named) {
      if (!this.#order.some((link) => link.index === index && link.choices.some((choice) => choice.key === key))) return false;
    }
    return true;
  }

  /** Days of the choices made: the exceptions', and the table's unless one of them replaces it. */
  #daysWith(exceptions: readonly CompiledException[]): Runs {
    const days: Runs[] = exceptions.map((exception) => {
      const span = overlap(exception.span, this.#window);
      return span === null ? [] : this.#narrow([span.from, span.to], exception);
    });
    if (!exceptions.some((exception) => exception.replaces)) days.push(this.#narrow([this.#window.from, this.#window.to], null));
    return united(days);
  }

  #narrow(runs: Runs, exception: CompiledException | null): Runs {
    let days = runs;
    for (const { link, narrows } of this.#levels) {
      const choice = this.#current[link.index];
      if (choice === undefined || narrows === null || exception?.named.has(link.index) === true) continue;
      this.#steps += STEPS.cut * days.length;
      days = restrictRuns(days, narrows, choice.numbers, this.#cipher.calendar);
    }
    return days;
  }

  /** Likelihood of everything before and after a link, for each state it can start and end in. */
  #weighAround(level: Level, withBest: boolean): void {
    this.#passUpTo(level.link.index, level.before, false);
    this.#passBackTo(level.link.index, level.after, false);
    if (!withBest) return;
    this.#passUpTo(level.link.index, level.bestBefore, true);
    this.#passBackTo(level.link.index, level.bestAfter, true);
  }

  #passUpTo(link: number, vector: Float64Array, best: boolean): void {
    vector.fill(0);
    vector[0] = 1;
    for (let index = 0; index < link; index += 1) {
      const choice = this.#current[index];
      if (choice !== undefined) this.#pass(choice.from, choice.to, best ? choice.best : choice.sum, vector, best);
    }
  }

  #passBackTo(link: number, vector: Float64Array, best: boolean): void {
    for (let state = 0; state < vector.length; state += 1) vector[state] = this.#lattice.isEnd[state] === true ? 1 : 0;
    for (let index = this.#current.length - 1; index > link; index -= 1) {
      const choice = this.#current[index];
      if (choice !== undefined) this.#pass(choice.to, choice.from, best ? choice.best : choice.sum, vector, best);
    }
  }

  /** Takes a vector over states through the ways of a choice, adding up or keeping the likeliest. */
  #pass(from: readonly number[], to: readonly number[], weights: readonly number[], vector: Float64Array, best: boolean): void {
    const spare = this.#spare.fill(0);
    for (let way = 0; way < from.length; way += 1) {
      const weight = (vector[from[way] ?? 0] ?? 0) * (weights[way] ?? 0);
      const state = to[way] ?? 0;
      const before = spare[state] ?? 0;
      spare[state] = best ? Math.max(before, weight) : before + weight;
    }
    vector.set(spare);
    this.#steps += STEPS.choice + from.length;
  }
}

/** What one depth of the search keeps: its link, and room for what is worked out anew for each choice above it. */
type Level = {
  readonly link: Link;
  /** The date field that narrows the days, if it is one. */
  readonly narrows: DateField | null;
  readonly pieces: Pieces;
  readonly days: Runs;
  /** Likelihood before and after the link's place, by state: added up, and of the likeliest way. */
  readonly before: Float64Array;
  readonly after: Float64Array;
  readonly bestBefore: Float64Array;
  readonly bestAfter: Float64Array;
};

function levelFor(link: Link, states: number): Level {
  const { kind } = link.field;
  return {
    link,
    narrows: kind === 'literal' || kind === 'other' ? null : kind,
    pieces: [],
    days: [],
    before: new Float64Array(states),
    after: new Float64Array(states),
    bestBefore: new Float64Array(states),
    bestAfter: new Float64Array(states),
  };
}

function weigh({ from, to, sum }: Choice, { before, after }: Level): number {
  let likelihood = 0;
  for (let way = 0; way < from.length; way += 1) {
    likelihood += (before[from[way] ?? 0] ?? 0) * (sum[way] ?? 0) * (after[to[way] ?? 0] ?? 0);
  }
  return likelihood;
}

function weighBest({ from, to, best }: Choice, { bestBefore, bestAfter }: Level): number {
  let likeliest = 0;
  for (let way = 0; way < from.length; way += 1) {
    const here = (bestBefore[from[way] ?? 0] ?? 0) * (best[way] ?? 0) * (bestAfter[to[way] ?? 0] ?? 0);
    if (here > likeliest) likeliest = here;
  }
  return likeliest;
}

function isOpen(link: Link): boolean {
  return link.field.kind !== 'literal' && (link.field.kind !== 'other' || link.field.named.length > 0);
}

function rankOf(link: Link): number {
  return CALENDAR_ORDER.findIndex((kind) => kind === link.field.kind);
}

/** All choices of a link as one: the likelihoods of each way through added up. */
function together(choices: readonly Choice[], states: number): Choice {
  const [only] = choices;
  if (only !== undefined && choices.length === 1) return only;
  const sums = new Float64Array(states * states);
  for (const choice of choices) {
    for (let way = 0; way < choice.from.length; way += 1) {
      const cell = (choice.from[way] ?? 0) * states + (choice.to[way] ?? 0);
      sums[cell] = (sums[cell] ?? 0) + (choice.sum[way] ?? 0);
    }
  }
  const all: Choice = { key: 0, numbers: NO_NUMBERS, from: [], to: [], sum: [], best: [] };
  sums.forEach((sum, cell) => {
    if (sum === 0) return;
    all.from.push(Math.floor(cell / states));
    all.to.push(cell % states);
    all.sum.push(sum);
    all.best.push(sum);
  });
  return all;
}

/** The days of several lists of runs, each day once. */
function united(lists: readonly Readonly<Runs>[]): Runs {
  const spans = lists
    .flatMap((runs) => runs.flatMap((from, index) => (index % 2 === 0 ? [{ from, to: runs[index + 1] ?? from }] : [])))
    .sort((one, other) => one.from - other.from);
  const days: Runs = [];
  for (const { from, to } of spans) {
    const end = days.at(-1) ?? Number.NEGATIVE_INFINITY;
    addRun(days, Math.max(from, end + 1), to);
  }
  return days;
}
