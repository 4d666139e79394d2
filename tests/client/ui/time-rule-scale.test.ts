// @vitest-environment node
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ruleScale } from '#client/ui/time-rule-scale.ts';
import { civilOf, dayOf } from '#domain/dates/day.ts';

const span = fc
  .record({ from: fc.integer({ min: dayOf(1700, 1, 1), max: dayOf(2100, 1, 1) }), days: fc.integer({ min: 0, max: 20_000 }) })
  .map(({ from, days }) => ({ from, to: from + days }));
const spans = fc.array(span, { minLength: 1, maxLength: 8 });
const widths = fc.integer({ min: 120, max: 1400 });

describe('ruleScale', () => {
  it('is none where there is nothing to look at', () => {
    expect(ruleScale([], 600)).toBeNull();
  });

  it('holds every span it is to show, inside its length', () => {
    fc.assert(
      fc.property(spans, widths, (focus, width) => {
        const scale = ruleScale(focus, width)!;
        for (const { from, to } of focus) {
          expect(scale.x(from)).toBeGreaterThanOrEqual(0);
          expect(scale.x(to + 1)).toBeLessThanOrEqual(width);
        }
        expect(scale.x(scale.from)).toBe(0);
        expect(scale.x(scale.to + 1)).toBe(width);
      }),
    );
  });

  it('begins, ends and marks on the first of a month, in order, with marks enough and not too many', () => {
    fc.assert(
      fc.property(spans, widths, (focus, width) => {
        const { from, to, marks } = ruleScale(focus, width)!;
        expect([from, to + 1, ...marks.map(({ day }) => day)].map((day) => civilOf(day).day)).toEqual(Array.from({ length: marks.length + 2 }, () => 1));
        expect(marks.every(({ day }, place) => place === 0 || day > marks[place - 1]!.day)).toBe(true);
        expect(marks.length).toBeGreaterThan(1);
        expect(marks.length).toBeLessThan(300);
      }),
    );
  });

  it('shows a single day in months and thirty years in years', () => {
    const day = dayOf(1939, 7, 25);
    const close = ruleScale([{ from: day, to: day }], 700)!;
    expect(close.to - close.from).toBeLessThan(250);
    expect(close.marks.map(({ label }) => label)).toContain('Jul');
    const far = ruleScale([{ from: dayOf(1927, 3, 14), to: dayOf(1957, 3, 14) }], 700)!;
    expect(far.marks.map(({ label }) => label)).toContain('1940');
  });

  it('says the year of its first month and of every January', () => {
    const labels = ruleScale([{ from: dayOf(1940, 10, 10), to: dayOf(1941, 3, 3) }], 700)!.marks.map(({ label }) => label);
    expect(labels[0]).toMatch(/^[A-Z][a-z]{2} 1940$/);
    expect(labels).toContain('1941');
    expect(labels).not.toContain('Jan');
  });
});
