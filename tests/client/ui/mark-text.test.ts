// @vitest-environment node
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { amend, caretPlace, readTyped } from '#client/ui/mark-text.ts';
import { parseReading } from '#domain/marks/reading.ts';

describe('readTyped', () => {
  it.each([
    ['', 0, []],
    ['BBOCB', 5, []],
    ['B-BO-CB', 5, [1, 3]],
    ['B?[OD]*', 4, []],
    ['B[', 2, []],
    [' B', 1, [0]],
    ['B ', 1, [1]],
    ['é', 1, []],
  ])('takes %j apart', (text, tiles, gaps) => {
    expect(readTyped(text).tiles).toHaveLength(tiles);
    expect(readTyped(text).gaps).toEqual(gaps);
  });

  it('draws what the notation means wherever the notation takes it', () => {
    const piece = fc.oneof(fc.constantFrom('B', '7', 'q', '?', '[OD]', '[b8]', '*', '-', ' ', '.', '[A]'), fc.constantFrom('[', ']', 'é', '[]'));
    fc.assert(
      fc.property(fc.array(piece, { maxLength: 12 }), (pieces) => {
        const text = pieces.join('');
        const parsed = parseReading(text);
        const typed = readTyped(text);
        expect(typed.tiles.every(({ start, end }, place) => start < end && start >= (typed.tiles[place - 1]?.end ?? 0))).toBe(true);
        if (!parsed.ok) return;
        const drawn = typed.tiles.map(({ glyph }) => (glyph?.kind === 'oneOf' && glyph.glyphs.length === 1 ? { kind: 'sure', glyph: glyph.glyphs[0] } : glyph));
        expect(drawn).toEqual(parsed.value.glyphs);
        expect(typed.gaps.filter((gap) => gap > 0 && gap < typed.tiles.length)).toEqual(parsed.value.breaks);
      }),
    );
  });
});

/** Types into a box: `|` is the caret, `<…>` the selection. */
function type(box: string, key: string): string {
  const start = box.search(/[|<]/);
  const end = box.includes('<') ? box.indexOf('>') - 1 : start;
  const text = box.replace(/[|<>]/g, '');
  const { text: amended, caret } = amend({ text, start, end }, text.slice(0, start) + key + text.slice(end), start + key.length);
  return `${amended.slice(0, caret)}|${amended.slice(caret)}`;
}

/** Rubs out the character before the caret. */
function rubOut(box: string): string {
  const at = box.indexOf('|');
  const text = box.replace('|', '');
  const { text: amended, caret } = amend({ text, start: at, end: at }, text.slice(0, at - 1) + text.slice(at), at - 1);
  return `${amended.slice(0, caret)}|${amended.slice(caret)}`;
}

describe('amend', () => {
  it.each([
    ['BB|', 'o', 'BBO|'],
    ['B|CB', '[', 'B[|]CB'],
    ['B[|]CB', 'O', 'B[O|]CB'],
    ['B[O|]CB', '[', 'B[O|]CB'],
    ['B[OD|]CB', ']', 'B[OD]|CB'],
    ['B<O>CB', '[', 'B[O|]CB'],
    ['B<?>CB', '[', 'B[|]CB'],
    ['B<O>CB', '?', 'B?|CB'],
    ['|', 'B[OD]-CB', 'B[OD]-CB|'],
    ['<BBOCB>', 'RLKON', 'RLKON|'],
  ])('%s and %s make %s', (box, key, after) => {
    expect(type(box, key)).toBe(after);
  });

  it.each([
    ['BBO|', 'BB|'],
    ['B[|]CB', 'B|CB'],
    ['B[OD]|CB', 'B|CB'],
    ['B[OD|]CB', 'B[O|]CB'],
    ['B-|CB', 'B|CB'],
  ])('rubbing out in %s leaves %s', (box, after) => {
    expect(rubOut(box)).toBe(after);
  });

  it('leaves a letter alone whose capital is longer', () => {
    expect(type('B|', 'ß')).toBe('Bß|');
  });

  it('never leaves a bracket open that one key opened', () => {
    fc.assert(
      fc.property(fc.array(fc.constantFrom('B', 'O', '[', ']', '?', '-', 'rub'), { maxLength: 20 }), (keys) => {
        const box = keys.reduce((held, key) => (key === 'rub' ? (held.startsWith('|') ? held : rubOut(held)) : type(held, key)), '|');
        const opened = box.match(/\[/g)?.length ?? 0;
        const closed = box.match(/\]/g)?.length ?? 0;
        expect(closed).toBeGreaterThanOrEqual(opened);
      }),
      { examples: [[['[', '[', ']', ']', 'rub']]] },
    );
  });
});

describe('caretPlace', () => {
  const at = (text: string, caret: number) => caretPlace(text, readTyped(text), caret);
  it('stands between tiles, on either side of a gap, or inside a bracket', () => {
    expect(at('B-CB', 0)).toEqual({ kind: 'between', place: 0, pastGap: false });
    expect(at('B-CB', 1)).toEqual({ kind: 'between', place: 1, pastGap: false });
    expect(at('B-CB', 2)).toEqual({ kind: 'between', place: 1, pastGap: true });
    expect(at('B[OD]', 3)).toEqual({ kind: 'inside', tile: 1 });
    expect(at('B[OD]', 5)).toEqual({ kind: 'between', place: 2, pastGap: false });
  });
});
