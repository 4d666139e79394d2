import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { combineReadings, sameGlyphs } from '#domain/marks/combine-readings.ts';
import type { CombinedReading, ReadersReading } from '#domain/marks/combine-readings.ts';
import { NOTATION, parseReading, writeReading } from '#domain/marks/reading.ts';
import type { Glyph, Reading } from '#domain/marks/reading.ts';

function read(text: string): Reading {
  const reading = parseReading(text);
  if (!reading.ok) throw new Error(reading.fault.message);
  return reading.value;
}

/** Readers a, b, c … of these texts. */
function readers(...texts: readonly string[]): readonly ReadersReading[] {
  return texts.map((text, place) => ({ reader: String.fromCodePoint(97 + place), reading: read(text) }));
}

function combined(...texts: readonly string[]): CombinedReading {
  return combineReadings(readers(...texts));
}

/** What was said at each place, and by how many: `A2` is A by two, `-1` nothing by one. */
function said({ places }: CombinedReading): readonly string[] {
  return places.map((place) => place.said.map(({ text, readers: by }) => `${text === '' ? '-' : text}${by.length}`).join(' '));
}

describe('readings of one length', () => {
  test.each<[string, readonly string[], string]>([
    ['one reader', ['B?[OD]-7'], 'B?[OD]-7'],
    ['all alike', ['KPOI', 'KPOI', 'KPOI'], 'KPOI'],
    ['two against one', ['BBOCB', 'BBDCB', 'BBOCB'], 'BBOCB'],
    ['one each: both stand', ['BBOCB', 'BBDCB'], 'BB[DO]CB'],
    ['three each different: all stand', ['A1', 'B1', 'C1'], '[ABC]1'],
    ['two and two: both stand', ['A1', 'B1', 'B1', 'A1'], '[AB]1'],
    ['who can’t read it says nothing', ['A?', 'AB', 'A?'], 'AB'],
    ['nobody can read it', ['A?', 'A?'], 'A?'],
    ['alternatives are half a vote each: B has one and a half', ['[AB]', 'B'], 'B'],
    ['alternatives are half a vote each: A and C have one and a half, B one', ['[AB]', '[BC]', 'A', 'C'], '[AC]'],
    ['alternatives named alike stay as they were named', ['[OD]', '[OD]'], '[OD]'],
  ])('%s', (_, texts, text) => {
    expect(combined(...texts).text).toBe(text);
  });
});

describe('readings of different lengths', () => {
  // Worked by hand: what stands under what, and the votes at each place.
  test.each<[string, readonly string[], readonly string[], string]>([
    ['a glyph most don’t see is dropped', ['ABC', 'ABXC', 'ABC'], ['A3', 'B3', '-2 X1', 'C3'], 'ABC'],
    ['a glyph one missed stands', ['ABXC', 'ABC', 'ABXC'], ['A3', 'B3', 'X2 -1', 'C3'], 'ABXC'],
    ['as many see one as see none: something stands there', ['ABC', 'AC'], ['A2', '-1 B1', 'C2'], 'A?C'],
    ['the first missed, the last in doubt', ['4406', '406', '4408'], ['42 -1', '43', '03', '62 81'], '4406'],
    ['look-alikes stand under one another', ['B06', '806', '06'], ['-1 81 B1', '03', '63'], '[8B]06'],
  ])('%s', (_, texts, places, text) => {
    const result = combined(...texts);
    expect(said(result).map((one) => one.split(' ').toSorted())).toEqual(places.map((one) => one.split(' ').toSorted()));
    expect(result.text).toBe(text);
  });

  test('are set beside each other at their glyphs, not at their ends', () => {
    const result = combined('XKPOI', 'KPOI', 'KPOI');
    expect(result.text).toBe('KPOI');
    expect(result.places.map(({ position }) => position)).toEqual([null, 0, 1, 2, 3]);
  });
});

describe('what is broken away', () => {
  test.each<[string, readonly string[], string]>([
    ['for all stays so', ['AB*', 'AB*'], 'AB*'],
    ['for one is what the other reads', ['AB*', 'ABCD'], 'ABCD'],
    ['for most stays, after what one reads there', ['AB*', 'ABC', 'AB*'], 'ABC*'],
    ['for one of two, where the other sees nothing, stays', ['AB*', 'AB'], 'AB*'],
    ['for one of three is not', ['AB*', 'AB', 'AB'], 'AB'],
    ['at the end for one and at the beginning for the other lies between', ['AB*', '*CD'], 'AB*CD'],
    ['at two places, each for half, leaves what was read', ['*BCD', 'ABC*'], 'ABCD'],
    ['in the middle', ['A*D', 'ABCD', 'ABCD'], 'ABCD'],
    ['altogether', ['*', '*'], '*'],
  ])('%s', (_, texts, text) => {
    expect(combined(...texts).text).toBe(text);
  });

  test('takes its reader out of the count', () => {
    const { places } = combined('AB*', 'ABC', 'ABC');
    expect(places.map(({ agree, readers: among }) => [agree, among])).toEqual([[3, 3], [3, 3], [2, 2], [2, 3]]);
  });
});

describe('breaks', () => {
  test.each<[string, readonly string[], string]>([
    ['most see them', ['B-BO', 'B-BO', 'BBO'], 'B-BO'],
    ['half see them', ['B-BO', 'BBO'], 'BBO'],
    ['before a glyph that is dropped go to the next', ['A-XB', 'A-B', 'A-B'], 'A-B'],
    ['before a dropped last glyph say nothing', ['AB-X', 'AB', 'AB'], 'AB'],
  ])('%s', (_, texts, text) => {
    expect(combined(...texts).text).toBe(text);
  });

  test('don’t keep readers from agreeing', () => {
    expect(combined('B-BO', 'BBO').whole).toMatchObject({ agree: 2, readers: 2 });
  });
});

describe('how sure it is', () => {
  /** Wilson's limits, from the quadratic (1 + z²/n) p² − (2x/n + z²/n) p + x²/n² = 0. */
  function roots(agree: number, among: number): [low: number, high: number] {
    const z = 1.959964 ** 2 / among;
    const [a, b, c] = [1 + z, -(2 * (agree / among) + z), (agree / among) ** 2];
    const root = Math.sqrt(b ** 2 - 4 * a * c);
    return [(-b - root) / (2 * a), (-b + root) / (2 * a)];
  }

  test('is told for the whole and for each place, with who said what', () => {
    const { whole, places } = combined('4406', '4406', '44?8');
    expect(whole).toMatchObject({ agree: 2, readers: 3 });
    expect([whole.low, whole.high].map((limit) => limit.toFixed(6))).toEqual(roots(2, 3).map((limit) => limit.toFixed(6)));
    expect(places[2]).toMatchObject({ settled: '0', position: 2, agree: 2, readers: 2, said: [{ text: '0', readers: ['a', 'b'] }, { text: '?', readers: ['c'] }] });
    expect(places[3]).toMatchObject({ settled: '6', position: 3, agree: 2, readers: 3, said: [{ text: '6', readers: ['a', 'b'] }, { text: '8', readers: ['c'] }] });
    expect(places[3]?.low).toBeCloseTo(roots(2, 3)[0], 9);
  });

  test('is nothing at a place nobody can read', () => {
    expect(combined('A?', 'A?').places[1]).toMatchObject({ settled: '?', agree: 2, readers: 2 });
    expect(combined('AB', 'AC').places[1]).toMatchObject({ settled: '[BC]', agree: 0, readers: 2 });
  });
});

test('readings too far apart to hold together come to anything at all', () => {
  const start = 'ABCDEFGHABCDEFGHABCDEFGHABCDEFG*';
  const end = '*KLMNPRSTKLMNPRSTKLMNPRSTKLMNPRS';
  const result = combined(start, end);
  expect(result.text).toBe('*');
  expect(result.places.every(({ position }) => position === null)).toBe(true);
  expect(result.whole).toMatchObject({ agree: 0, readers: 2 });
});

test('of nothing there is nothing to combine', () => {
  expect(() => combineReadings([])).toThrow(RangeError);
});

describe('whatever was read', () => {
  const letter = fc.constantFrom(...'AB8CO0');
  const anyGlyph: fc.Arbitrary<Glyph> = fc.oneof(
    { weight: 6, arbitrary: letter.map((glyph): Glyph => ({ kind: 'sure', glyph })) },
    fc.uniqueArray(letter, { minLength: 2, maxLength: 3 }).map((glyphs): Glyph => ({ kind: 'oneOf', glyphs })),
    fc.constant<Glyph>({ kind: 'unread' }),
  );
  const anyReading: fc.Arbitrary<Reading> = fc
    .record({ glyphs: fc.array(anyGlyph, { minLength: 1, maxLength: 7 }), run: fc.option(fc.nat(7)), breaks: fc.array(fc.boolean(), { minLength: 9, maxLength: 9 }) })
    .map(({ glyphs, run, breaks }) => {
      const all = run === null ? glyphs : glyphs.toSpliced(run, 0, { kind: 'run' });
      return { glyphs: all, breaks: breaks.flatMap((is, place) => (is && place > 0 && place < all.length ? [place] : [])) };
    });
  const several = fc.array(anyReading, { minLength: 1, maxLength: 5 }).map((all) => all.map((reading, place) => ({ reader: `r${place}`, reading })));

  test('what comes out is a reading', () => {
    fc.assert(
      fc.property(several, (all) => {
        const { text, reading, places } = combineReadings(all);
        const parsed = parseReading(text);
        expect(parsed).toEqual({ ok: true, value: reading });
        expect(reading.glyphs.length).toBeLessThanOrEqual(NOTATION.glyphs);
        const standing = places.filter(({ position }) => position !== null);
        if (text !== '*') expect(standing.map(({ settled }) => settled).join('')).toBe(text.replaceAll('-', ''));
        expect(standing.map(({ position }) => position)).toEqual(standing.map((_, place) => place));
      }),
    );
  });

  test('every reader has all of their own glyphs at some place, in their order', () => {
    fc.assert(
      fc.property(several, (all) => {
        const { places } = combineReadings(all);
        for (const { reader, reading } of all) {
          const own = places.flatMap(({ said: told }) => told.filter(({ readers: by }) => by.includes(reader)).map(({ text }) => text));
          const sorted = (text: string): string => [...text].sort().join('');
          expect(own.filter((text) => text !== '').map(sorted)).toEqual(reading.glyphs.map((glyph) => sorted(writeReading({ glyphs: [glyph], breaks: [] }))));
        }
      }),
    );
  });

  test('who comes first makes no difference', () => {
    fc.assert(
      fc.property(several.chain((all) => fc.tuple(fc.constant(all), fc.shuffledSubarray(all, { minLength: all.length }))), ([all, shuffled]) => {
        expect(combineReadings(shuffled)).toEqual(combineReadings(all));
      }),
    );
  });

  test('readers who agree get what they read, and all of them count', () => {
    fc.assert(
      fc.property(anyReading, fc.integer({ min: 1, max: 6 }), (reading, count) => {
        const all = Array.from({ length: count }, (_, place) => ({ reader: `r${place}`, reading }));
        const { text, whole, places } = combineReadings(all);
        expect(text).toBe(writeReading(reading));
        expect(whole).toMatchObject({ agree: count, readers: count });
        expect(places.every(({ agree, readers: among }) => agree === count && among === count)).toBe(true);
      }),
    );
  });

  test('more than half who agree are not outvoted', () => {
    fc.assert(
      fc.property(anyReading.filter(({ glyphs }) => glyphs.every(({ kind }) => kind === 'sure')), several, (reading, others) => {
        const agreeing = Array.from({ length: others.length + 1 }, (_, place) => ({ reader: `m${place}`, reading }));
        const withoutRuns = others.filter((other) => other.reading.glyphs.every(({ kind }) => kind !== 'run'));
        expect(sameGlyphs(combineReadings([...agreeing, ...withoutRuns]).reading, reading)).toBe(true);
      }),
    );
  });
});
