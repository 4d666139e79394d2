import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { GLYPHS } from '#domain/marks/glyphs.ts';
import { NOTATION, parseReading, writeReading, type Glyph, type Reading, type ReadingFault } from '#domain/marks/reading.ts';

function sure(text: string): Glyph[] {
  return [...text].map((glyph) => ({ kind: 'sure', glyph }));
}

function read(text: string): Reading | ReadingFault['code'] {
  const result = parseReading(text);
  return result.ok ? result.value : result.fault.code;
}

const glyph = fc.constantFrom(...GLYPHS);
const anyGlyph: fc.Arbitrary<Glyph> = fc.oneof(
  glyph.map((one): Glyph => ({ kind: 'sure', glyph: one })),
  fc.uniqueArray(glyph, { minLength: 2, maxLength: 36 }).map((glyphs): Glyph => ({ kind: 'oneOf', glyphs })),
  fc.constant<Glyph>({ kind: 'unread' }),
);
const anyReading: fc.Arbitrary<Reading> = fc
  .record({
    glyphs: fc.array(anyGlyph, { minLength: 1, maxLength: NOTATION.glyphs - 1 }),
    run: fc.option(fc.nat(NOTATION.glyphs - 1), { nil: undefined }),
    breaks: fc.array(fc.boolean(), { minLength: NOTATION.glyphs, maxLength: NOTATION.glyphs }),
  })
  .map(({ glyphs, run, breaks }) => {
    const all = run === undefined ? glyphs : glyphs.toSpliced(run, 0, { kind: 'run' });
    return { glyphs: all, breaks: breaks.flatMap((is, place) => (is && place > 0 && place < all.length ? [place] : [])) };
  });

describe('parseReading', () => {
  it.each<readonly [string, Reading]>([
    ['RLKON', { glyphs: sure('RLKON'), breaks: [] }],
    ['rlkon', { glyphs: sure('RLKON'), breaks: [] }],
    ['ＲＬ①', { glyphs: sure('RL1'), breaks: [] }],
    ['B?', { glyphs: [...sure('B'), { kind: 'unread' }], breaks: [] }],
    ['[OD]', { glyphs: [{ kind: 'oneOf', glyphs: ['O', 'D'] }], breaks: [] }],
    ['[odO]', { glyphs: [{ kind: 'oneOf', glyphs: ['O', 'D'] }], breaks: [] }],
    ['[OO]', { glyphs: sure('O'), breaks: [] }],
    ['BLT*', { glyphs: [...sure('BLT'), { kind: 'run' }], breaks: [] }],
    ['B-BO-CB', { glyphs: sure('BBOCB'), breaks: [1, 3] }],
    ['B BO/C.B', { glyphs: sure('BBOCB'), breaks: [1, 3, 4] }],
    ['B -./ O', { glyphs: sure('BO'), breaks: [1] }],
    [' -B-O. ', { glyphs: sure('BO'), breaks: [1] }],
    ['B-*-O', { glyphs: [...sure('B'), { kind: 'run' }, ...sure('O')], breaks: [1, 2] }],
  ])('reads %s', (text, reading) => {
    expect(read(text)).toEqual(reading);
  });

  it.each<readonly [string, Partial<ReadingFault>]>([
    ['', { code: 'empty', at: 0, character: '' }],
    [' - ', { code: 'empty', at: 0, character: '' }],
    ['RL#ON', { code: 'not-a-glyph', at: 2, character: '#' }],
    ['RLÉ', { code: 'not-a-glyph', at: 2, character: 'É' }],
    ['R\u0301', { code: 'not-a-glyph', at: 1, character: '\u0301' }],
    ['R🔧', { code: 'not-a-glyph', at: 1, character: '🔧' }],
    ['🔧R', { code: 'not-a-glyph', at: 0, character: '🔧' }],
    ['½', { code: 'not-a-glyph', at: 0, character: '½' }],
    ['R\tL', { code: 'not-a-glyph', at: 1, character: '\t' }],
    ['*R*', { code: 'two-stars', at: 2, character: '*' }],
    ['[]', { code: 'empty-bracket', at: 1, character: ']' }],
    ['R[OD', { code: 'open-bracket', at: 1, character: '[' }],
    ['RO]', { code: 'stray-bracket', at: 2, character: ']' }],
    ['[A-C]', { code: 'range-in-bracket', at: 2, character: '-' }],
    ['[^A]', { code: 'not-a-glyph', at: 1, character: '^' }],
    ['[A?]', { code: 'not-a-glyph', at: 2, character: '?' }],
    ['[A[B]]', { code: 'not-a-glyph', at: 2, character: '[' }],
    ['[A B]', { code: 'not-a-glyph', at: 2, character: ' ' }],
    ['A'.repeat(33), { code: 'too-long', at: 32, character: 'A' }],
    ['A'.repeat(32) + '*', { code: 'too-long', at: 32, character: '*' }],
  ])('refuses %s', (text, fault) => {
    const result = parseReading(text);
    expect(result.ok ? null : result.fault).toMatchObject(fault);
    expect(result.ok ? '' : result.fault.message).not.toBe('');
  });

  it('reads thirty-two glyphs and no more, however many breaks', () => {
    expect(read('A- '.repeat(32))).toMatchObject({ glyphs: sure('A'.repeat(32)) });
    expect(read('A- '.repeat(33))).toBe('too-long');
  });

  it('refuses a hundred kilobytes without reading them', () => {
    for (const text of ['A', ' ', '[', '*', '🔧', '[A]']) expect(read(text.repeat(100_000))).toBe('too-long');
  });

  it('answers any text', () => {
    fc.assert(
      fc.property(fc.oneof(fc.string({ unit: 'binary' }), fc.string({ unit: fc.constantFrom(...'AO0?*[]-./ ^') })), (text) => {
        const result = parseReading(text);
        if (result.ok) expect(parseReading(writeReading(result.value))).toEqual(result);
        else expect(text.slice(result.fault.at).startsWith(result.fault.character)).toBe(true);
      }),
      { numRuns: 1_000 },
    );
  });
});

describe('writeReading', () => {
  it('is undone by parseReading', () => {
    fc.assert(
      fc.property(anyReading, (reading) => {
        expect(parseReading(writeReading(reading))).toEqual({ ok: true, value: reading });
      }),
    );
  });
});
