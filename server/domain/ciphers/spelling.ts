import { glyphAt, type GlyphIndex } from '../marks/glyphs.ts';
import type { CompiledField, DigitsField, NamedNode } from './compiled-cipher.ts';
import type { FieldSpan } from './decoding.ts';
import type { Lattice, Row } from './lattice.ts';
import { numberOfKey, type Choice, type Link } from './links.ts';
import { writeNumber } from './compile-fields.ts';

/** One way a mark can have been cast: what stands in each field. */
export type Spelling = { readonly spans: readonly FieldSpan[]; readonly details: Readonly<Record<string, string>> };

/**
 * The likeliest spelling among those of the choices made, one a link. `numberOf` tells the number a date field has on the
 * candidate's days. Of equally likely spellings the one with the earlier field ends and the earlier symbols is taken.
 */
export function likeliestSpelling(
  links: readonly Link[],
  choices: readonly Choice[],
  lattice: Lattice,
  numberOf: (field: Exclude<CompiledField['kind'], 'literal' | 'other'>) => number,
): Spelling {
  const spans: FieldSpan[] = [];
  const details: [string, string][] = [];
  let start = 0;
  for (const [index, { from, to }] of likeliestWay(choices, lattice).entries()) {
    const link = links[index];
    const choice = choices[index];
    if (link === undefined || choice === undefined) continue;
    const { field } = link;
    const text = likeliestText(field, choice, lattice, from, to).map(glyphAt).join('');
    const isDated = field.kind !== 'literal' && field.kind !== 'other';
    spans.push({ field: field.kind, start, end: start + text.length, text, value: isDated ? numberOf(field.kind) : null });
    if (field.kind === 'other') details.push([field.name, text]);
    start += text.length;
  }
  return { spans, details: Object.fromEntries(details) };
}

/** A state some link can end in, and the likeliest way there. */
type Reached = { readonly state: number; readonly likelihood: number; readonly before: Reached | null };

/** The likeliest way from start to end: where each link begins and ends. */
function likeliestWay(choices: readonly Choice[], lattice: Lattice): readonly { readonly from: number; readonly to: number }[] {
  let reached: readonly Reached[] = [{ state: 0, likelihood: 1, before: null }];
  for (const choice of choices) {
    const next: Reached[] = [];
    for (let way = 0; way < choice.from.length; way += 1) {
      const before = reached.find(({ state }) => state === choice.from[way]);
      if (before === undefined) continue;
      const state = choice.to[way] ?? 0;
      const likelihood = before.likelihood * (choice.best[way] ?? 0);
      const known = next.findIndex((other) => other.state === state);
      if (known < 0) next.push({ state, likelihood, before });
      else if (likelihood > (next[known]?.likelihood ?? 0)) next[known] = { state, likelihood, before };
    }
    reached = next;
  }
  const ways: { from: number; to: number }[] = [];
  let last = reached
    .filter(({ state }) => lattice.isEnd[state] === true)
    .reduce<Reached | null>((best, one) => (best === null || one.likelihood > best.likelihood ? one : best), null);
  while (last !== null && last.before !== null) {
    ways.unshift({ from: last.before.state, to: last.state });
    last = last.before;
  }
  return ways;
}

/** The likeliest text of a choice that leads from one state to the other. */
function likeliestText(field: CompiledField, choice: Choice, lattice: Lattice, from: number, to: number): readonly GlyphIndex[] {
  const search = new TextSearch(lattice, to);
  if (field.kind === 'literal') search.follow(field.glyphs, from);
  else if (choice.key < 0) search.follow(field.named.find((text) => text.key === choice.key)?.glyphs ?? [], from);
  else if (field.system === 'values') {
    for (const symbol of field.symbols) if (symbol.key === choice.key) search.follow(symbol.glyphs, from);
  } else if (field.kind === 'other') search.fill(field, from);
  else {
    const { number, width } = numberOfKey(field, choice.key);
    const figures = writeNumber(field.kind, number, width, true) ?? '';
    search.write(field, [...figures].map(Number), from);
  }
  return search.text;
}

/** Tries texts of a field and keeps the likeliest that ends in the right state. */
class TextSearch {
  readonly #lattice: Lattice;
  readonly #end: number;
  readonly #trail: GlyphIndex[] = [];
  #likelihood = 0;
  text: readonly GlyphIndex[] = [];

  constructor(lattice: Lattice, end: number) {
    this.#lattice = lattice;
    this.#end = end;
  }

  /** One text as it is. */
  follow(glyphs: readonly GlyphIndex[], state: number, likelihood = 1): void {
    const done = this.#trail.length;
    const glyph = glyphs[done];
    if (glyph === undefined) {
      this.#arrive(state, likelihood);
      return;
    }
    this.#step(state, likelihood, (row, next, here) => {
      const chance = row.chances[glyph] ?? 0;
      if (chance > 0) this.#push(glyph, () => { this.follow(glyphs, next, here * chance); });
    });
  }

  /** Any text that writes these digits and is named by no exception. */
  write(field: DigitsField, digits: readonly number[], state: number, likelihood = 1, node: NamedNode | null = field.namedTree): void {
    const done = this.#trail.length;
    const digit = digits[done];
    if (digit === undefined) {
      if (node?.ends !== true) this.#arrive(state, likelihood);
      return;
    }
    const symbols = field.set.glyphsOf[digit] ?? [];
    const { repeater } = field.set;
    const glyphs = repeater !== null && done > 0 && digits[done - 1] === digit ? [...symbols, repeater] : symbols;
    this.#step(state, likelihood, (row, next, here) => {
      this.#likeliest(glyphs, row, node, (chance, child) => {
        this.write(field, digits, next, here * chance, child);
      });
    });
  }

  /** Any text of an `other` field that is named by no exception. */
  fill(field: DigitsField, state: number, likelihood = 1, node: NamedNode | null = field.namedTree): void {
    const done = this.#trail.length;
    if (done >= field.least && node?.ends !== true) this.#arrive(state, likelihood);
    if (done === field.most) return;
    const { glyphs: symbols, repeater } = field.set;
    const glyphs = repeater !== null && done > 0 ? [...symbols, repeater] : symbols;
    this.#step(state, likelihood, (row, next, here) => {
      this.#likeliest(glyphs, row, node, (chance, child) => {
        this.fill(field, next, here * chance, child);
      });
    });
  }

  #step(state: number, likelihood: number, go: (row: Row, next: number, likelihood: number) => void): void {
    for (const move of this.#lattice.moves[state] ?? []) {
      if (this.#trail.length > 0 && move.opens) continue;
      go(move.row, move.to, likelihood);
    }
  }

  /** Every glyph that follows a named text, and of the others the likeliest: the rest of the text doesn't depend on which. */
  #likeliest(
    glyphs: readonly GlyphIndex[],
    row: Row,
    node: NamedNode | null,
    go: (chance: number, child: NamedNode | null) => void,
  ): void {
    let likeliest: GlyphIndex | null = null;
    let likeliestChance = 0;
    for (const glyph of glyphs) {
      const chance = row.chances[glyph] ?? 0;
      if (chance === 0) continue;
      const child = node?.children.get(glyph);
      if (child !== undefined) this.#push(glyph, () => { go(chance, child); });
      else if (chance > likeliestChance) {
        likeliest = glyph;
        likeliestChance = chance;
      }
    }
    if (likeliest !== null) this.#push(likeliest, () => { go(likeliestChance, null); });
  }

  #push(glyph: GlyphIndex, go: () => void): void {
    this.#trail.push(glyph);
    go();
    this.#trail.pop();
  }

  #arrive(state: number, likelihood: number): void {
    if (state !== this.#end || likelihood <= this.#likelihood) return;
    this.#likelihood = likelihood;
    this.text = [...this.#trail];
  }
}
