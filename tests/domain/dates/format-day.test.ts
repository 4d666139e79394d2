import { describe, expect, it } from 'vitest';
import { parseDay } from '#domain/dates/day.ts';
import { formatDay, formatSpan } from '#domain/dates/format-day.ts';

function day(iso: string): number {
  const result = parseDay(iso);
  if (!result.ok) throw new Error(result.fault.message);
  return result.value;
}

describe('days and spans as people read them', () => {
  it('writes a day', () => {
    expect(formatDay(day('1939-03-12'))).toBe('12 Mar 1939');
    expect(formatDay(day('1500-01-01'))).toBe('1 Jan 1500');
  });

  it.each([
    ['1939-03-12', '1939-03-12', '12 Mar 1939'],
    ['1939-03-03', '1939-03-09', '3–9 Mar 1939'],
    ['1939-03-28', '1939-04-03', '28 Mar – 3 Apr 1939'],
    ['1931-12-28', '1932-01-03', '28 Dec 1931 – 3 Jan 1932'],
    ['1937-03-01', '1937-03-31', 'March 1937'],
    ['1936-02-01', '1936-02-29', 'February 1936'],
    ['1936-02-01', '1936-02-28', '1–28 Feb 1936'],
    ['1937-01-01', '1937-03-31', 'January – March 1937'],
    ['1937-11-01', '1938-02-28', 'November 1937 – February 1938'],
    ['1939-01-01', '1939-12-31', '1939'],
    ['1928-01-01', '1954-12-31', '1928–1954'],
    ['1938-05-29', '1939-05-28', '29 May 1938 – 28 May 1939'],
  ])('writes %s to %s as %s', (from, to, text) => {
    expect(formatSpan({ from: day(from), to: day(to) })).toBe(text);
  });
});
