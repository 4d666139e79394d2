import { describe, expect, it } from 'vitest';
import { coversSpan, daysIn, daySpan, includesDay, overlap, sameSpan } from '#domain/dates/day-span.ts';

const WEEK = { from: 10, to: 16 };

describe('spans of days', () => {
  it('are closed and never empty', () => {
    expect(daySpan(3, 3)).toEqual({ from: 3, to: 3 });
    expect(daySpan(4, 3)).toBeNull();
    expect(daysIn(WEEK)).toBe(7);
  });

  it('overlap from a shared end on', () => {
    expect(overlap(WEEK, { from: 16, to: 20 })).toEqual({ from: 16, to: 16 });
    expect(overlap({ from: 12, to: 13 }, WEEK)).toEqual({ from: 12, to: 13 });
    expect(overlap(WEEK, { from: 17, to: 20 })).toBeNull();
    expect(overlap({ from: 1, to: 9 }, WEEK)).toBeNull();
  });

  it('hold their ends', () => {
    expect([9, 10, 16, 17].map((day) => includesDay(WEEK, day))).toEqual([false, true, true, false]);
    expect(coversSpan(WEEK, WEEK)).toBe(true);
    expect(coversSpan(WEEK, { from: 10, to: 17 })).toBe(false);
    expect(coversSpan(WEEK, { from: 9, to: 12 })).toBe(false);
    expect(sameSpan(WEEK, { from: 10, to: 16 })).toBe(true);
    expect(sameSpan(WEEK, { from: 10, to: 15 })).toBe(false);
  });
});
