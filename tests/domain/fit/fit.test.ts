import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { dayOf } from '#domain/dates/day.ts';
import type { DaySpan } from '#domain/dates/day.ts';
import { judgeFit, type CastingCandidate, type Fit, type FitFigures, type FitQuestion, type Lead } from '#domain/fit/fit.ts';

function judged(question: FitQuestion): Fit {
  const result = judgeFit(question);
  if (!result.ok) throw new Error(`refused: ${result.fault.code}`);
  return result.value;
}

const sure = (from: number, to: number = from): CastingCandidate => ({ from, to, share: 1 });
const figures = ({ late, in: within, early }: FitFigures): readonly number[] => [late, within, early];

/** The same sum the slow way: every casting day with every build day. */
function figuresByPairs(cast: DaySpan, build: DaySpan, lead: Lead): FitFigures {
  const counts = { late: 0, in: 0, early: 0 };
  for (let c = cast.from; c <= cast.to; c += 1) {
    for (let b = build.from; b <= build.to; b += 1) {
      const days = b - c;
      if (days < lead.least) counts.late += 1;
      else if (lead.most !== null && days > lead.most) counts.early += 1;
      else counts.in += 1;
    }
  }
  const pairs = (cast.to - cast.from + 1) * (build.to - build.from + 1);
  return { late: counts.late / pairs, in: counts.in / pairs, early: counts.early / pairs };
}

const YEAR_1939: DaySpan = { from: dayOf(1939, 1, 1), to: dayOf(1939, 12, 31) };
const SPRING_1938: DaySpan = { from: dayOf(1938, 2, 1), to: dayOf(1938, 4, 30) };
const EARLY_1941: DaySpan = { from: dayOf(1941, 2, 10), to: dayOf(1941, 3, 10) };
const UP_TO_A_YEAR: Lead = { least: 0, most: 365 };

describe('the worked table of the specification', () => {
  test.each([
    {
      what: '12 Mar 1939, built 1939',
      build: YEAR_1939,
      cast: sure(dayOf(1939, 3, 12)),
      sums: [0.1918, 0.8082, 0],
      verdict: 'possible',
    },
    {
      what: '20 Sep 1938, built 1939',
      build: YEAR_1939,
      cast: sure(dayOf(1938, 9, 20)),
      sums: [0, 0.7205, 0.2795],
      verdict: 'possible',
    },
    { what: '31 Dec 1938, built 1939', build: YEAR_1939, cast: sure(dayOf(1938, 12, 31)), sums: [0, 1, 0], verdict: 'in-step' },
    {
      what: '2 Feb 1943, built 1939',
      build: YEAR_1939,
      cast: sure(dayOf(1943, 2, 2)),
      sums: [1, 0, 0],
      verdict: 'cast-after-build',
    },
    {
      what: 'March 1937, built February to April 1938',
      build: SPRING_1938,
      cast: sure(dayOf(1937, 3, 1), dayOf(1937, 3, 31)),
      sums: [0, 0.4944, 0.5056],
      verdict: 'possible',
    },
  ])('cast $what: $verdict', ({ build, cast, sums, verdict }) => {
    const fit = judged({ candidates: [cast], build, lead: UP_TO_A_YEAR });
    figures(fit).forEach((figure, place) => expect(figure).toBeCloseTo(sums[place] ?? NaN, 4));
    expect(fit.verdict).toBe(verdict);
    expect(fit.leadOnRecord).toBe(true);
    expect(fit.wouldSettle).toEqual([]);
  });

  test('cast 13 Jan or 3 Nov 1941, half each, built 10 Feb to 10 Mar 1941: unsettled, and which date would make it what', () => {
    const candidates = [
      { from: dayOf(1941, 1, 13), to: dayOf(1941, 1, 13), share: 0.5 },
      { from: dayOf(1941, 11, 3), to: dayOf(1941, 11, 3), share: 0.5 },
    ];
    const fit = judged({ candidates, build: EARLY_1941, lead: UP_TO_A_YEAR });
    expect(figures(fit)).toEqual([0.5, 0.5, 0]);
    expect(fit.verdict).toBe('unsettled');
    expect(fit.wouldSettle).toEqual([
      { verdict: 'in-step', share: 0.5, candidates: [0] },
      { verdict: 'cast-after-build', share: 0.5, candidates: [1] },
    ]);
  });

  test('cast 4 Jul 1935, built February to April 1938, no lead sourced: in step, and it says that none is on record', () => {
    const fit = judged({ candidates: [sure(dayOf(1935, 7, 4))], build: SPRING_1938 });
    expect(figures(fit)).toEqual([0, 1, 0]);
    expect(fit).toMatchObject({ verdict: 'in-step', leadOnRecord: false, lead: { least: 0, most: null } });
  });
});

describe('bounds', () => {
  const build = { from: 100, to: 120 };
  const lead = { least: 0, most: 30 };
  test.each([
    { cast: sure(90, 100), verdict: 'in-step', leads: [0, 30], why: 'both bounds on the ends of the lead' },
    { cast: sure(90, 101), verdict: 'possible', leads: [-1, 30], why: 'a day over the one end' },
    { cast: sure(89, 100), verdict: 'possible', leads: [0, 31], why: 'a day over the other' },
    { cast: sure(121, 140), verdict: 'cast-after-build', leads: [-40, -1], why: 'after the last build day' },
    { cast: sure(120, 140), verdict: 'possible', leads: [-40, 0], why: 'same-day casting and assembly is legal' },
    { cast: sure(60, 69), verdict: 'older-stock', leads: [31, 60], why: 'longer before than the lead allows' },
    { cast: sure(60, 70), verdict: 'possible', leads: [30, 60], why: 'just within it' },
  ])('cast $cast.from to $cast.to: $verdict ($why)', ({ cast, verdict, leads }) => {
    const fit = judged({ candidates: [cast], build, lead });
    expect(fit.verdict).toBe(verdict);
    expect(fit.candidates.map((candidate) => [candidate.leadLeast, candidate.leadMost])).toEqual([leads]);
  });

  test('a least lead above 0 makes a part cast too shortly before building late', () => {
    expect(judged({ candidates: [sure(95)], build, lead: { least: 40, most: 90 } }).verdict).toBe('cast-after-build');
  });

  test('without a sourced lead a part is never older stock', () => {
    expect(judged({ candidates: [sure(-36_500)], build }).verdict).toBe('in-step');
  });
});

describe('several candidates', () => {
  const build = { from: 100, to: 120 };
  const lead = { least: 0, most: 30 };
  const candidates = (...spans: readonly (readonly [from: number, to: number, share: number])[]): readonly CastingCandidate[] =>
    spans.map(([from, to, share]) => ({ from, to, share }));

  test('in step and possible together make possible', () => {
    expect(judged({ candidates: candidates([95, 95, 0.5], [110, 110, 0.5]), build, lead }).verdict).toBe('possible');
  });

  test('a candidate with a share below a hundredth has no say, but stays in the figures', () => {
    const fit = judged({ candidates: candidates([95, 95, 0.991], [200, 200, 0.009]), build, lead });
    expect(fit.verdict).toBe('in-step');
    expect(fit.late).toBeCloseTo(0.009, 12);
    expect(fit.candidates.map((candidate) => candidate.counts)).toEqual([true, false]);
  });

  test('a share of exactly a hundredth has a say', () => {
    expect(judged({ candidates: candidates([95, 95, 0.99], [200, 200, 0.01]), build, lead }).verdict).toBe('unsettled');
    const hundred = Array.from({ length: 100 }, (_, place): CastingCandidate => ({
      from: 200 + place,
      to: 200 + place,
      share: 1 / 100,
    }));
    expect(judged({ candidates: hundred, build, lead }).candidates.every((candidate) => candidate.counts)).toBe(true);
  });

  test('where no share reaches a hundredth all have a say', () => {
    const everyDay = Array.from({ length: 365 }, (_, place): CastingCandidate => ({
      from: 200 + place,
      to: 200 + place,
      share: 1 / 365,
    }));
    expect(judged({ candidates: everyDay, build, lead }).verdict).toBe('cast-after-build');
  });

  test('shares are parts of what was asked about', () => {
    const fit = judged({ candidates: candidates([95, 95, 0.2], [200, 200, 0.2]), build, lead });
    expect(figures(fit)).toEqual([0.5, 0.5, 0]);
    expect(fit.candidates.map((candidate) => candidate.share)).toEqual([0.5, 0.5]);
  });

  test('the candidates that would settle it are grouped by what they would make it', () => {
    const fit = judged({
      candidates: candidates([200, 200, 0.25], [95, 95, 0.25], [201, 201, 0.25], [10, 10, 0.25]),
      build,
      lead,
    });
    expect(fit.wouldSettle).toEqual([
      { verdict: 'in-step', share: 0.25, candidates: [1] },
      { verdict: 'older-stock', share: 0.25, candidates: [3] },
      { verdict: 'cast-after-build', share: 0.5, candidates: [0, 2] },
    ]);
  });
});

describe('published and derived figures for inclusive days', () => {
  // Comparing intervals, inclusive whole days: derived there from independent uniform days, no published source.
  test('the same 30 days: P(cast strictly before build) 0.483333, same day 1/30', () => {
    const fit = judged({ candidates: [sure(1, 30)], build: { from: 1, to: 30 }, lead: { least: 1, most: null } });
    expect(fit.in).toBeCloseTo(0.483333, 6);
    expect(judged({ candidates: [sure(1, 30)], build: { from: 1, to: 30 }, lead: { least: 0, most: 0 } }).in).toBeCloseTo(
      1 / 30,
      12,
    );
  });

  test('days 0 to 30 against 15 to 45: P(cast strictly before build) 0.858481, same day 0.016649', () => {
    const build = { from: 15, to: 45 };
    expect(judged({ candidates: [sure(0, 30)], build, lead: { least: 1, most: null } }).in).toBeCloseTo(0.858481, 6);
    expect(judged({ candidates: [sure(0, 30)], build, lead: { least: 0, most: 0 } }).in).toBeCloseTo(0.016649, 6);
  });

  test.each([
    { a: [0, 90], b: [60, 150], p: 17 / 18 },
    { a: [0, 10], b: [0, 10], p: 0.5 },
    { a: [0, 10], b: [20, 30], p: 1 },
    { a: [20, 30], b: [0, 10], p: 0 },
    { a: [0, 30], b: [10, 20], p: 0.5 },
    { a: [0, 100], b: [50, 60], p: 0.55 },
    { a: [0, 30], b: [0, 60], p: 0.75 },
  ] as const)('half-open [$a) before [$b) is $p once days are cut finely, ties counted half', ({ a, b, p }) => {
    const fineness = 1000;
    const candidates = [sure(a[0] * fineness, a[1] * fineness - 1)];
    const build = { from: b[0] * fineness, to: b[1] * fineness - 1 };
    const strictlyBefore = judged({ candidates, build, lead: { least: 1, most: null } }).in;
    const sameDay = judged({ candidates, build, lead: { least: 0, most: 0 } }).in;
    expect(strictlyBefore + sameDay / 2).toBeCloseTo(p, 9);
  });

  // Lead-time windows over real time: derived there, the first also simulated there (0.8008).
  test.each([
    { a: [0, 31], b: [31, 120], lead: [14, 90], p: 0.801377 },
    { a: [0, 30], b: [0, 60], lead: [0, 30], p: 0.5 },
  ] as const)('half-open [$a) and [$b), lead $lead: $p once days are cut finely', ({ a, b, lead, p }) => {
    const fineness = 10_000;
    const fit = judged({
      candidates: [sure(a[0] * fineness, a[1] * fineness - 1)],
      build: { from: b[0] * fineness, to: b[1] * fineness - 1 },
      lead: { least: lead[0] * fineness, most: lead[1] * fineness },
    });
    expect(fit.in).toBeCloseTo(p, 5);
  });

  // Lead-time windows, verdict by bounds: derived there. Its ends are half-open days, so the last day is one less here.
  test.each([
    { cast: [0, 30], build: [31, 119], verdict: 'in-step' },
    { cast: [200, 229], build: [0, 99], verdict: 'cast-after-build' },
    { cast: [0, 30], build: [400, 499], verdict: 'older-stock' },
    { cast: [0, 30], build: [10, 59], verdict: 'possible' },
  ] as const)('lead 0 to 180, cast $cast, built $build: $verdict', ({ cast, build, verdict }) => {
    const fit = judged({
      candidates: [sure(cast[0], cast[1])],
      build: { from: build[0], to: build[1] },
      lead: { least: 0, most: 180 },
    });
    expect(fit.verdict).toBe(verdict);
  });

  // Repeating codes: digit 4 in use 1930 to 1950 names 1934 and 1944; the machine was built in 1936. Derived there.
  test('a code of two decades fits by one of them: half the probability, and it says which', () => {
    const years = [1934, 1944].map((year) => ({ from: dayOf(year, 1, 1), to: dayOf(year, 12, 31), share: 0.5 }));
    const fit = judged({ candidates: years, build: { from: dayOf(1936, 1, 1), to: dayOf(1936, 12, 31) } });
    expect(fit.in).toBe(0.5);
    expect(fit.wouldSettle.map((group) => [group.verdict, group.candidates])).toEqual([
      ['in-step', [0]],
      ['cast-after-build', [1]],
    ]);
  });
});

describe('what it refuses', () => {
  const build = { from: 0, to: 10 };
  test.each([
    { question: { candidates: [], build }, fault: { code: 'no-candidates' } },
    { question: { candidates: [sure(1), sure(3, 2)], build }, fault: { code: 'candidate-reversed', candidate: 1 } },
    {
      question: { candidates: [{ from: 1, to: 1, share: -0.1 }], build },
      fault: { code: 'share-not-a-proportion', candidate: 0 },
    },
    {
      question: { candidates: [{ from: 1, to: 1, share: NaN }], build },
      fault: { code: 'share-not-a-proportion', candidate: 0 },
    },
    { question: { candidates: [{ from: 1, to: 1, share: 0 }], build }, fault: { code: 'no-share' } },
    { question: { candidates: [sure(1.5)], build }, fault: { code: 'not-whole-days', candidate: 0 } },
    { question: { candidates: [sure(1)], build: { from: 10, to: 0 } }, fault: { code: 'build-reversed' } },
    { question: { candidates: [sure(1)], build: { from: 0, to: Infinity } }, fault: { code: 'not-whole-days' } },
    { question: { candidates: [sure(1)], build, lead: { least: -1, most: 5 } }, fault: { code: 'lead-negative' } },
    { question: { candidates: [sure(1)], build, lead: { least: 5, most: 4 } }, fault: { code: 'lead-reversed' } },
    { question: { candidates: [sure(1)], build, lead: { least: 0.5, most: 4 } }, fault: { code: 'not-whole-days' } },
  ])('$fault.code', ({ question, fault }) => {
    expect(judgeFit(question)).toEqual({ ok: false, fault });
  });
});

describe('laws', () => {
  const span = (days: number): fc.Arbitrary<DaySpan> =>
    fc
      .tuple(fc.integer({ min: -400, max: 400 }), fc.integer({ min: 0, max: days }))
      .map(([from, length]) => ({ from, to: from + length }));
  const candidate = fc
    .tuple(span(60), fc.double({ min: 0.001, max: 1, noNaN: true }))
    .map(([days, share]) => ({ ...days, share }));
  const lead = fc
    .tuple(fc.integer({ min: 0, max: 200 }), fc.option(fc.integer({ min: 0, max: 300 })))
    .map(([least, more]): Lead => ({ least, most: more === null ? null : least + more }));
  const question = fc.record({
    candidates: fc.array(candidate, { minLength: 1, maxLength: 5 }),
    build: span(90),
    lead: fc.option(lead, { nil: undefined }),
  });

  test('the closed form is the sum over every pair of days', () => {
    fc.assert(
      fc.property(span(60), span(60), lead, (cast, build, accepted) => {
        expect(figures(judged({ candidates: [sure(cast.from, cast.to)], build, lead: accepted }))).toEqual(
          figures(figuresByPairs(cast, build, accepted)),
        );
      }),
    );
  });

  test('late, in and early are all there is', () => {
    fc.assert(
      fc.property(question, (asked) => {
        const fit = judged(asked);
        expect(fit.late + fit.in + fit.early).toBeCloseTo(1, 12);
        for (const figure of figures(fit)) expect(figure).toBeGreaterThanOrEqual(0);
      }),
    );
  });

  test('moving casting and building by the same days changes neither figures nor verdict', () => {
    fc.assert(
      fc.property(question, fc.integer({ min: -200_000, max: 200_000 }), (asked, days) => {
        const move = <Span extends DaySpan>(one: Span): Span => ({ ...one, from: one.from + days, to: one.to + days });
        const before = judged(asked);
        const after = judged({ ...asked, candidates: asked.candidates.map(move), build: move(asked.build) });
        expect(figures(after)).toEqual(figures(before));
        expect(after.verdict).toBe(before.verdict);
        expect(after.wouldSettle).toEqual(before.wouldSettle);
      }),
    );
  });

  test('a wider lead never makes a part less likely to fit', () => {
    fc.assert(
      fc.property(question, lead, fc.nat(50), fc.nat(50), (asked, accepted, sooner, later) => {
        const wider = {
          least: Math.max(0, accepted.least - sooner),
          most: accepted.most === null ? null : accepted.most + later,
        };
        const narrow = judged({ ...asked, lead: accepted }).in;
        expect(judged({ ...asked, lead: wider }).in).toBeGreaterThanOrEqual(narrow - 1e-12);
      }),
    );
  });

  test('verdict and figures of a candidate say the same', () => {
    fc.assert(
      fc.property(question, (asked) => {
        for (const one of judged(asked).candidates) {
          if (one.verdict === 'in-step') expect(one.in).toBe(1);
          if (one.verdict === 'cast-after-build') expect(one.late).toBe(1);
          if (one.verdict === 'older-stock') expect(one.early).toBe(1);
          if (one.verdict === 'possible') expect(one.in > 0 && one.in < 1).toBe(true);
        }
      }),
    );
  });
});
