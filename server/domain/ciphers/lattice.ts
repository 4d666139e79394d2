import { glyphAt, glyphIndex, GLYPH_COUNT, type GlyphIndex } from '../marks/glyphs.ts';
import { lookAlikesOf } from '../marks/look-alikes.ts';
import type { Glyph, Reading } from '../marks/reading.ts';
import type { CompiledCipher } from './compiled-cipher.ts';

/** The chance of what was seen at one place, for each glyph that may truly stand there. */
export type Row = {
  /** By glyph; 0 where it can't be that one. */
  readonly chances: Float64Array;
  /** Those with a chance. */
  readonly glyphs: readonly GlyphIndex[];
};

/** One glyph further: which row weighs it, and the state it leads to. */
export type Move = {
  readonly row: Row;
  readonly to: number;
  /** A break stands before the glyph: it must be the first of its field. */
  readonly opens: boolean;
};

/**
 * A reading as an automaton over the glyphs of the mark as cast. State n: n glyphs of the reading are used up, and nothing, so
 * far, of a `*` that stands there. A `*` adds one state more: in it at least one glyph has gone into the `*`. So a mark takes
 * one way through, however long its `*` is, and no spelling counts twice.
 */
export type Lattice = {
  readonly states: number;
  readonly moves: readonly (readonly Move[])[];
  /** States in which the whole reading is used up. */
  readonly isEnd: readonly boolean[];
  /** By state: glyphs of the reading still to come, and whether a `*` may add any number to them. */
  readonly left: readonly number[];
  readonly openEnded: readonly boolean[];
};

/** The chance that a glyph seen for certain, yet having look-alikes in the cipher, is what it seems. */
const SURE_WITH_LOOK_ALIKES = 0.9;

/** One row for each glyph of the reading, `null` for its `*`. */
export function rowsOf(reading: Reading, cipher: CompiledCipher, lookAlikes: boolean): readonly (Row | null)[] {
  return reading.glyphs.map((glyph) => (glyph.kind === 'run' ? null : rowOf(alternativesOf(glyph, cipher, lookAlikes))));
}

/** The row narrowed to one glyph, with the chance it had. */
export function narrowRow(row: Row, glyph: GlyphIndex): Row {
  return rowOf([[glyph, row.chances[glyph] ?? 0]]);
}

/** Puts rows and breaks together. `breaks` counts glyphs of the reading, the `*` as one. */
export function buildLattice(rows: readonly (Row | null)[], breaks: readonly number[], cipher: CompiledCipher): Lattice {
  const star = rows.indexOf(null);
  const glyphs = star < 0 ? rows.length : rows.length - 1;
  const hasStar = star >= 0;
  const states = glyphs + (hasStar ? 2 : 1);
  const starState = glyphs + 1;
  const moves: Move[][] = Array.from({ length: states }, () => []);
  let state = 0;
  for (let index = 0; index < rows.length; index += 1) {
    const row = rows[index];
    if (row === null || row === undefined) continue;
    const opens = breaks.includes(index);
    if (hasStar && state === star) {
      moves[state]?.push({ row, to: state + 1, opens: opens || breaks.includes(star) });
      moves[starState]?.push({ row, to: state + 1, opens });
    } else {
      moves[state]?.push({ row, to: state + 1, opens });
    }
    state += 1;
  }
  if (hasStar) {
    const anything = rowOf(cipher.usedGlyphs.map((glyph) => [glyph, 1]));
    moves[star]?.push({ row: anything, to: starState, opens: breaks.includes(star) });
    moves[starState]?.push({ row: anything, to: starState, opens: false });
  }
  const indexes = moves.map((_, index) => index);
  return {
    states,
    moves,
    isEnd: indexes.map((index) => index === glyphs || (index === starState && star === glyphs)),
    left: indexes.map((index) => (index === starState ? glyphs - star : glyphs - index)),
    openEnded: indexes.map((index) => hasStar && (index <= star || index === starState)),
  };
}

/** What may truly stand where a glyph was seen, with the chance of seeing it so. */
function alternativesOf(
  glyph: Exclude<Glyph, { kind: 'run' }>,
  cipher: CompiledCipher,
  lookAlikes: boolean,
): readonly (readonly [GlyphIndex, number])[] {
  switch (glyph.kind) {
    case 'sure': {
      const seen = glyphIndex(glyph.glyph);
      if (seen === null) return [];
      if (!lookAlikes) return [[seen, 1]];
      const others = lookAlikesInCipher(seen, cipher);
      if (others.length === 0) return [[seen, 1]];
      const chance = (1 - SURE_WITH_LOOK_ALIKES) / others.length;
      return [[seen, SURE_WITH_LOOK_ALIKES], ...others.map((other) => [other, chance] as const)];
    }
    case 'oneOf':
      return glyph.glyphs.flatMap((alternative) => {
        const index = glyphIndex(alternative);
        return index === null ? [] : [[index, 1 / glyph.glyphs.length] as const];
      });
    case 'unread':
      return cipher.usedGlyphs.map((used) => [used, 1 / cipher.distinctGlyphs]);
  }
}

function lookAlikesInCipher(seen: GlyphIndex, cipher: CompiledCipher): readonly GlyphIndex[] {
  return [...lookAlikesOf(glyphAt(seen))].flatMap((other) => {
    const index = glyphIndex(other);
    return index !== null && cipher.usedGlyphs.includes(index) ? [index] : [];
  });
}

function rowOf(alternatives: readonly (readonly [GlyphIndex, number])[]): Row {
  const chances = new Float64Array(GLYPH_COUNT);
  for (const [glyph, chance] of alternatives) chances[glyph] = chance;
  return { chances, glyphs: alternatives.map(([glyph]) => glyph) };
}
