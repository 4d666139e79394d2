// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { sayDay, sayMoment, sayOpenSpan, saySpan, sayYears } from '#client/lib/say-date.ts';
import { capital, sayCount, sayFigure, sayList, sayPlace } from '#client/lib/say-number.ts';

describe('dates', () => {
  it('are said as people write them', () => {
    expect(sayDay('1939-03-12')).toBe('12 Mar 1939');
    expect(saySpan({ from: '1939-03-03', to: '1939-03-09' })).toBe('3–9 Mar 1939');
    expect(sayMoment('2026-03-04T23:30:00Z')).toBe('4 Mar 2026');
  });
  it.each([
    ['1938-07-01', '1944-03-31', 'July 1938 – March 1944', '1938–1944'],
    ['1944-04-01', null, 'from 1 Apr 1944', '1944 on'],
    [null, '1954-12-31', 'until 31 Dec 1954', 'until 1954'],
    [null, null, 'dates not on record', 'years not on record'],
    ['1941-01-01', '1941-12-31', '1941', '1941'],
  ])('%s to %s', (from, to, span, years) => {
    expect(sayOpenSpan({ from, to })).toBe(span);
    expect(sayYears({ from, to })).toBe(years);
  });
  it('refuse text that is no day', () => {
    expect(() => sayDay('1939-02-30')).toThrow(RangeError);
  });
});

describe('numbers', () => {
  it('go in words up to twelve', () => {
    expect([0, 1, 12, 13, 1204, 1_000_000].map(sayCount)).toEqual(['no', 'one', 'twelve', '13', '1,204', '1,000,000']);
    expect(sayFigure(999)).toBe('999');
  });
  it('name places', () => {
    expect([0, 1, 11, 12, 20, 21, 22, 23, 110].map(sayPlace)).toEqual(['first', 'second', 'twelfth', '13th', '21st', '22nd', '23rd', '24th', '111th']);
  });
  it('join in a list', () => {
    expect([[], ['a'], ['a', 'b'], ['a', 'b', 'c']].map((words) => sayList(words, 'or'))).toEqual(['', 'a', 'a or b', 'a, b or c']);
    expect(capital('two')).toBe('Two');
    expect(capital('')).toBe('');
  });
});
