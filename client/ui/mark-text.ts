import { BREAK_CHARACTERS } from '#domain/marks/reading.ts';
import type { Glyph } from '#domain/marks/reading.ts';
import { foldCase, isGlyph } from '#domain/marks/glyphs.ts';

/**
 * A mark while it is being typed: the text of the box, taken apart into tiles without refusing anything. What the notation
 * itself says is the decoder's business (`parseReading`); this only has to draw what has been typed so far.
 */
export type TypedMark = {
  readonly tiles: readonly TypedTile[];
  /** Gaps after n tiles, one at either end included while it is being typed; ascending. */
  readonly gaps: readonly number[];
};

/** `start` and `end` are where it stands in the text. `glyph` is null for a bracket still empty, or a character that is no glyph. */
export type TypedTile = { readonly glyph: Glyph | null; readonly text: string; readonly start: number; readonly end: number };

export function readTyped(text: string): TypedMark {
  const tiles: TypedTile[] = [];
  const gaps: number[] = [];
  let at = 0;
  while (at < text.length) {
    const character = text.charAt(at);
    if (BREAK_CHARACTERS.includes(character)) {
      if (gaps.at(-1) !== tiles.length) gaps.push(tiles.length);
      at += 1;
      continue;
    }
    const end = character === '[' ? endOfBracket(text, at) : at + 1;
    const piece = text.slice(at, end);
    tiles.push({ glyph: glyphOf(piece), text: piece, start: at, end });
    at = end;
  }
  return { tiles, gaps };
}

/** What stands in the box after a change, and where the caret goes. */
export type Amended = { readonly text: string; readonly caret: number };

/**
 * Keeps brackets whole while a mark is typed. `[` opens a bracket and closes it behind the caret, round the glyph it replaces if
 * there was one, and does nothing inside another; `]` steps over the one that is there; rubbing out either end of a bracket takes the whole bracket. Letters go to capitals.
 *
 * `typed` is the text as the box has it now with the caret at `caret`; `before` the text and the selection it had.
 */
export function amend(before: { readonly text: string; readonly start: number; readonly end: number }, typed: string, caret: number): Amended {
  const text = typed.toUpperCase().length === typed.length ? typed.toUpperCase() : typed;
  const inserted = text.slice(before.start, caret);
  const isInsertion = text.length - inserted.length + (before.end - before.start) === before.text.length && inserted.length > 0;
  if (isInsertion && inserted === '[') {
    // The notation has no bracket inside a bracket.
    if (caretPlace(before.text, readTyped(before.text), before.start).kind === 'inside') return { text: before.text, caret: before.start };
    const replaced = before.text.slice(before.start, before.end);
    const kept = [...replaced].filter((character) => isGlyph(foldCase(character))).join('');
    return { text: `${text.slice(0, caret)}${kept}]${text.slice(caret)}`, caret: caret + kept.length };
  }
  if (isInsertion && inserted === ']' && text.charAt(caret) === ']') return { text: text.slice(0, caret) + text.slice(caret + 1), caret };

  const isRubbedOut = before.text.length - text.length === 1 && before.start === before.end;
  if (isRubbedOut) {
    const lost = before.text.charAt(caret);
    const tile = lost === '[' || lost === ']' ? readTyped(before.text).tiles.find(({ start, end }) => start <= caret && caret < end) : undefined;
    if (tile !== undefined) return { text: before.text.slice(0, tile.start) + before.text.slice(tile.end), caret: tile.start };
  }
  return { text, caret };
}

/** Where the caret stands among the tiles: inside a bracket, or before the tile at `place`, on the far or near side of a gap. */
export type CaretPlace = { readonly kind: 'inside'; readonly tile: number } | { readonly kind: 'between'; readonly place: number; readonly pastGap: boolean };

export function caretPlace(text: string, { tiles }: TypedMark, caret: number): CaretPlace {
  const inside = tiles.findIndex(({ start, end }) => start < caret && caret < end);
  if (inside >= 0) return { kind: 'inside', tile: inside };
  const place = tiles.filter(({ end }) => end <= caret).length;
  return { kind: 'between', place, pastGap: caret > 0 && BREAK_CHARACTERS.includes(text.charAt(caret - 1)) };
}

function endOfBracket(text: string, start: number): number {
  const close = text.indexOf(']', start);
  return close < 0 ? text.length : close + 1;
}

function glyphOf(piece: string): Glyph | null {
  if (piece === '?') return { kind: 'unread' };
  if (piece === '*') return { kind: 'run' };
  if (piece.startsWith('[')) {
    const glyphs = [...new Set(foldCase(piece))].filter(isGlyph);
    return glyphs.length === 0 ? null : { kind: 'oneOf', glyphs };
  }
  const folded = foldCase(piece);
  return isGlyph(folded) ? { kind: 'sure', glyph: folded } : null;
}
