import { describe, expect, it } from 'vitest';
import { decode } from '#domain/ciphers/decode.ts';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { dayOf } from '#domain/dates/day.ts';
import { formatSpan } from '#domain/dates/format-day.ts';
import { compiled, FEN, HES, parsed, TEN } from './worked-ciphers.ts';

const AS_OF = dayOf(2026, 12, 1);
const CIPHERS: Readonly<Record<string, CipherDefinition>> = { ten: TEN, hes: HES, fen: FEN };
const YEARS_OF_TEN = Array.from({ length: 27 }, (_, index) => 1928 + index);

/** All candidates of each are equally likely. Weeks are those of ISO 8601 (the standard's own rule: week 1 holds 4 January). */
const EXAMPLES: readonly (readonly [cipher: string, mark: string, dates: readonly string[]])[] = [
  ['ten', 'RLKON', ['25 Jul 1939']],
  ['ten', 'KPOI', ['6 May 1938']],
  ['ten', 'BBOCB', ['13 Jan 1941', '3 Nov 1941']],
  ['ten', 'B-BO-CB', ['13 Jan 1941']],
  [
    'ten',
    '?BLOI',
    [...['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep'].map((month) => `12 ${month} 1938`), '2 Nov 1938'],
  ],
  ['ten', 'TKKOI', []],
  ['ten', 'BLT*', YEARS_OF_TEN.map((year) => `20 Jan ${year}`)],
  ['hes', 'C147', ['14 Mar 1927', '14 Mar 1937', '14 Mar 1947', '14 Mar 1957']],
  ['hes', 'H?18', [1928, 1938, 1948, 1958].flatMap((year) => [11, 21, 31].map((day) => `${day} Aug ${year}`))],
  ['fen', 'K07', ['10–16 Feb 1919', '13–19 Feb 1939', '9–15 Feb 1959']],
  ['fen', 'A53', ['28 Dec 1931 – 3 Jan 1932']],
  ['fen', 'F01', ['3–9 Jan 1916', '30 Dec 1935 – 5 Jan 1936', '2–8 Jan 1956']],
];

describe('the worked examples', () => {
  it.each(EXAMPLES)('%s reads %s', (name, mark, dates) => {
    const answer = decode(parsed(mark), compiled(CIPHERS[name]!), { asOf: AS_OF });
    expect(answer.candidates.map(formatSpan)).toEqual(dates);
    expect(answer.total).toBe(dates.length);
    expect(answer.status).toBe(['none', 'dated'][dates.length] ?? 'several');
    for (const { share } of answer.candidates) expect(share).toBeCloseTo(1 / dates.length, 12);
  });

  it('says that a gap after the first or the second glyph would settle BBOCB', () => {
    const answer = decode(parsed('BBOCB'), compiled(TEN), { asOf: AS_OF });
    expect(answer.settle).toEqual([]);
    expect(answer.splits).toEqual([
      { after: 1, bits: 0 },
      { after: 2, bits: 0 },
    ]);
  });

  it('says why TKKOI has no date: no leading zero, and no month 0', () => {
    const { reasons } = decode(parsed('TKKOI'), compiled(TEN), { asOf: AS_OF });
    expect(reasons.slice(0, 2)).toEqual([
      { code: 'leading-zero', message: 'TK·K·OI: the month TK begins with a nought' },
      { code: 'no-such-month', message: 'T·KK·OI: no month 0' },
    ]);
  });

  it('shows which glyphs gave which field', () => {
    const [candidate] = decode(parsed('RLKON'), compiled(TEN), { asOf: AS_OF }).candidates;
    expect(candidate?.precision).toBe('day');
    expect(candidate?.spans).toEqual([
      { field: 'month', start: 0, end: 1, text: 'R', value: 7 },
      { field: 'day', start: 1, end: 3, text: 'LK', value: 25 },
      { field: 'year', start: 3, end: 5, text: 'ON', value: 1939 },
    ]);
  });
});
