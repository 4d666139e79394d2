// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { isDisputed, sayAgreement, sayGlyphText } from '#client/features/marks/agreement-words.ts';
import { sayDatesInShort, sayMarkKind, sayNoDates, sayWhatRaises } from '#client/features/marks/mark-words.ts';
import { sayStanding } from '#client/features/marks/readings-table.tsx';
import { DISPUTED } from './samples.ts';

describe('sayAgreement', () => {
  // 3 of 4: Wilson (1927), formula as in Brown, Cai and DasGupta (2001), gives 0.3006 and 0.9544.
  it('says how many, and between which limits', () => {
    expect(sayAgreement({ agree: 3, readers: 4, low: 0.3006, high: 0.9544 }, 'B')).toBe('3 of 4 read B; between 30 and 95 in 100 would');
  });
  it('speaks of one reader as of one', () => {
    expect(sayAgreement({ agree: 1, readers: 1, low: 0.2065, high: 1 }, 'all of it so')).toBe('1 of 1 reads all of it so; between 21 and 100 in 100 would');
  });
});

describe('isDisputed', () => {
  it('is where more than one thing was read', () => {
    expect(DISPUTED.places.map(isDisputed)).toEqual([true, false]);
  });
});

describe('sayGlyphText', () => {
  it.each([
    ['B', 'B'],
    ['', 'nothing'],
    ['?', 'can’t be read'],
    ['*', 'broken away'],
    ['[OD]', 'O or D'],
  ])('says %s as %s', (text, said) => expect(sayGlyphText(text)).toBe(said));
});

describe('sayDatesInShort', () => {
  const day = (from: string) => ({ from, to: from, share: 0.5 });
  it('names one or two dates', () => {
    expect(sayDatesInShort({ status: 'dated', total: 1, candidates: [day('1939-03-12')] })).toBe('12 Mar 1939');
    expect(sayDatesInShort({ status: 'several', total: 2, candidates: [day('1941-01-13'), day('1941-11-03')] })).toBe('13 Jan 1941 or 3 Nov 1941');
  });
  it('counts more, with the years they span', () => {
    expect(sayDatesInShort({ status: 'several', total: 3, candidates: [day('1941-01-13'), day('1938-11-03'), day('1939-11-03')] })).toBe('three dates, 1938–1941');
  });
  it('does not claim years where it was told only some of the dates', () => {
    expect(sayDatesInShort({ status: 'several', total: 21, candidates: [day('1941-01-13')] })).toBe('21 dates');
  });
  it('says that no cipher can date it', () => {
    expect(sayDatesInShort({ status: 'none', total: 0, candidates: [] })).toBe('no cipher on record can date it');
  });
});

describe('words of a mark', () => {
  it('says kind and technique', () => {
    expect(sayMarkKind({ kind: 'plate', technique: 'stamped' })).toBe('Plate, stamped after machining');
  });
  it('says what would raise evidence, and nothing where nothing here would', () => {
    expect(sayWhatRaises('claimed')).toBe('A photo of the mark would raise it.');
    expect(sayWhatRaises('photographed')).toMatch(/^Another member/);
    expect(sayWhatRaises('confirmed')).toBeNull();
  });
  it('says why there are no dates', () => {
    const one = { kind: 'date-code', hidden: false, reading: 'B' } as const;
    expect(sayNoDates({ ...one, kind: 'serial' })).toBe('not a date');
    expect(sayNoDates({ ...one, hidden: true, reading: null })).toBe('kept until then');
    expect(sayNoDates({ ...one, reading: null })).toBe('nothing read to date');
    expect(sayNoDates(one)).toBe('not worked out yet');
  });
  it('says of a reading that was both taken back and replaced that it was taken back', () => {
    expect(sayStanding({ takenBackAt: '2026-03-05T10:00:00Z', replaced: true, independent: true })).toBe('no: taken back 5 Mar 2026');
  });
});
