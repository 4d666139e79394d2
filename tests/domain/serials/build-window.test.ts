import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { dayOf, writeDay, type DaySpan } from '#domain/dates/day.ts';
import {
  placeSerial,
  type Anchor,
  type Placement,
  type SerialPlace,
  type SerialRange,
  type Series,
} from '#domain/serials/build-window.ts';
import { parseSerial } from '#domain/serials/serial.ts';

const year = (of: number): DaySpan => ({ from: dayOf(of, 1, 1), to: dayOf(of, 12, 31) });
const month = (of: number, inYear: number): DaySpan => ({ from: dayOf(inYear, of, 1), to: dayOf(inYear, of + 1, 1) - 1 });

function range(first: number, last: number | null, built: DaySpan, more: Partial<SerialRange> = {}): SerialRange {
  return {
    id: `${String(first)}-${String(last)}`,
    seriesId: 'main',
    accountId: 'works list',
    first: BigInt(first),
    last: last === null ? null : BigInt(last),
    built,
    inOrder: true,
    standing: 'solid',
    anchors: [],
    ...more,
  };
}

const series = (id: string, prefix: string, ranges: readonly SerialRange[]): Series => ({
  id,
  prefix,
  ranges: ranges.map((one) => ({ ...one, seriesId: id })),
});

function placed(text: string, all: readonly Series[], options?: Parameters<typeof placeSerial>[2]): SerialPlace {
  const serial = parseSerial(
    text,
    all.map((one) => one.prefix),
  );
  if (!serial.ok) throw new Error(`refused: ${serial.fault.code}`);
  return placeSerial(serial.value, all, options);
}

function onlyPlacement(text: string, ...ranges: readonly SerialRange[]): Placement {
  const { placements } = placed(text, [series('main', '', ranges)]);
  expect(placements).toHaveLength(1);
  const [placement] = placements;
  if (placement === undefined) throw new Error('nothing placed');
  return placement;
}

describe('a serial in a range', () => {
  // Methods, build date from a range: position 0.273087, 99.95 days in. Derived there, with half-open days.
  test('11000 of 10001 to 13660, built in 1936: 9 April 1936, within the year', () => {
    const placement = onlyPlacement('11000', range(10_001, 13_660, year(1936)));
    expect(placement).toMatchObject({ standing: 'in-range', window: year(1936), below: null, above: null });
    expect(placement.likely === null ? null : writeDay(placement.likely)).toBe('1936-04-09');
  });

  test('the first and the last number fall on the first and the last day when there are as many numbers as days', () => {
    const leapYear = range(1, 366, year(1936));
    expect(onlyPlacement('1', leapYear).likely).toBe(dayOf(1936, 1, 1));
    expect(onlyPlacement('366', leapYear).likely).toBe(dayOf(1936, 12, 31));
  });

  test('a number is the middle of its share of the days', () => {
    const twoInFourDays = range(1, 2, { from: 0, to: 3 });
    expect(onlyPlacement('1', twoInFourDays).likely).toBe(1);
    expect(onlyPlacement('2', twoInFourDays).likely).toBe(3);
  });

  test('numbers beyond what a double can count are told apart', () => {
    const first = 9_007_199_254_740_993n;
    const huge = range(0, 0, { from: 0, to: 3 }, { first, last: first + 3n });
    expect([0n, 1n, 2n, 3n].map((step) => onlyPlacement(String(first + step), huge).likely)).toEqual([0, 1, 2, 3]);
  });

  test('no likely day without order, nor without a last number', () => {
    expect(onlyPlacement('5', range(1, 10, year(1936), { inOrder: false }))).toMatchObject({ window: year(1936), likely: null });
    expect(onlyPlacement('5', range(1, null, year(1936)))).toMatchObject({
      standing: 'in-range',
      window: year(1936),
      likely: null,
    });
  });
});

describe('a serial in no range', () => {
  const ranges = [range(301, 400, year(1938)), range(101, 200, year(1936)), range(501, 600, year(1939))];
  test.each([
    { text: '250', standing: 'gap', below: '101-200', above: '301-400' },
    { text: '450', standing: 'gap', below: '301-400', above: '501-600' },
    { text: '100', standing: 'before-first', below: null, above: '101-200' },
    { text: '601', standing: 'after-last', below: '501-600', above: null },
  ])('$text: $standing, between $below and $above', ({ text, standing, below, above }) => {
    const placement = onlyPlacement(text, ...ranges);
    expect(placement).toMatchObject({ standing, window: null, likely: null, range: null });
    expect([placement.below?.id ?? null, placement.above?.id ?? null]).toEqual([below, above]);
  });

  test('nothing comes after an open last number', () => {
    expect(onlyPlacement('99999', ...ranges, range(601, null, year(1940))).standing).toBe('in-range');
  });

  test('a prefix that no series with a known range carries', () => {
    const known = [series('main', '3C', ranges), series('empty', '4C', [])];
    expect(placed('K150', known)).toMatchObject({ standing: 'unknown-prefix', placements: [] });
    expect(placed('4C150', known)).toMatchObject({ standing: 'unknown-prefix', placements: [] });
    expect(placed('3C150', known).standing).toBe('in-range');
  });
});

describe('anchors', () => {
  const anchor = (number: number, built: DaySpan): Anchor => ({ number: BigInt(number), built });
  const day = (monthOf: number, dayOfMonth: number): DaySpan => ({
    from: dayOf(1936, monthOf, dayOfMonth),
    to: dayOf(1936, monthOf, dayOfMonth),
  });
  const anchored = (...anchors: readonly Anchor[]): SerialRange => range(101, 200, year(1936), { anchors });

  test('split the range: from the first day of the earlier to the last day of the later', () => {
    const split = anchored(anchor(180, month(10, 1936)), anchor(120, month(3, 1936)), anchor(150, month(6, 1936)));
    expect(onlyPlacement('130', split).window).toEqual({ from: dayOf(1936, 3, 1), to: dayOf(1936, 6, 30) });
    expect(onlyPlacement('110', split).window).toEqual({ from: dayOf(1936, 1, 1), to: dayOf(1936, 3, 31) });
    expect(onlyPlacement('190', split).window).toEqual({ from: dayOf(1936, 10, 1), to: dayOf(1936, 12, 31) });
  });

  test('the likely day is reckoned between them', () => {
    // Numbers 120 to 129 over ten days: the number in the fifth place has the fifth day.
    expect(onlyPlacement('124', anchored(anchor(120, day(3, 1)), anchor(129, day(3, 10)))).likely).toBe(dayOf(1936, 3, 5));
  });

  test('one after the number gives an open range a likely day; none does not', () => {
    const open = range(101, null, year(1936), { anchors: [anchor(150, day(6, 1))] });
    expect(onlyPlacement('120', open)).toMatchObject({ window: { from: dayOf(1936, 1, 1), to: dayOf(1936, 6, 1) } });
    expect(onlyPlacement('120', open).likely).not.toBeNull();
    expect(onlyPlacement('160', open)).toMatchObject({
      window: { from: dayOf(1936, 6, 1), to: dayOf(1936, 12, 31) },
      likely: null,
    });
  });

  test('a machine that is itself an anchor has its days, in order or not', () => {
    const dated = anchored(anchor(150, day(6, 9)));
    expect(onlyPlacement('150', dated)).toMatchObject({ window: day(6, 9), likely: dayOf(1936, 6, 9) });
    expect(onlyPlacement('150', { ...dated, inOrder: false })).toMatchObject({ window: day(6, 9) });
    expect(onlyPlacement('150', anchored(anchor(150, month(6, 1936))))).toMatchObject({ window: month(6, 1936), likely: null });
  });

  test('two dates for one machine are taken together', () => {
    expect(onlyPlacement('150', anchored(anchor(150, day(6, 9)), anchor(150, day(6, 20)))).window).toEqual({
      from: dayOf(1936, 6, 9),
      to: dayOf(1936, 6, 20),
    });
  });

  test('say nothing about other numbers where those were not issued in order', () => {
    expect(onlyPlacement('130', { ...anchored(anchor(120, day(3, 1))), inOrder: false })).toMatchObject({
      window: year(1936),
      atOdds: [],
    });
  });

  test('are cut to the range', () => {
    const over = { from: dayOf(1935, 12, 1), to: dayOf(1936, 1, 31) };
    expect(onlyPlacement('105', anchored(anchor(110, over))).window).toEqual({ from: dayOf(1936, 1, 1), to: dayOf(1936, 1, 31) });
    expect(onlyPlacement('150', anchored(anchor(110, over))).window).toEqual(year(1936));
  });

  test('that contradict the range or each other are set aside and named', () => {
    const stray = anchor(150, year(1940));
    expect(onlyPlacement('130', anchored(stray))).toMatchObject({ window: year(1936), atOdds: [stray] });
    const outside = anchor(999, day(6, 1));
    expect(onlyPlacement('130', anchored(outside))).toMatchObject({ window: year(1936), atOdds: [outside] });
    const backwards = [anchor(120, day(9, 1)), anchor(140, day(3, 1))];
    expect(onlyPlacement('130', anchored(...backwards))).toMatchObject({ window: year(1936), atOdds: backwards });
  });
});

describe('several accounts and series', () => {
  const works = range(101, 200, year(1936));
  const club = range(101, 150, year(1937), { accountId: 'club list', standing: 'conjectural' });

  test('rival accounts stand side by side', () => {
    const { standing, placements } = placed('120', [series('main', '', [works, club])]);
    expect(standing).toBe('in-range');
    expect(placements.map((one) => [one.accountId, one.window])).toEqual([
      ['works list', year(1936)],
      ['club list', year(1937)],
    ]);
  });

  test('the preferred account is the register’s reading, even where it knows less', () => {
    const { standing, placements } = placed('180', [series('main', '', [works, club])], {
      preferredAccounts: ['club list', 'unheard of'],
    });
    expect(standing).toBe('after-last');
    expect(placements.map((one) => [one.accountId, one.standing])).toEqual([
      ['club list', 'after-last'],
      ['works list', 'in-range'],
    ]);
  });

  test('of a run that restarted, the one that holds the number comes first', () => {
    const firstRun = series('first run', '', [range(1, 50, year(1930))]);
    const secondRun = series('second run', '', [range(1, 500, year(1936))]);
    expect(placed('300', [firstRun, secondRun]).placements.map((one) => [one.seriesId, one.standing])).toEqual([
      ['second run', 'in-range'],
      ['first run', 'after-last'],
    ]);
    expect(placed('20', [firstRun, secondRun]).placements.map((one) => one.standing)).toEqual(['in-range', 'in-range']);
  });
});

describe('series that read alike', () => {
  const letterO = series('letter O', 'BO', [range(1, 500, year(1930))]);
  const plain = series('plain', 'B', [range(1, 50, year(1936))]);

  test('another series of the model whose prefix folds alike', () => {
    const { placements, readsAlike } = placed('B012', [plain, letterO]);
    expect(placements.map((one) => one.seriesId)).toEqual(['plain']);
    expect(readsAlike).toMatchObject([{ seriesId: 'letter O', number: 12n, substitutions: [{ at: 1, seen: '0', taken: 'O' }] }]);
  });

  test('another series of the maker, named with its ranges', () => {
    const { readsAlike } = placed('B12', [plain], { elsewhere: [series('of another model', 'B', [range(10, 20, year(1940))])] });
    expect(readsAlike.map((one) => [one.seriesId, one.ranges.map((held) => held.id)])).toEqual([['of another model', ['10-20']]]);
  });

  test('not one whose ranges do not hold the number', () => {
    expect(placed('B0900', [plain, letterO]).readsAlike).toEqual([]);
    expect(
      placed('B12', [plain], { elsewhere: [series('of another model', 'B', [range(13, 20, year(1940))])] }).readsAlike,
    ).toEqual([]);
  });
});

describe('laws', () => {
  const numbers = fc.tuple(fc.nat(1000), fc.nat(1000)).map(([first, more]) => ({ first, last: first + more }));
  const days = fc
    .tuple(fc.integer({ min: -20_000, max: 20_000 }), fc.nat(800))
    .map(([from, more]) => ({ from, to: from + more }));
  const anchors = fc.array(
    fc.record({ at: fc.double({ min: 0, max: 1, noNaN: true }), day: fc.double({ min: 0, max: 1, noNaN: true }) }),
    { maxLength: 4 },
  );

  test('the likely day lies in the window, the window in the range, and both keep the order of the numbers', () => {
    fc.assert(
      fc.property(numbers, days, anchors, ({ first, last }, built, dated) => {
        const inOrder = dated.map((one) => one.at).toSorted((one, other) => one - other);
        const daysInOrder = dated.map((one) => one.day).toSorted((one, other) => one - other);
        const known = inOrder.map((at, place) => {
          const on = built.from + Math.floor((daysInOrder[place] ?? 0) * (built.to - built.from));
          return { number: BigInt(first + Math.floor(at * (last - first))), built: { from: on, to: on } };
        });
        const main = [series('main', '', [range(first, last, built, { anchors: known })])];
        let before: Placement | undefined;
        for (let number = first; number <= last; number += 1 + Math.floor((last - first) / 50)) {
          const [placement] = placed(String(number), main).placements;
          const window = placement?.window;
          if (placement === undefined || window === undefined || window === null) throw new Error('not in range');
          expect(window.from >= built.from && window.to <= built.to && window.from <= window.to).toBe(true);
          if (placement.likely !== null) expect(placement.likely >= window.from && placement.likely <= window.to).toBe(true);
          if (before?.window) expect(window.from >= before.window.from && window.to >= before.window.to).toBe(true);
          before = placement;
        }
      }),
    );
  });
});
