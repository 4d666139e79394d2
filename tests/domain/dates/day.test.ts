import { getDaysInMonth, getISOWeek, getISOWeeksInYear, getISOWeekYear, isLeapYear as isLeapYearOfLibrary } from 'date-fns';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  civilOf,
  dayOf,
  dayOfYear,
  daysInMonth,
  daysInYear,
  firstSundayOf,
  isLeapYear,
  isoWeekday,
  isoWeekOf,
  isoWeeksIn,
  isoWeekStart,
  parseDay,
  quarterOfMonth,
  writeDay,
} from '#domain/dates/day.ts';

const MS_A_DAY = 86_400_000;
const FIRST = dayOf(1499, 1, 1);
const LAST = dayOf(2201, 12, 31);
const anyDay = fc.integer({ min: FIRST, max: LAST });

/** The same day at noon where the test runs, which is what the library works on. */
function noonOf(day: number): Date {
  const { year, month, day: dayOfMonth } = civilOf(day);
  return new Date(year, month - 1, dayOfMonth, 12);
}

describe('a day as an integer', () => {
  it('counts from 1970-01-01', () => {
    expect(dayOf(1970, 1, 1)).toBe(0);
    expect(dayOf(1969, 12, 31)).toBe(-1);
  });

  it('names every day of seven centuries as the platform’s calendar does in UTC', { timeout: 30_000 }, () => {
    for (let day = FIRST; day <= LAST; day += 1) {
      const date = new Date(day * MS_A_DAY);
      const civil = { year: date.getUTCFullYear(), month: date.getUTCMonth() + 1, day: date.getUTCDate() };
      const ours = civilOf(day);
      if (ours.year !== civil.year || ours.month !== civil.month || ours.day !== civil.day || dayOf(civil.year, civil.month, civil.day) !== day) {
        expect(ours).toEqual(civil);
      }
    }
    expect(LAST - FIRST + 1).toBe(703 * 365 + 170);
  });

  it('reads and writes what the platform does, under any time zone', () => {
    fc.assert(
      fc.property(anyDay, (day) => {
        const iso = new Date(day * MS_A_DAY).toISOString().slice(0, 10);
        expect(writeDay(day)).toBe(iso);
        expect(parseDay(iso)).toEqual({ ok: true, value: day });
      }),
    );
  });

  it('is the same number in New York and on Lord Howe', () => {
    expect(['America/New_York', 'Australia/Lord_Howe']).toContain(Intl.DateTimeFormat().resolvedOptions().timeZone);
    const summerTimeEnds = ['1939-04-30', '1945-09-30', '2026-03-08', '2026-04-05', '2026-10-04', '2026-11-01'];
    expect(summerTimeEnds.map(parseDay)).toEqual([-11_204, -8_859, 20_520, 20_548, 20_730, 20_758].map((value) => ({ ok: true, value })));
  });

  it('knows leap years, the centuries too', { timeout: 30_000 }, () => {
    expect([1600, 1700, 1800, 1900, 2000, 2100, 1904, 1939].map(isLeapYear)).toEqual([true, false, false, false, true, false, true, false]);
    for (let year = 1500; year <= 2200; year += 1) {
      expect(isLeapYear(year)).toBe(isLeapYearOfLibrary(new Date(year, 5, 1)));
      expect(daysInYear(year)).toBe(dayOf(year + 1, 1, 1) - dayOf(year, 1, 1));
      for (let month = 1; month <= 12; month += 1) expect(daysInMonth(year, month)).toBe(getDaysInMonth(new Date(year, month - 1, 15)));
    }
  });

  it('numbers ISO weeks as date-fns does', { timeout: 30_000 }, () => {
    fc.assert(
      fc.property(anyDay, (day) => {
        const noon = noonOf(day);
        expect(isoWeekOf(day)).toEqual({ year: getISOWeekYear(noon), week: getISOWeek(noon) });
        expect(isoWeeksIn(isoWeekOf(day).year)).toBe(getISOWeeksInYear(noon));
        expect(isoWeekday(day)).toBe(noon.getDay() === 0 ? 7 : noon.getDay());
        const { year, week } = isoWeekOf(day);
        expect(day - isoWeekStart(year, week)).toBe(isoWeekday(day) - 1);
      }),
      { numRuns: 2_000 },
    );
  });

  /** Examples of ISO 8601: 1 January 1977 is in week 53 of 1976, 31 December 2008 in week 1 of 2009. */
  it.each([
    ['1977-01-01', 1976, 53],
    ['2008-12-31', 2009, 1],
    ['2010-01-03', 2009, 53],
    ['1985-04-12', 1985, 15],
  ])('puts %s in a week of %i, the %i.', (iso, year, week) => {
    const day = parseDay(iso);
    expect(day.ok && isoWeekOf(day.value)).toEqual({ year, week });
  });

  it('finds ordinal days, quarters and first Sundays', () => {
    expect(dayOfYear(dayOf(1985, 4, 12))).toBe(102);
    expect(dayOfYear(dayOf(2000, 12, 31))).toBe(366);
    expect([1, 3, 4, 12].map(quarterOfMonth)).toEqual([1, 1, 2, 4]);
    // 49 CFR 574.5: the first full week of 2009 began on Sunday, 4 January.
    expect(writeDay(firstSundayOf(2009))).toBe('2009-01-04');
    expect(writeDay(firstSundayOf(2012))).toBe('2012-01-01');
  });
});

describe('parseDay', () => {
  it.each(['', '1939', '1939-3-12', '39-03-12', '1939-03-12T00:00', ' 1939-03-12', '1939/03/12', '+1939-03-12', '١٩٣٩-٠٣-١٢'])(
    'refuses “%s”, which is not how a date is written',
    (text) => {
      expect(parseDay(text)).toMatchObject({ ok: false, fault: { code: 'not-a-date' } });
    },
  );

  it.each(['1939-02-29', '1900-02-29', '1939-13-01', '1939-00-10', '1939-04-31', '1939-01-00', '1939-01-32'])(
    'refuses %s, which the calendar doesn’t have',
    (text) => {
      expect(parseDay(text)).toMatchObject({ ok: false, fault: { code: 'no-such-day' } });
    },
  );

  it('takes the leap day where there is one', () => {
    expect(parseDay('2000-02-29')).toEqual({ ok: true, value: dayOf(2000, 2, 29) });
  });
});
