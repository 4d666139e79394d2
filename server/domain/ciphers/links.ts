import type { GlyphIndex } from '../marks/glyphs.ts';
import {
  NO_NUMBERS,
  type CompiledCipher,
  type CompiledDigits,
  type CompiledField,
  type DigitsField,
  type NamedNode,
  type Numbers,
  type ValuesField,
} from './compiled-cipher.ts';
import { cycleOfDigits, FIELD_NUMBERS } from './field-numbers.ts';
import type { Lattice, Row } from './lattice.ts';

/**
 * What a field can say at one place of the mark, for all texts of the field that say it: a way from state `from[i]` to state
 * `to[i]`, the likelihoods of those texts added up, and that of the likeliest one.
 */
export type Choice = {
  /** Tells the choices of a field apart; negative for a text that an exception names, which is a choice of its own. */
  readonly key: number;
  readonly numbers: Numbers;
  readonly from: number[];
  readonly to: number[];
  readonly sum: number[];
  readonly best: number[];
};

/** A field's choices. Every field of the cipher has one link, in the same order. */
export type Link = { readonly field: CompiledField; readonly index: number; readonly choices: readonly Choice[] };

export type Links = {
  readonly links: readonly Link[];
  /** Whether the reading can be spelled at all; where not, `links` stops at the field that can't be. */
  readonly spelled: boolean;
  readonly steps: number;
};

/** Years the year field can have, both included. */
export type YearRange = { readonly first: number; readonly last: number };

/** Key of the texts that no exception names, in a field that has no number. */
const PLAIN_KEY = 0;
const YEAR_KEY_BASE = 10_000;

/**
 * Field by field, every text that fits the reading: forward from the states the fields before it can end in, then backward,
 * so that only choices on some way through remain. The cost is that of the texts that fit, not of those that could be cast.
 */
export function linkFields(cipher: CompiledCipher, lattice: Lattice, years: YearRange): Links {
  const links: Link[] = [];
  const walker = new Walker(lattice, years);
  const { least, most } = lengthsLeft(cipher.fields);
  let starts = [0];
  for (const [index, field] of cipher.fields.entries()) {
    const choices = walker.choicesOf(
      field,
      starts.filter((state) => fits(lattice, state, least[index] ?? 0, most[index] ?? 0)),
    );
    links.push({ field, index, choices });
    starts = endsOf(choices);
    if (starts.length === 0) return { links, spelled: false, steps: walker.steps };
  }
  return pruned(links, lattice, walker.steps);
}

/** Key of a number in a field: years of different widths are different choices. */
function keyOfNumber(field: DigitsField, number: number, width: number): number {
  if (field.kind === 'other') return PLAIN_KEY;
  return field.kind === 'year' ? width * YEAR_KEY_BASE + number : number;
}

/** Number and width of a key that `keyOfNumber` made. */
export function numberOfKey(field: DigitsField, key: number): { readonly number: number; readonly width: number } {
  if (field.kind === 'year') return { number: key % YEAR_KEY_BASE, width: Math.floor(key / YEAR_KEY_BASE) };
  return { number: key, width: field.least === field.most ? field.least : String(key).length };
}

function pruned(links: readonly Link[], lattice: Lattice, steps: number): Links {
  let alive = lattice.isEnd.slice();
  const kept: Link[] = [];
  for (const link of links.toReversed()) {
    const before = lattice.isEnd.map(() => false);
    const choices = link.choices.flatMap((choice) => {
      const choiceKept = keepAlive(choice, alive);
      for (const state of choiceKept.from) before[state] = true;
      return choiceKept.from.length > 0 ? [choiceKept] : [];
    });
    kept.unshift({ ...link, choices });
    alive = before;
  }
  return { links: kept, spelled: alive[0] === true, steps };
}

function keepAlive(choice: Choice, alive: readonly boolean[]): Choice {
  if (choice.to.every((state) => alive[state])) return choice;
  const kept: Choice = { key: choice.key, numbers: choice.numbers, from: [], to: [], sum: [], best: [] };
  for (let way = 0; way < choice.to.length; way += 1) {
    if (alive[choice.to[way] ?? 0]) addWay(kept, choice.from[way] ?? 0, choice.to[way] ?? 0, choice.sum[way] ?? 0, choice.best[way] ?? 0);
  }
  return kept;
}

function addWay(choice: Choice, from: number, to: number, sum: number, best: number): void {
  choice.from.push(from);
  choice.to.push(to);
  choice.sum.push(sum);
  choice.best.push(best);
}

function endsOf(choices: readonly Choice[]): number[] {
  const ends: number[] = [];
  for (const choice of choices) for (const state of choice.to) if (!ends.includes(state)) ends.push(state);
  return ends;
}

/** Whether the fields from here on can take up what is left of the reading. */
function fits(lattice: Lattice, state: number, least: number, most: number): boolean {
  const left = lattice.left[state] ?? 0;
  return left <= most && (lattice.openEnded[state] === true || left >= least);
}

function lengthsLeft(fields: readonly CompiledField[]): { readonly least: readonly number[]; readonly most: readonly number[] } {
  const least: number[] = [];
  const most: number[] = [];
  for (let index = fields.length - 1; index >= 0; index -= 1) {
    const field = fields[index];
    if (field === undefined) continue;
    least[index] = (least[index + 1] ?? 0) + (field.kind === 'literal' ? field.glyphs.length : field.least);
    most[index] = (most[index + 1] ?? 0) + (field.kind === 'literal' ? field.glyphs.length : field.most);
  }
  return { least, most };
}

/** Chances of the digits at one place, added up over the symbols of each. */
type DigitRow = { readonly digits: readonly number[]; readonly sums: readonly number[]; readonly bests: readonly number[]; readonly repeat: number };

/** Walks the lattice along the texts of one field at a time. */
export class Walker {
  readonly #lattice: Lattice;
  readonly #years: YearRange;
  readonly #digitRows = new Map<CompiledDigits, Map<Row, DigitRow>>();
  #choices = new Map<number, Choice>();
  #start = 0;
  steps = 0;

  constructor(lattice: Lattice, years: YearRange) {
    this.#lattice = lattice;
    this.#years = years;
  }

  /** Everything the field can say from one of these states on. */
  choicesOf(field: CompiledField, starts: readonly number[]): readonly Choice[] {
    this.#choices = new Map();
    for (const start of starts) {
      this.#start = start;
      if (field.kind === 'literal') this.#spell(field.glyphs, 0, start, 1, PLAIN_KEY, NO_NUMBERS);
      else if (field.system === 'values') this.#walkValues(field, start);
      else this.#walkDigitsField(field, start);
    }
    return [...this.#choices.values()];
  }

  #arrive(key: number, numbers: Numbers, state: number, sum: number, best: number): void {
    let choice = this.#choices.get(key);
    if (choice === undefined) {
      choice = { key, numbers, from: [], to: [], sum: [], best: [] };
      this.#choices.set(key, choice);
    }
    addWay(choice, this.#start, state, sum, best);
  }

  /** One text, glyph for glyph. */
  #spell(glyphs: readonly GlyphIndex[], done: number, state: number, chance: number, key: number, numbers: Numbers): void {
    this.steps += 1;
    const glyph = glyphs[done];
    if (glyph === undefined) {
      this.#arrive(key, numbers, state, chance, chance);
      return;
    }
    for (const move of this.#lattice.moves[state] ?? []) {
      if (done > 0 && move.opens) continue;
      const here = move.row.chances[glyph] ?? 0;
      if (here > 0) this.#spell(glyphs, done + 1, move.to, chance * here, key, numbers);
    }
  }

  #walkValues(field: ValuesField, start: number): void {
    for (const move of this.#lattice.moves[start] ?? []) {
      for (const glyph of move.row.glyphs) {
        for (const symbol of field.symbolsByFirst[glyph] ?? []) {
          this.#spell(symbol.glyphs, 1, move.to, move.row.chances[glyph] ?? 0, symbol.key, symbol.numbers);
        }
      }
    }
  }

  #walkDigitsField(field: DigitsField, start: number): void {
    for (const text of field.named) this.#spell(text.glyphs, 0, start, 1, text.key, text.numbers);
    if (field.kind === 'other') {
      this.#walkOther(field, 0, start, 1, 1, field.namedTree);
      return;
    }
    for (let width = field.least; width <= field.most; width += 1) {
      const ranges = field.kind === 'year' ? this.#yearRanges(width) : [FIELD_NUMBERS[field.kind].least, FIELD_NUMBERS[field.kind].greatest];
      this.#walkDigits({ field, width, ranges, leadingZero: field.least === field.most || width === 1 }, 0, start, 0, -1, 1, 1, field.namedTree);
    }
  }

  /**
   * All texts of a number field at once, digit by digit, leaving out numbers that can't come out in range. `node` follows the
   * texts that exceptions name, so that these are left out too.
   */
  #walkDigits(
    walk: { readonly field: DigitsField; readonly width: number; readonly ranges: readonly number[]; readonly leadingZero: boolean },
    done: number,
    state: number,
    number: number,
    before: number,
    sum: number,
    best: number,
    node: NamedNode | null,
  ): void {
    this.steps += 1;
    if (done === walk.width) {
      if (node?.ends === true) return;
      const every = walk.field.kind === 'year' ? cycleOfDigits(walk.width) : 0;
      const key = keyOfNumber(walk.field, number, walk.width);
      this.#arrive(key, this.#choices.get(key)?.numbers ?? { values: [number], every }, state, sum, best);
      return;
    }
    for (const move of this.#lattice.moves[state] ?? []) {
      if (done > 0 && move.opens) continue;
      const row = this.#digitRow(walk.field.set, move.row);
      let repeated = before < 0 || row.repeat === 0;
      for (let index = 0; index <= row.digits.length; index += 1) {
        if (index === row.digits.length && repeated) break;
        const digit = row.digits[index] ?? before;
        if (digit === 0 && done === 0 && !walk.leadingZero) continue;
        const again = digit === before;
        if (again) repeated = true;
        const next = number * 10 + digit;
        if (!isWithin(walk.ranges, next, walk.width - done - 1)) continue;
        if (node !== null) {
          this.#branch(walk, done, move.row, move.to, next, digit, again, sum, best, node);
          continue;
        }
        const repeat = again ? row.repeat : 0;
        const digitSum = (row.sums[index] ?? 0) + repeat;
        const digitBest = Math.max(row.bests[index] ?? 0, repeat);
        this.#walkDigits(walk, done + 1, move.to, next, digit, sum * digitSum, best * digitBest, null);
      }
    }
  }

  /** One digit, symbol by symbol where a named text goes that way, the other symbols together. */
  #branch(
    walk: { readonly field: DigitsField; readonly width: number; readonly ranges: readonly number[]; readonly leadingZero: boolean },
    done: number,
    row: Row,
    to: number,
    number: number,
    digit: number,
    again: boolean,
    sum: number,
    best: number,
    node: NamedNode,
  ): void {
    const { glyphsOf, repeater } = walk.field.set;
    const symbols = glyphsOf[digit] ?? [];
    let restSum = 0;
    let restBest = 0;
    for (const glyph of again && repeater !== null ? [...symbols, repeater] : symbols) {
      const chance = row.chances[glyph] ?? 0;
      if (chance === 0) continue;
      const child = node.children.get(glyph);
      if (child !== undefined) this.#walkDigits(walk, done + 1, to, number, digit, sum * chance, best * chance, child);
      else {
        restSum += chance;
        restBest = Math.max(restBest, chance);
      }
    }
    if (restSum > 0) this.#walkDigits(walk, done + 1, to, number, digit, sum * restSum, best * restBest, null);
  }

  /** All texts of an `other` field at once, those that exceptions name left out. */
  #walkOther(field: DigitsField, done: number, state: number, sum: number, best: number, node: NamedNode | null): void {
    this.steps += 1;
    if (done >= field.least && node?.ends !== true) this.#arrive(PLAIN_KEY, NO_NUMBERS, state, sum, best);
    if (done === field.most) return;
    const { glyphs, repeater } = field.set;
    for (const move of this.#lattice.moves[state] ?? []) {
      if (done > 0 && move.opens) continue;
      let restSum = 0;
      let restBest = 0;
      for (const glyph of move.row.glyphs) {
        if (glyph === repeater ? done === 0 : (field.set.digitOf[glyph] ?? -1) < 0) continue;
        const chance = move.row.chances[glyph] ?? 0;
        const child = node?.children.get(glyph);
        if (child !== undefined) this.#walkOther(field, done + 1, move.to, sum * chance, best * chance, child);
        else {
          restSum += chance;
          restBest = Math.max(restBest, chance);
        }
      }
      if (restSum > 0 && glyphs.length > 0) this.#walkOther(field, done + 1, move.to, sum * restSum, best * restBest, null);
    }
  }

  #digitRow(set: CompiledDigits, row: Row): DigitRow {
    let rows = this.#digitRows.get(set);
    if (rows === undefined) {
      rows = new Map();
      this.#digitRows.set(set, rows);
    }
    let digitRow = rows.get(row);
    if (digitRow === undefined) {
      digitRow = digitRowOf(set, row);
      rows.set(row, digitRow);
    }
    return digitRow;
  }

  /** The numbers that a year of this width can show, as ranges of least and greatest. */
  #yearRanges(width: number): readonly number[] {
    const { first, last } = this.#years;
    const every = cycleOfDigits(width);
    if (every === 0) return [first, last];
    if (last - first + 1 >= every) return [0, every - 1];
    return first % every <= last % every ? [first % every, last % every] : [first % every, every - 1, 0, last % every];
  }
}

function digitRowOf(set: CompiledDigits, row: Row): DigitRow {
  const digits: number[] = [];
  const sums: number[] = [];
  const bests: number[] = [];
  for (const glyph of row.glyphs) {
    const digit = set.digitOf[glyph] ?? -1;
    if (digit < 0) continue;
    const chance = row.chances[glyph] ?? 0;
    const index = digits.indexOf(digit);
    if (index < 0) {
      digits.push(digit);
      sums.push(chance);
      bests.push(chance);
    } else {
      sums[index] = (sums[index] ?? 0) + chance;
      bests[index] = Math.max(bests[index] ?? 0, chance);
    }
  }
  return { digits, sums, bests, repeat: set.repeater === null ? 0 : (row.chances[set.repeater] ?? 0) };
}

/** Whether a number that begins with these digits, this many more to come, can lie in one of the ranges. */
function isWithin(ranges: readonly number[], digits: number, more: number): boolean {
  const scale = 10 ** more;
  const least = digits * scale;
  const greatest = least + scale - 1;
  for (let index = 0; index < ranges.length; index += 2) {
    if (least <= (ranges[index + 1] ?? 0) && greatest >= (ranges[index] ?? 0)) return true;
  }
  return false;
}

