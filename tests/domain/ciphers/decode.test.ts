import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decode, type DecodeOptions } from '#domain/ciphers/decode.ts';
import type { Decoding } from '#domain/ciphers/decoding.ts';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { dayOf, parseDay, type Day } from '#domain/dates/day.ts';
import { formatSpan } from '#domain/dates/format-day.ts';
import { parseReading } from '#domain/marks/reading.ts';
import { compiled, FEN, HES, parsed, TEN } from './worked-ciphers.ts';

const AS_OF = dayOf(2026, 12, 1);

function ask(definition: CipherDefinition, mark: string, options: Partial<DecodeOptions> = {}): Decoding {
  return decode(parsed(mark), compiled(definition), { asOf: AS_OF, ...options });
}

function dates(answer: Decoding): string[] {
  return answer.candidates.map(formatSpan);
}

function day(iso: string): Day {
  const result = parseDay(iso);
  if (!result.ok) throw new Error(result.fault.message);
  return result.value;
}

describe('what the fields pin down', () => {
  const monthAndYear: CipherDefinition = { ...HES, fields: [HES.fields[0]!, { field: 'year', symbols: 'numerals', width: 2 }] };

  it('widens to the month, the quarter, the code year where fields are missing', () => {
    expect(ask(monthAndYear, 'C37').candidates).toMatchObject([{ from: day('1937-03-01'), to: day('1937-03-31'), precision: 'month' }]);
    const quarterly: CipherDefinition = {
      ...HES,
      fields: [
        { field: 'year', symbols: 'numerals', width: 2 },
        { field: 'quarter', symbols: 'numerals', width: 1 },
      ],
    };
    expect(ask(quarterly, '374').candidates).toMatchObject([{ from: day('1937-10-01'), to: day('1937-12-31'), precision: 'quarter' }]);
    const yearly: CipherDefinition = { ...HES, fields: [{ field: 'year', symbols: 'numerals', width: 2 }], yearStart: '05-29' };
    expect(ask(yearly, '37').candidates).toMatchObject([{ from: day('1937-05-29'), to: day('1938-05-28'), precision: 'year' }]);
    expect(ask(FEN, 'K07').candidates[0]).toMatchObject({ precision: 'week' });
  });

  it('cuts what is not in use, and says so', () => {
    const late = { ...monthAndYear, usedFrom: '1937-03-20' };
    expect(ask(late, 'C37').candidates).toMatchObject([{ from: day('1937-03-20'), to: day('1937-03-31'), precision: 'span' }]);
    expect(ask({ ...late, usedFrom: '1937-03-31' }, 'C37').candidates).toMatchObject([{ precision: 'day', share: 1 }]);
  });

  it('weighs spans by their days', () => {
    const oneDigit = { ...monthAndYear, fields: [HES.fields[0]!, { field: 'year' as const, symbols: 'numerals', width: 1 }], usedFrom: '1926-02-15' };
    const answer = ask({ ...oneDigit, usedTo: '1936-12-31' }, 'B6');
    expect(dates(answer)).toEqual(['February 1936', '15–28 Feb 1926']);
    expect(answer.candidates.map(({ share }) => share)).toEqual([29 / 43, 14 / 43]);
  });

  it('runs days together that one spelling covers, also over the new year', () => {
    const seasons: CipherDefinition = {
      ...HES,
      fields: [
        { field: 'month', symbols: 'seasons', width: 1 },
        { field: 'year', symbols: 'pairs', width: 1 },
      ],
      symbolSets: { seasons: { kind: 'values', symbols: { W: [12, 1, 2], S: [6, 7, 8] } }, pairs: { kind: 'values', symbols: { A: [1930, 1931] } } },
    };
    expect(dates(ask(seasons, 'WA'))).toEqual(['December 1930 – February 1931', 'January – February 1930', 'December 1931']);
    expect(dates(ask(seasons, 'SA'))).toEqual(['June – August 1930', 'June – August 1931']);
  });

  it('lets fields that say the same twice disagree, and then has no date', () => {
    const twice: CipherDefinition = { ...TEN, fields: [...TEN.fields, { field: 'week', symbols: 'numerals', width: 2 }] };
    expect(dates(ask(twice, 'RLKON30'))).toEqual(['25 Jul 1939']);
    const wrong = ask(twice, 'RLKON31');
    expect(wrong.status).toBe('none');
    expect(wrong.reasons[0]).toEqual({ code: 'fields-disagree', message: 'R·LK·ON·31: the fields agree on no day' });
  });

  it('gives other fields as details, and literals nothing', () => {
    const shifts: CipherDefinition = {
      ...TEN,
      fields: [{ field: 'literal', text: 'BW-' }, ...TEN.fields, { field: 'other', symbols: 'hands', width: 1, name: 'shift' }],
      symbolSets: { ...TEN.symbolSets, hands: { kind: 'values', symbols: { D: 1, N: 2 } } },
    };
    for (const mark of ['BW-RLKON-N', 'BWRLKONN']) {
      expect(ask(shifts, mark).candidates).toMatchObject([{ from: day('1939-07-25'), details: { shift: 'N' } }]);
    }
    expect(ask(shifts, 'B-WRLKONN').status).toBe('none');
  });
});

describe('exceptions', () => {
  /** The registered-design mark of 1842–1867: month letter R of 1857 also meant 1–19 September. Key of The National Archives (UK). */
  const diamond: CipherDefinition = {
    fields: [
      { field: 'year', symbols: 'years', width: 1 },
      { field: 'month', symbols: 'months', width: 1 },
      { field: 'day', symbols: 'numerals', width: [1, 2] },
    ],
    symbolSets: {
      years: { kind: 'values', symbols: { K: 1857, L: 1856 } },
      months: { kind: 'values', symbols: { R: 8, D: 9 } },
    },
    usedFrom: '1842-01-01',
    usedTo: '1867-12-31',
    exceptions: [{ fields: { year: 'K', month: 'R' }, from: '1857-09-01', to: '1857-09-19', replaces: false }],
  };

  it('stands beside the table', () => {
    expect(dates(ask(diamond, 'KR10'))).toEqual(['10 Aug 1857', '10 Sep 1857']);
    expect(dates(ask(diamond, 'KR25'))).toEqual(['25 Aug 1857']);
    expect(dates(ask(diamond, 'LR10'))).toEqual(['10 Aug 1856']);
    expect(dates(ask(diamond, 'KD10'))).toEqual(['10 Sep 1857']);
  });

  it('takes the table’s place unless it says otherwise', () => {
    const replaced: CipherDefinition = { ...diamond, exceptions: [{ fields: { year: 'K', month: 'R' }, from: '1857-09-01', to: '1857-09-19' }] };
    expect(dates(ask(replaced, 'KR10'))).toEqual(['10 Sep 1857']);
    expect(ask(replaced, 'KR25').status).toBe('none');
    expect(dates(ask(replaced, 'K?10'))).toEqual(['10 Sep 1857']);
  });

  it('gives all its days where it names every field, cut to the days in use', () => {
    const named: CipherDefinition = { ...diamond, exceptions: [{ fields: { year: 'K', month: 'R', day: '32' }, from: '1867-12-30', to: '1868-02-01' }] };
    expect(ask(named, 'KR32').candidates).toMatchObject([{ from: day('1867-12-30'), to: day('1867-12-31'), precision: 'span', share: 1 }]);
  });
});

describe('limits and days in use', () => {
  it('keeps to the limits, and tells what lay outside', () => {
    const answer = ask(HES, 'C147', { limits: { from: day('1934-01-01'), to: day('1949-12-31') } });
    expect(dates(answer)).toEqual(['14 Mar 1937', '14 Mar 1947']);
    const outside = ask(TEN, 'RLKON', { limits: { to: day('1939-07-24') } });
    expect(outside.status).toBe('none');
    expect(outside.reasons[0]).toEqual({ code: 'outside-limits', message: 'R·LK·ON: outside the limits, 1 Jan 1928 – 24 Jul 1939' });
    expect(ask(TEN, 'RLKON', { limits: { from: day('1960-01-01') } }).reasons).toMatchObject([{ code: 'outside-limits' }]);
    expect(ask(TEN, 'RLKON', { limits: { from: 5, to: 4 } }).reasons).toMatchObject([{ code: 'outside-limits' }]);
  });

  it('looks up to the given day where the cipher is still in use', () => {
    const still = { ...HES, usedTo: null };
    expect(ask(still, 'C147', { asOf: day('1947-03-14') }).total).toBe(3);
    expect(ask(still, 'C147', { asOf: day('1947-03-13') }).total).toBe(2);
    const before = ask(still, 'C147', { asOf: day('1925-12-31') });
    expect(before.status).toBe('none');
    expect(before.reasons).toMatchObject([{ code: 'not-in-use' }]);
  });

  it('asks for limits where no field tells the year', () => {
    const yearless: CipherDefinition = { ...HES, fields: HES.fields.slice(0, 2) };
    expect(ask(yearless, 'C14')).toMatchObject({ status: 'none', reasons: [{ code: 'limits-needed' }] });
    const five = { from: day('1930-01-01'), to: day('1934-12-31') };
    expect(ask(yearless, 'C14', { limits: five }).total).toBe(5);
    expect(ask(yearless, 'C14', { limits: { ...five, to: day('1935-01-01') } }).reasons).toMatchObject([{ code: 'limits-needed' }]);
    expect(ask({ ...yearless, usedTo: '1930-12-31' }, 'C14').total).toBe(5);
  });
});

describe('what would settle it', () => {
  it('names the glyphs, the most telling first', () => {
    const [first, ...others] = ask(TEN, '?BLOI').settle;
    expect(first?.position).toBe(0);
    // Only B leaves anything open: 2 dates of 10, told apart by one bit.
    expect(first?.bits).toBeCloseTo(0.2, 12);
    expect(others).toEqual([]);
    const { settle } = ask(TEN, '[BO]LC[OC]');
    expect(settle).toEqual([
      { position: 0, bits: 1 },
      { position: 3, bits: 1 },
    ]);
    expect(ask(TEN, 'R[LK]KON').settle).toEqual([]);
    expect(ask(TEN, 'RLKON').settle).toEqual([]);
  });

  it('counts sure glyphs among the uncertain when they have look-alikes', () => {
    const answer = ask(HES, 'C147', { lookAlikes: true });
    expect(answer.settle.map(({ position }) => position).sort()).toEqual([0, 1, 2, 3]);
    expect(ask(HES, 'J147', { lookAlikes: true }).settle.map(({ position }) => position).sort()).toEqual([1, 2, 3]);
  });
});

describe('look-alikes', () => {
  it('takes part only where they are symbols of the cipher', () => {
    const answer = ask(TEN, 'RLKOI', { lookAlikes: true });
    expect(answer.candidates[0]).toMatchObject({ from: day('1938-07-25') });
    const unsure = ask(TEN, 'PLKON', { lookAlikes: true });
    expect(unsure.candidates[0]).toMatchObject({ from: day('1939-06-25') });
    const asRead = unsure.candidates[0]!.share;
    const asWorn = unsure.candidates.find(({ from }) => from === day('1939-07-25'))!.share;
    // A seen P may be an R or a B, and both are symbols of this cipher: 0.1 shared by two, against 0.9.
    expect(asWorn / asRead).toBeCloseTo(0.05 / 0.9, 12);
  });

  it('leaves a glyph sure that the cipher has no look-alike for', () => {
    const lone: CipherDefinition = {
      ...HES,
      fields: [HES.fields[0]!, { field: 'year', symbols: 'years', width: 1 }],
      symbolSets: { ...HES.symbolSets, years: { kind: 'values', symbols: { J: 1930, X: 1931 } } },
    };
    expect(ask(lone, 'JJ', { lookAlikes: true })).toMatchObject({ status: 'dated', likelihood: ask(lone, 'JJ').likelihood });
  });

  it('finds what a reading with a stranger in it may have been', () => {
    expect(ask(HES, 'Q147').reasons).toMatchObject([{ code: 'symbol-not-in-cipher', message: 'Glyph 1: Q is no symbol of this cipher' }]);
    expect(ask(HES, 'Q147', { lookAlikes: true }).total).toBeGreaterThan(0);
  });
});

describe('reasons', () => {
  it.each([
    ['RL', 'too-few-glyphs', '2 glyphs are too few for this cipher: its marks have 4 to 6'],
    ['RLKONRL', 'too-many-glyphs', '7 glyphs are too many for this cipher: its marks have 4 to 6'],
    ['RLKONRL*', 'too-many-glyphs', '7 glyphs are too many for this cipher: its marks have 4 to 6'],
    ['RZKON', 'symbol-not-in-cipher', 'Glyph 2: Z is no symbol of this cipher'],
    ['R[XZ]KON', 'symbol-not-in-cipher', 'Glyph 2: none of X, Z is a symbol of this cipher'],
    ['BBRB', 'not-in-use', 'B·B·RB: this cipher was not in use in a year 71; it was in use 1928–1954'],
    ['LOTON', 'no-such-day', 'L·OT·ON: no day 30 in month 2'],
    ['BBOC-B', 'field-cannot-end-at-break', 'B·BO·CB: the year can’t end at the gap after glyph 4'],
  ])('says of %s: %s', (mark, code, message) => {
    const answer = ask(TEN, mark);
    expect(answer).toMatchObject({ status: 'none', total: 0, candidates: [], likelihood: 0 });
    expect(answer.reasons[0]).toEqual({ code, message });
  });

  it('names weeks, ordinal days and years that there are not', () => {
    const [answer] = ask(FEN, 'B53').reasons;
    expect(answer).toEqual({ code: 'no-such-week', message: 'B·53: no week 53 in that year' });
    const ordinal: CipherDefinition = {
      ...HES,
      fields: [
        { field: 'year', symbols: 'numerals', width: 4 },
        { field: 'dayOfYear', symbols: 'numerals', width: 3 },
      ],
    };
    expect(ask(ordinal, '1937366').reasons[0]).toEqual({ code: 'no-such-day', message: '1937·366: no day 366 in that year' });
    expect(ask(ordinal, '1937367').reasons[0]).toEqual({ code: 'no-such-day', message: '1937·367: no day of the year 367' });
    expect(ask(ordinal, '2937001').reasons[0]).toEqual({ code: 'no-such-year', message: '2937·001: no year 2937' });
    expect(ask(ordinal, '1965001').reasons[0]).toMatchObject({ code: 'not-in-use' });
  });

  it('gives the splits thrown out beside those that stand', () => {
    const { reasons } = ask(TEN, 'BBOCB');
    expect(reasons).toContainEqual({ code: 'no-such-month', message: 'BBO·C·B: no month 113' });
    expect(reasons).toContainEqual({ code: 'too-many-glyphs', message: 'B·B·OCB: the year has 2 glyphs in this cipher, not 3' });
  });

  it('is never more than twenty, and always one where there is no date', { timeout: 60_000 }, () => {
    const marks = fc.string({ unit: fc.constantFrom(...'BLOCKPRINT?*-[]XZ1'), maxLength: 40 });
    fc.assert(
      fc.property(marks, fc.constantFrom(TEN, HES, FEN), fc.boolean(), (mark, definition, lookAlikes) => {
        const reading = parseReading(mark);
        fc.pre(reading.ok);
        const answer = decode(reading.value, compiled(definition), { asOf: AS_OF, lookAlikes });
        expect(answer.reasons.length).toBeLessThanOrEqual(20);
        if (answer.status === 'none') expect(answer.reasons.length).toBeGreaterThan(0);
        for (const { share } of answer.candidates) expect(share > 0 && share <= 1).toBe(true);
      }),
      { numRuns: 150 },
    );
  });
});
